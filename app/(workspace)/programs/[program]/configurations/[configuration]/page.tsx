import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { Suspense } from 'react';
import {
  allowancesOf,
  conditionsOf,
  findConfiguration,
  latestRollUp,
  pinnedRevisions,
  rotorRevisionsOf,
} from '@/db/queries/configurations';
import { programFrames } from '@/db/queries/program-frames';
import { limitsInForce } from '@/db/queries/settings';
import { OneButtonForm } from '@/components/forms/one-button-form';
import { viewAsked, viewHref } from '@/components/configurations/address';
import { changedSince } from '@/components/configurations/changed-since';
import { MadeFrom } from '@/components/configurations/made-from';
import { OnBoard } from '@/components/configurations/on-board';
import { placedFindings } from '@/components/configurations/placed-findings';
import { pinsOnPage } from '@/components/configurations/pins-on-page';
import { RolledUp } from '@/components/configurations/rolled-up';
import { FindingLines } from '@/components/findings/finding-lines';
import { FindingCounts } from '@/components/lists/finding-counts';
import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { Day } from '@/components/ui/day';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { configurationSource } from '@/lib/server/three-views/sources';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { DriversComing, DriversHere } from '../../drivers-here';
import { ProgramFrame } from '../../frame';
import { chooseFrameAction, rollUpAction, takeRevisionAction } from '../actions';

type Props = PageProps<'/programs/[program]/configurations/[configuration]'>;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { configuration: code, program: programCode } = await params;
  const { program } = await requireProgram(programCode, 'configurations.read');
  const configuration = await findConfiguration(serverDb(), program.id, code);
  return { title: configuration?.title ?? 'Configuration' };
}

/** A configuration: what it is made from, and what its last roll-up says. */
export default async function ConfigurationPage({ params, searchParams }: Props) {
  const { configuration: code, program: programCode } = await params;
  const access = await requireProgram(programCode, 'configurations.read');
  const { program, can } = access;
  const db = serverDb();
  const configuration = await findConfiguration(db, program.id, code);
  if (configuration === undefined) notFound();
  const [pins, rotorRevisions, conditions, rollUp, allowances, limits, { issues }] = await Promise.all([
    pinnedRevisions(db, configuration.id),
    rotorRevisionsOf(db, program.id),
    conditionsOf(db, configuration.id),
    latestRollUp(db, configuration.id),
    allowancesOf(db, program.id),
    limitsInForce(db, program.id),
    programFrames(db, program.id),
  ]);
  const [inForce] = issues;
  const station = `/programs/${program.code}/configurations`;
  const home = `${station}/${configuration.code}`;
  const view = viewAsked(await searchParams);
  const keeps = can('configurations.keep');
  const fields = {
    program: program.code,
    configuration: configuration.code,
    version: String(configuration.version),
  };
  const changed =
    rollUp === undefined
      ? []
      : changedSince(
          { ...rollUp.result, version: rollUp.configuration_version },
          { version: configuration.version, allowances, limits },
        );
  const shownCondition =
    rollUp?.result.conditions.find((one) => one.code === view.condition) ?? rollUp?.result.conditions[0];
  const stale = rollUp === undefined || changed.length > 0;
  const rollUpButton = keeps ? (
    <OneButtonForm
      action={rollUpAction}
      fields={fields}
      words="Roll up"
      pendingWords="Rolling up"
      kind={stale ? 'primary' : 'secondary'}
    />
  ) : null;
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title={configuration.title}
        above={<TextLink href={station}>Configurations</TextLink>}
        lead={
          <>
            {configuration.build_title}, frame issue {configuration.frame_issue_number}
            {rollUp === undefined ? null : (
              <>
                , rolled up by {rollUp.author} on <Day at={rollUp.created_at} time />
              </>
            )}
          </>
        }
        actions={
          <>
            <ButtonLink href={`${home}/views`}>See three views</ButtonLink>
            {rollUpButton}
            {!stale && can('baselines.submit') ? (
              <ButtonLink
                kind="primary"
                href={`/programs/${program.code}/baselines/submit?configuration=${configuration.code}`}
              >
                Submit for approval
              </ButtonLink>
            ) : null}
          </>
        }
      />
      {changed.length > 0 ? (
        <Banner
          severity="warning"
          word="Out of date"
          title="The inputs have changed since this was rolled up."
        >
          <p>{changed.join(' ')} What is shown is what they said before.</p>
        </Banner>
      ) : null}
      <div className="grid min-w-0 items-start gap-8 lg:grid-cols-[minmax(0,2fr)_minmax(288px,1fr)]">
        {rollUp === undefined ? (
          <EmptyPlace title="This configuration has not been rolled up yet" action={rollUpButton}>
            <p>
              Rolling up adds the subtotals of its list revisions and the items on board to mass, CG, inertia
              and angular momentum, and keeps the result here.
            </p>
          </EmptyPlace>
        ) : (
          <div className="grid min-w-0 gap-8">
            <RolledUp home={home} view={view} result={rollUp.result} limitsToday={limits} />
            <Suspense fallback={<DriversComing />}>
              <DriversHere
                source={conditionSource(program.id, code, shownCondition?.code)}
                asked={view.drivers}
                units={OUTPUT_UNITS[view.units]}
                hrefOf={(drivers) => viewHref(home, { ...view, drivers })}
                listsHref={`/programs/${program.code}/lists`}
                of={`${shownCondition?.title ?? ''}, as pinned now, without growth`}
              />
            </Suspense>
          </div>
        )}
        <aside className="grid min-w-0 gap-8" aria-label="Inputs and findings">
          <Section
            title="Made from"
            aside={keeps ? <TextLink href={`${home}/inputs`}>Choose revisions</TextLink> : null}
          >
            <MadeFrom
              pins={pinsOnPage(program.code, pins, configuration, rotorRevisions, issues)}
              take={keeps ? { action: takeRevisionAction, fields } : null}
            />
          </Section>
          {inForce === undefined || inForce.id === configuration.frame_issue_id ? null : (
            <Section title="Frame">
              <p>
                This configuration stands in frame issue {configuration.frame_issue_number}; issue{' '}
                {inForce.number}, {inForce.title}, is in force. Put into it, the same aircraft is stated from
                its datum; nothing moves.
              </p>
              {keeps ? (
                <OneButtonForm
                  action={chooseFrameAction}
                  fields={{ ...fields, frame_issue: String(inForce.number) }}
                  words={`Put into frame issue ${inForce.number}`}
                  pendingWords="Putting it there"
                />
              ) : null}
            </Section>
          )}
          <Section
            title="On board"
            aside={keeps ? <TextLink href={`${home}/conditions`}>Change conditions</TextLink> : null}
          >
            <OnBoard conditions={conditions} massUnit={OUTPUT_UNITS[view.units].mass} />
          </Section>
          {rollUp === undefined ? null : (
            <Section title="Findings" aside={<FindingCounts findings={rollUp.findings} />}>
              <FindingLines
                findings={placedFindings(
                  rollUp.findings,
                  program.code,
                  rollUp.result.conditions,
                  configuration.code,
                )}
              />
            </Section>
          )}
        </aside>
      </div>
      <Caution />
    </ProgramFrame>
  );
}

/** The lists and items of the condition that is shown, as they are pinned now. */
async function conditionSource(programId: string, code: string, condition: string | undefined) {
  const source = await configurationSource(serverDb(), programId, code);
  const shown = source.conditions.find((one) => one.code === condition);
  return shown === undefined || source.revisions.length === 0 ? null : { ...source, condition: shown };
}
