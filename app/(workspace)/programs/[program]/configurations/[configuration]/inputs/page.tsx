import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { findConfiguration, pinnedRevisions, rotorRevisionsOf } from '@/db/queries/configurations';
import { revisionsOfProgram } from '@/db/queries/list-revisions';
import { programFrames } from '@/db/queries/program-frames';
import { FrameChoice } from '@/components/configurations/frame-choice';
import { PinsForm, type PinChoice } from '@/components/configurations/pins-form';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../../frame';
import { chooseFrameAction, pinRevisionsAction } from '../../actions';

export const metadata: Metadata = { title: 'Choose revisions' };

const day = (at: Date): string => at.toISOString().slice(0, 10);

/** Which lists are part of a configuration, and on which revision each of them stands. */
export default async function InputsPage({
  params,
}: PageProps<'/programs/[program]/configurations/[configuration]/inputs'>) {
  const { configuration: code, program: programCode } = await params;
  const access = await requireProgram(programCode, 'configurations.keep');
  const { program } = access;
  const db = serverDb();
  const configuration = await findConfiguration(db, program.id, code);
  if (configuration === undefined) notFound();
  const [pins, everyRevision, everyRotors, frames] = await Promise.all([
    pinnedRevisions(db, configuration.id),
    revisionsOfProgram(db, program.id),
    rotorRevisionsOf(db, program.id),
    programFrames(db, program.id),
  ]);
  const home = `/programs/${program.code}/configurations/${configuration.code}`;
  const { frame_issue_id: issueId } = configuration;
  const revisions = everyRevision.filter((one) => frames.gap(one.frame_issue_id, issueId) === null);
  const rotors = everyRotors.filter(
    (one) => one.frame_issue_id === null || frames.gap(one.frame_issue_id, issueId) === null,
  );
  const outOfReach = everyRevision.length + everyRotors.length - revisions.length - rotors.length;
  const statedIn = (id: string | null): string =>
    id === null || id === issueId ? '' : `, in frame issue ${frames.issue(id).number}, converted`;
  const lists = [...new Map(revisions.map((one) => [one.list_code, one.list_title]))];
  const choices: PinChoice[] = lists.map(([list, title]) => ({
    name: `list:${list}`,
    label: title,
    pinned: String(pins.find((pin) => pin.list_code === list)?.number ?? ''),
    options: revisions
      .filter((one) => one.list_code === list)
      .map((one, index) => ({
        value: String(one.number),
        label: `Revision ${one.number}${index === 0 ? ', newest' : ''}: ${one.reason} (${one.rows} rows, ${day(one.created_at)}${statedIn(one.frame_issue_id)})`,
      })),
  }));
  if (rotors.length > 0)
    choices.push({
      name: 'rotors',
      label: 'Rotating parts',
      pinned: String(configuration.rotor_revision_number ?? ''),
      options: rotors.map((one, index) => ({
        value: String(one.number),
        label: `Revision ${one.number}${index === 0 ? ', newest' : ''}: ${one.reason} (${one.rotors.length} rotors, ${day(one.created_at)}${statedIn(one.frame_issue_id)})`,
      })),
    });
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title="Choose revisions"
        above={<TextLink href={home}>{configuration.title}</TextLink>}
        lead={`The configuration stands in frame issue ${configuration.frame_issue_number} and keeps what is chosen here until someone chooses again. What is stated in another issue is converted at each roll-up.${outOfReach === 0 ? '' : ` ${outOfReach} revisions are not offered: an issue between does not say how the one before lies in it.`}`}
      />
      {choices.length === 0 ? (
        <EmptyPlace title="There is no list revision yet">
          <p>Upload a mass list first; then its revisions can be chosen here.</p>
        </EmptyPlace>
      ) : (
        <PinsForm
          key={configuration.version}
          action={pinRevisionsAction}
          fields={{
            program: program.code,
            configuration: configuration.code,
            version: String(configuration.version),
          }}
          choices={choices}
          backHref={home}
        />
      )}
      {frames.issues.length < 2 ? null : (
        <Section title="Frame issue">
          <FrameChoice
            key={configuration.version}
            action={chooseFrameAction}
            fields={{
              program: program.code,
              configuration: configuration.code,
              version: String(configuration.version),
            }}
            present={String(configuration.frame_issue_number)}
            options={frames.issues.map(({ number, title }, index) => ({
              value: String(number),
              label: `${number}: ${title}${index === 0 ? ', in force' : ''}`,
            }))}
          />
        </Section>
      )}
    </ProgramFrame>
  );
}
