import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { findConfiguration, pinnedRevisions } from '@/db/queries/configurations';
import { lastSubmissionOf, leftOutOf } from '@/db/queries/baseline-history';
import { LeftOutTable } from '@/components/baselines/left-out-table';
import { SubmitForm } from '@/components/baselines/submit-form';
import { SubmittedConditions } from '@/components/baselines/submitted-conditions';
import { whereWords } from '@/lib/findings/where-words';
import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { findingKey } from '@/lib/baselines/finding-key';
import { AppError } from '@/lib/errors';
import { evaluate, type Evaluation } from '@/lib/server/configurations/roll-up-configuration';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';
import { submitConfigurationAction } from '../actions';

export const metadata: Metadata = { title: 'Submit for approval' };

/** Puts a configuration before the chief engineers: what stops it, what needs an answer, what it leaves out. */
export default async function SubmitPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/submit'>) {
  const access = await requireProgram((await params).program, 'baselines.submit');
  const { program } = access;
  const asked = (await searchParams)['configuration'];
  const configuration =
    typeof asked === 'string' ? await findConfiguration(serverDb(), program.id, asked) : undefined;
  if (configuration === undefined) notFound();
  const back = `/programs/${program.code}/configurations/${configuration.code}`;
  const [looked, pins, last] = await Promise.all([
    evaluateOrSay(configuration),
    pinnedRevisions(serverDb(), configuration.id),
    lastSubmissionOf(serverDb(), configuration.id),
  ]);
  const leftOut = await leftOutOf(
    serverDb(),
    pins.map((pin) => pin.revision_id),
  );
  const waits = last?.decision === null ? last : null;
  const titles = new Map([
    ...pins.map((pin) => [pin.list_code, pin.list_title] as const),
    ...('result' in looked ? looked.result.conditions.map(({ code, title }) => [code, title] as const) : []),
  ]);
  const findings = 'result' in looked ? looked.findings : [];
  const blockers = findings.filter(({ severity }) => severity === 'blocker');
  const notes = findings.filter(({ severity }) => severity === 'note');
  const stopped = waits !== null || blockers.length > 0 || !('result' in looked);
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title="Submit for approval"
        above={<TextLink href={back}>{configuration.title}</TextLink>}
        lead={`Freezes what configuration ${configuration.code} says now, for build ${configuration.build_title}, and puts it before the chief engineers.`}
      />
      {waits === null ? null : (
        <Banner
          severity="note"
          title="This configuration waits for a decision already"
          action={
            <TextLink href={`/programs/${program.code}/baselines/submissions/${waits.id}`}>Open it</TextLink>
          }
        >
          <p>It can be submitted again once &ldquo;{waits.title}&rdquo; is signed or returned.</p>
        </Banner>
      )}
      {'refused' in looked ? (
        <Banner
          severity="blocker"
          title="It cannot be rolled up yet"
          action={<TextLink href={back}>Open it</TextLink>}
        >
          <p>{looked.refused}</p>
        </Banner>
      ) : null}
      {blockers.map((blocker) => (
        <Banner key={findingKey(blocker)} severity="blocker" title={whereWords(blocker.where, titles)}>
          <p>{blocker.message}</p>
        </Banner>
      ))}
      {blockers.length > 0 ? (
        <p>
          {blockers.length === 1 ? 'This blocker stops' : `These ${blockers.length} blockers stop`} the
          submission. Mend the lists, pin their new revisions and come back.
        </p>
      ) : null}
      {'result' in looked ? (
        <div className="grid gap-8 lg:grid-cols-12">
          <div className="grid min-w-0 content-start gap-8 lg:col-span-7">
            {stopped ? (
              <div>
                <ButtonLink href={back}>Back to the configuration</ButtonLink>
              </div>
            ) : (
              <SubmitForm
                action={submitConfigurationAction}
                program={program.code}
                configuration={configuration}
                warnings={findings
                  .filter(({ severity }) => severity === 'warning')
                  .map((warning) => ({
                    finding: findingKey(warning),
                    where: whereWords(warning.where, titles),
                    message: warning.message,
                    lastAnswer: last?.answers[findingKey(warning)] ?? null,
                  }))}
                back={back}
              />
            )}
          </div>
          <div className="grid min-w-0 content-start gap-8 lg:col-span-5">
            <SubmittedConditions result={looked.result} />
            <Section title="Held lists">
              <ul className="grid gap-1">
                {pins.map((pin) => (
                  <li key={pin.list_code}>
                    {pin.list_title}, revision {pin.number}, {pin.rows} rows
                    {pin.newest > pin.number ? (
                      <span className="text-caution"> (revision {pin.newest} is newer)</span>
                    ) : null}
                  </li>
                ))}
              </ul>
            </Section>
            <Section title="Left out">
              {leftOut.length === 0 ? (
                <p className="text-ink-2">Nothing: there are no pending or potential adjustments.</p>
              ) : (
                <LeftOutTable lines={leftOut} />
              )}
            </Section>
            {notes.length > 0 ? (
              <Section title="Notes" aside={`${notes.length}, no answer needed`}>
                <ul className="grid gap-2">
                  {notes.map((note) => (
                    <li key={findingKey(note)} className="wrap-anywhere">
                      <span className="text-ink-2">{whereWords(note.where, titles)}: </span>
                      {note.message}
                    </li>
                  ))}
                </ul>
              </Section>
            ) : null}
          </div>
        </div>
      ) : null}
      <Caution />
    </ProgramFrame>
  );
}

/** An evaluation, or why there is none, in the words of the use case. */
async function evaluateOrSay(
  configuration: Parameters<typeof evaluate>[1],
): Promise<Evaluation | { readonly refused: string }> {
  try {
    return await evaluate(serverDb(), configuration);
  } catch (error) {
    if (error instanceof AppError && error.code === 'conflict') return { refused: error.message };
    throw error;
  }
}
