import { type Metadata } from 'next';
import { configurationsOfProgram } from '@/db/queries/configurations';
import { programFrames } from '@/db/queries/program-frames';
import { buildsOf } from '@/db/queries/settings';
import { ConfigurationForm } from '@/components/configurations/configuration-form';
import { ConfigurationTable } from '@/components/configurations/configuration-table';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../frame';
import { createConfigurationAction } from './actions';

export const metadata: Metadata = { title: 'Configurations' };

export default async function ConfigurationsPage({
  params,
}: PageProps<'/programs/[program]/configurations'>) {
  const access = await requireProgram((await params).program, 'configurations.read');
  const { program, can } = access;
  const home = `/programs/${program.code}/configurations`;
  const [configurations, builds, { issues }] = await Promise.all([
    configurationsOfProgram(serverDb(), program.id),
    buildsOf(serverDb(), program.id),
    programFrames(serverDb(), program.id),
  ]);
  const [issue] = issues;
  const keeps = can('configurations.keep') && issue !== undefined;
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title="Configurations"
        lead="A configuration pins list revisions and rotating parts, says what is on board in each condition, and rolls it all up."
      />
      {configurations.length === 0 ? (
        <EmptyPlace title="There is no configuration yet">
          <p>
            The first one takes the newest revision of every list and of the rotating parts, with the empty
            aircraft as its one condition.
          </p>
          {issue === undefined ? (
            <p>
              The <TextLink href={`/programs/${program.code}/settings`}>airframe frame</TextLink> comes first:
              every configuration stands in one.
            </p>
          ) : null}
        </EmptyPlace>
      ) : (
        <ConfigurationTable configurations={configurations} home={home} />
      )}
      {keeps ? (
        <Section
          title="Make a configuration"
          lead={
            issues.length > 1
              ? 'From the newest revisions there are. Frame issue and revisions can be looked at and changed on its page.'
              : `In frame issue ${issue.number}, from the newest revisions there are. Both can be looked at and changed on its page.`
          }
        >
          <ConfigurationForm
            action={createConfigurationAction}
            program={program.code}
            issues={issues.map(({ number, title }, index) => ({
              value: String(number),
              label: `${number}: ${title}${index === 0 ? ', in force' : ''}`,
            }))}
            builds={builds.map(({ code, title }) => ({ value: code, label: title }))}
          />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
