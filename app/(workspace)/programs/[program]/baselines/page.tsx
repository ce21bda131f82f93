import { type Metadata } from 'next';
import { baselinesOfProgram, submissionsOfProgram } from '@/db/queries/baselines';
import { buildsOf } from '@/db/queries/settings';
import { pathWith } from '@/components/baselines/paths';
import { ReturnedTable } from '@/components/baselines/returned-table';
import { SignedTable } from '@/components/baselines/signed-table';
import { WaitingTable } from '@/components/baselines/waiting-table';
import { ButtonLink } from '@/components/ui/button';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { loadWaiting } from '@/lib/server/baselines/load-waiting';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../frame';

export const metadata: Metadata = { title: 'Baselines' };

/** Decisions that wait, what is signed, what was returned. */
export default async function BaselinesPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines'>) {
  const access = await requireProgram((await params).program, 'baselines.read');
  const { program, can } = access;
  const home = `/programs/${program.code}/baselines`;
  const [builds, signed, submissions] = await Promise.all([
    buildsOf(serverDb(), program.id),
    baselinesOfProgram(serverDb(), program.id),
    can('submissions.read') ? submissionsOfProgram(serverDb(), program.id) : [],
  ]);
  const asked = (await searchParams)['build'];
  const build = builds.find((one) => one.code === asked) ?? null;
  const ofBuild = (row: { readonly build_id: string }) => build === null || row.build_id === build.id;
  const shown = submissions.filter(ofBuild);
  const waiting = await loadWaiting(serverDb(), shown.filter((one) => one.decision === null).reverse());
  const returned = shown.filter((one) => one.decision === 'returned');
  const baselines = signed.filter(ofBuild);
  return (
    <ProgramFrame access={access} current="baselines">
      <PageHead
        title="Baselines"
        lead="Configurations that were submitted, signed, numbered and frozen with their results."
        actions={signed.length > 0 ? <ButtonLink href={`${home}/account`}>Mass account</ButtonLink> : null}
      />
      {builds.length > 1 ? (
        <ChoiceLinks
          label="Build"
          options={[
            { href: home, words: 'All', current: build === null },
            ...builds.map((one) => ({
              href: pathWith(home, { build: one.code }),
              words: one.title,
              current: one.id === build?.id,
            })),
          ]}
        />
      ) : null}
      {can('submissions.read') ? (
        <Section title="To decide" aside={waiting.length > 1 ? 'Oldest first' : null}>
          {waiting.length === 0 ? (
            <p className="text-ink-2">Nothing waits for a decision.</p>
          ) : (
            <WaitingTable
              lines={waiting.map(({ submission, former, change }) => ({
                href: `${home}/submissions/${submission.id}`,
                title: submission.title,
                build: submission.build_title,
                submitter: submission.submitter,
                submittedAt: submission.submitted_at,
                against: former?.number ?? null,
                change,
              }))}
            />
          )}
        </Section>
      ) : null}
      <Section title="Signed">
        {baselines.length === 0 ? (
          <EmptyPlace
            title={
              build === null ? 'No baseline is signed yet' : `No baseline of ${build.title} is signed yet`
            }
            action={
              can('baselines.submit') ? (
                <ButtonLink href={`/programs/${program.code}/configurations`}>
                  Go to configurations
                </ButtonLink>
              ) : null
            }
          >
            <p>
              A weights engineer submits a configuration, a chief engineer signs it. It then has a number and
              a digest, and simulations take it from here.
            </p>
          </EmptyPlace>
        ) : (
          <SignedTable
            lines={baselines.map((one) => ({
              href: `${home}/${one.number}`,
              number: one.number,
              title: one.title,
              build: one.build_title,
              state: one.state,
              signedAt: one.signed_at,
              signer: one.signer,
              supersedes: one.supersedes,
              digest: one.digest,
            }))}
          />
        )}
      </Section>
      {returned.length > 0 ? (
        <Section title="Returned">
          <ReturnedTable
            lines={returned.map((one) => ({
              href: `${home}/submissions/${one.id}`,
              title: one.title,
              build: one.build_title,
              decidedAt: one.decided_at,
              decider: one.decider,
              reason: one.decision_reason ?? '',
            }))}
          />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
