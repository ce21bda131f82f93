import { type Metadata } from 'next';
import { limitsInForce } from '@/db/queries/settings';
import { StandingTable } from '@/components/limits/standing-table';
import { MaturitySection } from '@/components/mass/maturity-section';
import { statedSigma } from '@/components/rotors/stated-sigma';
import { viewsAsked, viewsHref } from '@/components/three-views/views-address';
import { standingsOf } from '@/lib/loading/configuration';
import { keptStandings } from '@/lib/baselines/limit-members';
import { cgLimits } from '@/components/baselines/cg-limits';
import { chosen } from '@/components/baselines/choose';
import { ConditionChoice } from '@/components/baselines/condition-choice';
import { ConditionSheet } from '@/components/baselines/condition-sheet';
import { GroupChangeTable } from '@/components/baselines/group-change-table';
import { accountPath, rowsPath } from '@/components/baselines/paths';
import { ReasonForm } from '@/components/baselines/reason-form';
import { RotorSection } from '@/components/baselines/rotors';
import { shownOfDocument } from '@/components/baselines/shown-condition';
import { SourceList } from '@/components/baselines/source-list';
import { StateBanner } from '@/components/baselines/state-banner';
import { StateWord } from '@/components/baselines/state-word';
import { TitleBlock } from '@/components/baselines/title-block';
import { FindingLines } from '@/components/findings/finding-lines';
import { ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { DialogButton } from '@/components/ui/dialog-button';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { loadSigned } from '@/lib/server/baselines/load-signed';
import { serverDb } from '@/lib/server/database';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { ProgramFrame } from '../../frame';
import { withdrawBaselineAction } from '../actions';

export async function generateMetadata({
  params,
}: PageProps<'/programs/[program]/baselines/[baseline]'>): Promise<Metadata> {
  return { title: `Baseline ${(await params).baseline}` };
}

/** A signed baseline, on screen and as its own paper: every number is that of the stored document. */
export default async function BaselinePage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/[baseline]'>) {
  const { program: code, baseline: number } = await params;
  const access = await requireProgram(code, 'baselines.read');
  const { program, can } = access;
  const home = `/programs/${program.code}/baselines`;
  const [signed, limitsToday] = await Promise.all([
    orShow(() => loadSigned(serverDb(), program.id, number)),
    limitsInForce(serverDb(), program.id),
  ]);
  const { baseline, submission, document } = signed;
  const asked = await searchParams;
  const condition = chosen(document.conditions, asked['condition']);
  const system = askedSystem(asked['units']);
  const units = OUTPUT_UNITS[system];
  const { x, y, z } = document.conventions.airframeAxes;
  const { supersedes } = baseline;
  const kept = keptStandings(document) ?? (submission.result.limits === undefined ? null : []);
  const limits = kept === null ? limitsToday : kept.map(({ limit }) => limit);
  const submitted = submission.result.conditions.find((one) => one.code === condition?.code);
  return (
    <ProgramFrame access={access} current="baselines">
      <PageHead
        title={`Baseline ${baseline.number}, ${baseline.title}`}
        above={<TextLink href={home}>Baselines</TextLink>}
        lead={submission.reason}
        actions={
          <>
            <StateWord state={baseline.state} />
            {can('lists.read') ? (
              <ButtonLink href={`${home}/${baseline.number}/views`}>See three views</ButtonLink>
            ) : null}
            {can('baselines.withdraw') && baseline.state !== 'withdrawn' ? (
              <DialogButton
                words={`Withdraw baseline ${baseline.number}`}
                kind="danger"
                title={`Withdraw baseline ${baseline.number}`}
                asks
              >
                <p className="measure">
                  It stays as it was signed, but is marked as not to be used, everywhere and for good; the API
                  answers 410 for the current baseline of its build until another is signed. Every member
                  hears of it by mail.
                </p>
                <ReasonForm
                  action={withdrawBaselineAction}
                  fields={{ program: program.code, number: String(baseline.number) }}
                  label="Reason"
                  hint="What is wrong with it, and what to use instead."
                  words={`Withdraw baseline ${baseline.number}`}
                  pendingWords="Withdrawing"
                  kind="danger"
                />
              </DialogButton>
            ) : null}
          </>
        }
      />
      <StateBanner
        state={baseline.state}
        number={baseline.number}
        home={home}
        supersededBy={baseline.superseded_by}
        withdrawn={
          baseline.withdrawn_at === null
            ? null
            : {
                by: baseline.withdrawer ?? 'a chief engineer',
                at: baseline.withdrawn_at,
                reason: baseline.withdrawal_reason ?? '',
              }
        }
      />
      <ConditionChoice
        path={`${home}/${baseline.number}`}
        conditions={document.conditions}
        current={condition?.code ?? null}
        system={system}
      />
      <div className="grid gap-x-8 gap-y-8 lg:grid-cols-12">
        <div className="grid min-w-0 content-start gap-8 lg:col-span-8">
          {condition === null ? null : (
            <ConditionSheet
              condition={shownOfDocument(condition, submitted)}
              limits={cgLimits(limits, condition.code)}
              axes={[x, y, z]}
              units={units}
            />
          )}
          <Section
            title="Limits and targets"
            lead={
              kept === null
                ? 'Those of today: this was signed before limits in force were kept with a baseline.'
                : 'As they were in force when this was submitted; they are part of what was signed.'
            }
          >
            <StandingTable
              standings={kept ?? standingsOf({ ...submission.result, limits })}
              units={units}
              rowsHref={
                can('lists.read')
                  ? (code, group) =>
                      viewsHref(
                        `${home}/${baseline.number}/views`,
                        viewsAsked({ condition: code, within: group }),
                      )
                  : null
              }
            />
          </Section>
          {submitted === undefined ? null : (
            <MaturitySection
              condition={submitted}
              geometry={submission.result.geometry}
              allowances={submission.result.allowances}
              unit={units.mass}
            />
          )}
          <RotorSection
            unit={units.angularMomentum}
            points={document.operatingPoints.map((point) => ({
              title: signed.pointTitles.get(point.code) ?? point.code,
              rotors: point.rotors,
              total: point.angularMomentum,
              sigma: statedSigma(
                submission.result.operatingPoints.find(({ code }) => code === point.code)?.uncertainty ??
                  null,
              ),
            }))}
          />
        </div>
        <div className="flex min-w-0 flex-col gap-8 lg:col-span-4">
          <Section
            title="Changed by group"
            aside={supersedes === null ? null : `from baseline ${supersedes}`}
          >
            {supersedes === null || condition === null ? (
              <p className="text-ink-2">It superseded no baseline: there is nothing before it.</p>
            ) : (
              <GroupChangeTable
                groups={signed.changesOf(condition.code)}
                unit={units.mass}
                rowsHref={
                  can('lists.read')
                    ? (group) => rowsPath(home, supersedes, { to: baseline.number }, { group })
                    : null
                }
                accountHref={accountPath(home, supersedes, baseline.number, { condition: condition.code })}
              />
            )}
          </Section>
          <Section title="Findings answered">
            <FindingLines
              findings={document.findings.map(({ rule, severity, message, answer }, index) => ({
                rule,
                severity,
                message,
                rows: [],
                count: 0,
                seen: signed.whereOf(index),
                href: null,
                answer: answer ?? null,
              }))}
            />
          </Section>
          <Section title="Sources">
            <SourceList
              sources={document.sources.map((source) => ({
                ...source,
                fileSha256: source.fileSha256 ?? null,
                author: null,
                marking: signed.markings.get(source.list) ?? null,
                convertedFrom: source.converted?.frameIssue ?? null,
              }))}
            />
            <p className="text-ink-2">
              Frame issue {document.conventions.frameIssue}
              {signed.rotors === null ? null : `. Rotating parts, revision ${signed.rotors.number}`}
              {can('submissions.read') ? (
                <>
                  . <TextLink href={`${home}/submissions/${submission.id}`}>The submission</TextLink>
                </>
              ) : null}
            </p>
          </Section>
          <div className="mt-auto">
            <TitleBlock
              program={program.title}
              build={baseline.build_title}
              title={document.title}
              number={document.baseline}
              preparedBy={signed.preparedBy}
              submitted={{ by: document.submitted.by, at: new Date(document.submitted.at) }}
              approved={{ by: document.approved.by, at: new Date(document.approved.at) }}
              supersedes={document.supersedes}
              digest={baseline.digest}
            />
          </div>
          <Caution />
        </div>
      </div>
    </ProgramFrame>
  );
}
