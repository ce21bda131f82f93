import { type Metadata } from 'next';
import { limitsInForce } from '@/db/queries/settings';
import { StandingTable } from '@/components/limits/standing-table';
import { MaturitySection } from '@/components/mass/maturity-section';
import { standingsOf } from '@/lib/loading/configuration';
import { ChangeTable, MomentumChangeTable } from '@/components/baselines/change-table';
import { chosen } from '@/components/baselines/choose';
import { ConditionChoice } from '@/components/baselines/condition-choice';
import { ConditionSheet } from '@/components/baselines/condition-sheet';
import { DecisionBanner } from '@/components/baselines/decision-banner';
import { GroupChangeTable } from '@/components/baselines/group-change-table';
import { LeftOutTable } from '@/components/baselines/left-out-table';
import { ListChangeTable } from '@/components/baselines/list-change-table';
import { cgLimits } from '@/components/baselines/cg-limits';
import { pathWith, rowsPath } from '@/components/baselines/paths';
import { ReasonForm } from '@/components/baselines/reason-form';
import { Rotors } from '@/components/baselines/rotors';
import { shownOfResult } from '@/components/baselines/shown-condition';
import { SignForm } from '@/components/baselines/sign-form';
import { SourceList } from '@/components/baselines/source-list';
import { TitleBlock } from '@/components/baselines/title-block';
import { whereWords } from '@/lib/findings/where-words';
import { Banner } from '@/components/ui/banner';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { placedFindings } from '@/components/configurations/placed-findings';
import { FindingLines } from '@/components/findings/finding-lines';
import { Caution } from '@/components/ui/caution';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { findingKey } from '@/lib/baselines/finding-key';
import { loadReview } from '@/lib/server/baselines/load-review';
import { serverDb } from '@/lib/server/database';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { ProgramFrame } from '../../../frame';
import { returnSubmissionAction, signSubmissionAction } from '../../actions';

export const metadata: Metadata = { title: 'Submission' };

/** What was submitted, what it changes, and the decision on it. */
export default async function SubmissionPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/submissions/[submission]'>) {
  const { program: code, submission: submissionId } = await params;
  const access = await requireProgram(code, 'submissions.read');
  const { program, role, user, can } = access;
  const home = `/programs/${program.code}/baselines`;
  const path = `${home}/submissions/${submissionId}`;
  const [review, limitsToday] = await Promise.all([
    orShow(() =>
      loadReview(serverDb(), { programId: program.id, submissionId, reader: { userId: user.id, role } }),
    ),
    limitsInForce(serverDb(), program.id),
  ]);
  const { submission, state, revisions, rotors, leftOut, former, newest } = review;
  const { comparison, lists, obstacles } = review;
  const asked = await searchParams;
  const { result } = submission;
  const limits = result.limits ?? limitsToday;
  const condition = chosen(result.conditions, asked['condition']);
  const point = chosen(result.operatingPoints, asked['point']);
  const change = comparison.conditions.find((one) => one.code === condition?.code) ?? null;
  const system = askedSystem(asked['units']);
  const units = OUTPUT_UNITS[system];
  const titles = new Map([
    ...revisions.map((one) => [one.list_code, one.list_title] as const),
    ...result.conditions.map((one) => [one.code, one.title] as const),
  ]);
  const seenWords = submission.findings.map(({ where }) => whereWords(where, titles));
  const answers = submission.findings.map((finding) => submission.answers[findingKey(finding)]);
  const maySign = obstacles.length === 0;
  const sides = { before: former ? `Baseline ${former.number}` : 'Before', after: 'Submitted' };
  const rows = (narrowed: { list?: string; group?: string }) =>
    rowsPath(home, former?.number ?? null, { submission: submissionId }, narrowed);
  return (
    <ProgramFrame access={access} current="baselines">
      <PageHead
        title={submission.title}
        above={<TextLink href={home}>Baselines</TextLink>}
        lead={submission.reason}
      />
      <DecisionBanner
        state={state}
        decider={submission.decider}
        decidedAt={submission.decided_at}
        reason={submission.decision_reason}
        baseline={submission.baseline_number}
        home={home}
      />
      {newest?.withdrawn ? (
        <Banner
          severity="warning"
          title={`Baseline ${newest.number}, the newest of this build, is withdrawn`}
        >
          <p>There is no current baseline to compare with, and this one will supersede none.</p>
        </Banner>
      ) : null}
      <ConditionChoice
        path={path}
        keep={{ point: point?.code ?? null }}
        conditions={result.conditions}
        current={condition?.code ?? null}
        system={system}
      />
      <div className="grid gap-x-8 gap-y-8 lg:grid-cols-12">
        <div className="grid min-w-0 content-start gap-8 lg:col-span-8">
          {condition === null ? null : (
            <ConditionSheet
              condition={shownOfResult(condition)}
              limits={cgLimits(limits, condition.code)}
              axes={result.geometry.axes}
              units={units}
            />
          )}
          <Section
            title="Limits and targets"
            lead={
              result.limits === undefined
                ? 'Those of today: this was submitted before limits in force were kept with it.'
                : 'As they were in force when this was submitted. A signature signs them too.'
            }
          >
            <StandingTable
              standings={standingsOf({ ...result, limits })}
              units={units}
              rowsHref={(_condition, group) => rows(group === '' ? {} : { group })}
            />
          </Section>
          {condition === null ? null : (
            <MaturitySection
              condition={condition}
              geometry={result.geometry}
              allowances={result.allowances}
              unit={units.mass}
            />
          )}
          <Section
            title="What changes"
            lead={
              former === null
                ? 'The build has no current baseline: everything is new.'
                : `Against baseline ${former.number}, ${former.title}. ${review.formerConverted ?? ''}`
            }
          >
            {change === null ? null : <ChangeTable change={change} units={units} {...sides} />}
            {comparison.operatingPoints.length === 0 ? null : (
              <MomentumChangeTable points={comparison.operatingPoints} units={units} {...sides} />
            )}
          </Section>
          <Rotors
            point={point}
            unit={units.angularMomentum}
            choice={
              <ChoiceLinks
                label="Operating point"
                options={result.operatingPoints.map((one) => ({
                  href: pathWith(path, {
                    condition: condition?.code ?? null,
                    units: system === 'si' ? null : system,
                    point: one.code,
                  }),
                  words: one.title,
                  current: one.code === point?.code,
                }))}
              />
            }
          />
        </div>
        <div className="flex min-w-0 flex-col gap-8 lg:col-span-4">
          <Section title="Changed by list revision">
            <ListChangeTable
              lists={lists.map(({ list, title, before, after, counts }) => ({
                list,
                title,
                before: before?.number ?? null,
                after: after?.number ?? null,
                counts,
              }))}
              rowsHref={(list) => rows({ list })}
            />
          </Section>
          <Section title="Changed by group" aside={condition?.title ?? null}>
            <GroupChangeTable
              groups={change?.groups ?? []}
              unit={units.mass}
              rowsHref={(group) => rows({ group })}
              accountHref={null}
            />
          </Section>
          <Section title="Findings and answers">
            <FindingLines
              findings={placedFindings(submission.findings, program.code, [], null).map((line, index) => ({
                ...line,
                seen: seenWords[index] ?? null,
                answer: answers[index] ?? null,
              }))}
            />
          </Section>
          {leftOut.length === 0 ? null : (
            <Section title="Left out">
              <LeftOutTable lines={leftOut} />
            </Section>
          )}
          <Section title="Sources">
            <SourceList
              sources={revisions.map((one) => ({
                list: one.list_code,
                revision: one.number,
                rows: one.rows,
                sha256: one.content_sha256,
                fileSha256: one.file_sha256,
                author: one.author,
                marking: one.marking,
                convertedFrom:
                  one.frame_issue_id === submission.frame_issue_id
                    ? null
                    : `${one.frame_issue_number}: ${one.frame_issue_title}`,
              }))}
            />
            {rotors === null ? null : (
              <p>
                Rotating parts, revision {rotors.number}, by {rotors.author}
              </p>
            )}
          </Section>
          <div className="mt-auto">
            <TitleBlock
              program={program.title}
              build={submission.build_title}
              title={submission.title}
              number={submission.baseline_number}
              preparedBy={[...new Set([...revisions, ...(rotors ? [rotors] : [])].map((one) => one.author))]}
              submitted={{ by: submission.submitter, at: submission.submitted_at }}
              approved={
                state === 'approved' && submission.decided_at !== null
                  ? { by: submission.decider ?? '', at: submission.decided_at }
                  : null
              }
              supersedes={former?.number ?? null}
              digest={null}
              {...(state === 'submitted'
                ? {
                    decision: maySign ? (
                      <SignForm
                        action={signSubmissionAction}
                        program={program.code}
                        submission={submissionId}
                        number={review.nextNumber}
                        supersedes={former?.number ?? null}
                      />
                    ) : (
                      <ul className="grid gap-1 py-1">
                        {obstacles.map((obstacle) => (
                          <li key={obstacle}>{obstacle}</li>
                        ))}
                      </ul>
                    ),
                  }
                : {})}
            />
          </div>
          {state === 'submitted' && can('baselines.decide') ? (
            <section aria-label="Return the submission" className="no-print border-t border-ink-2 pt-3">
              <ReasonForm
                action={returnSubmissionAction}
                fields={{ program: program.code, submission: submissionId }}
                label="Reasons to return it"
                hint="Whoever submitted it reads them: what has to change before it can be signed."
                words="Return with reasons"
                pendingWords="Returning"
              />
            </section>
          ) : null}
          <Caution />
        </div>
      </div>
    </ProgramFrame>
  );
}
