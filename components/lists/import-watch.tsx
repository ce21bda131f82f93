'use client';

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect, useRef } from 'react';
import { ask } from '@/components/lists/ask';
import { counted, countWords, durationWords } from '@/components/lists/list-words';
import { ProblemTable } from '@/components/lists/problem-table';
import { Banner } from '@/components/ui/banner';
import { Button, ButtonLink } from '@/components/ui/button';
import { ProgressBar } from '@/components/ui/progress-bar';
import { Section } from '@/components/ui/section';
import { importSchema, type ImportView } from '@/lib/contracts/list-imports';

interface ImportWatchProps {
  readonly initial: ImportView;
  /** The internal route that tells how far it has come. */
  readonly from: string;
  readonly listHref: string;
  readonly mayUpload: boolean;
}

const ASK_EVERY_MS = 700;

/** Follows an import to its end: rows done of how many, then the new revision, or the page of problems. */
export function ImportWatch({ initial, from, listHref, mayUpload }: ImportWatchProps) {
  const router = useRouter();
  const { data, error, refetch } = useQuery({
    queryKey: ['import', initial.import],
    queryFn: ({ signal }) => ask(from, importSchema, { signal }),
    initialData: initial,
    staleTime: 0,
    refetchInterval: (query) => (isOpen(query.state.data) ? ASK_EVERY_MS : false),
  });
  // Whoever watched it to its end is led on; whoever comes back later finds this page.
  const watched = useRef(isOpen(initial));
  useEffect(() => {
    if (watched.current && data.state === 'done' && data.revision !== null)
      router.replace(`${listHref}?revision=${data.revision}`);
  }, [data, listHref, router]);

  if (error !== null) {
    return (
      <Banner
        severity="blocker"
        word="Failed"
        live
        title="The import could not be asked about"
        action={<Button onClick={() => void refetch()}>Try again</Button>}
      >
        <p>{error.message}</p>
        <p>It goes on without this page.</p>
      </Banner>
    );
  }
  if (isOpen(data)) return <Underway found={data} from={from} mayCancel={mayUpload} />;
  if (data.state === 'cancelled') return <Cancelled found={data} listHref={listHref} mayUpload={mayUpload} />;
  if (data.state === 'done') {
    return (
      <Banner
        severity="done"
        live
        title={
          data.unchanged
            ? `This file is revision ${data.revision ?? ''} already`
            : `Revision ${data.revision ?? ''} is made of this file`
        }
        action={
          <ButtonLink href={`${listHref}?revision=${data.revision ?? ''}`}>Go to the revision</ButtonLink>
        }
      >
        {data.unchanged ? (
          <p>The same bytes, read in the same way. No new revision was made.</p>
        ) : (
          <p>{counted(data.rows, 'row')} read and checked.</p>
        )}
      </Banner>
    );
  }
  return <Refused found={data} from={from} listHref={listHref} mayUpload={mayUpload} />;
}

function isOpen(found: ImportView | undefined): boolean {
  return found?.state === 'waiting' || found?.state === 'running';
}

interface UnderwayProps {
  readonly found: ImportView;
  readonly from: string;
  readonly mayCancel: boolean;
}

function Underway({ found, from, mayCancel }: UnderwayProps) {
  const client = useQueryClient();
  const cancel = useMutation({
    mutationFn: () => ask(from, importSchema, { method: 'DELETE' }),
    onSuccess: (now) => client.setQueryData(['import', found.import], now),
    onError: () => client.invalidateQueries({ queryKey: ['import', found.import] }),
  });
  return (
    <div className="grid max-w-160 gap-4">
      <ProgressBar
        label={found.state === 'waiting' ? 'Waiting for its turn' : 'Reading and checking'}
        done={found.rows}
        total={found.ofRows}
        of="rows"
      />
      <p aria-live="polite">{leftWords(found)}</p>
      <p className="text-ink-2">You can leave this page and come back to it: the import goes on.</p>
      {cancel.error === null ? null : <p className="text-blocker">{cancel.error.message}</p>}
      {mayCancel ? (
        <div>
          <Button onClick={() => cancel.mutate()} disabled={cancel.isPending}>
            {cancel.isPending ? 'Cancelling the import' : 'Cancel import'}
          </Button>
        </div>
      ) : null}
    </div>
  );
}

function leftWords({ state, rows, ofRows, secondsLeft }: ImportView): string {
  if (state === 'waiting') return 'It has not begun.';
  if (ofRows !== null && rows >= ofRows) return 'All rows are read; they are being stored.';
  return secondsLeft === null ? 'Too early to say how long it takes.' : `${durationWords(secondsLeft)} left.`;
}

function Cancelled({
  found,
  listHref,
  mayUpload,
}: Pick<ImportWatchProps, 'listHref' | 'mayUpload'> & { found: ImportView }) {
  return (
    <Banner
      severity="note"
      word="Cancelled"
      live
      title="The import was called off"
      action={mayUpload ? <ButtonLink href={`${listHref}/upload`}>Upload again</ButtonLink> : null}
    >
      <p>{forceWords(found)}</p>
    </Banner>
  );
}

function forceWords({ inForce }: ImportView): string {
  return inForce === 0
    ? 'Nothing of it was kept; the list has no revision yet.'
    : `Nothing of it was kept; revision ${inForce} stays in force.`;
}

function Refused({
  found,
  from,
  listHref,
  mayUpload,
}: { readonly found: ImportView } & Omit<ImportWatchProps, 'initial'>) {
  const total = found.counts.reduce((sum, { count }) => sum + count, 0);
  const force = forceWords(found);
  const again = mayUpload ? (
    <ButtonLink href={`${listHref}/upload`} kind="primary">
      Upload again
    </ButtonLink>
  ) : null;
  if (found.failure !== null) {
    return (
      <Banner severity="blocker" word="Failed" live title={found.failure} action={again}>
        <p>{force} Upload it again; if that fails too, tell your administrator.</p>
      </Banner>
    );
  }
  return (
    <>
      <Banner
        severity="blocker"
        word="Refused"
        live
        title={`The file has ${counted(total, 'problem')}`}
        action={again}
      >
        <p>{force} Put the file right and upload it again.</p>
      </Banner>
      <div className="grid items-start gap-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,1fr)]">
        <Section
          title="Problems"
          aside={
            <a
              href={`${from}/problems`}
              download
              className="text-spin underline decoration-1 underline-offset-2 hover:decoration-2"
            >
              Download as CSV
            </a>
          }
          {...(total > found.problems.length
            ? {
                lead: `The first ${found.problems.length} of ${countWords(total)}, in the order of the file.`,
              }
            : {})}
        >
          <ProblemTable problems={found.problems} />
        </Section>
        <Section title="By kind">
          <dl className="grid border-t border-rule">
            {found.counts.map(({ kind, count }) => (
              <div key={kind} className="flex justify-between gap-4 border-b border-rule py-1">
                <dt>{kindWords(kind)}</dt>
                <dd className="num">{countWords(count)}</dd>
              </div>
            ))}
          </dl>
        </Section>
      </div>
    </>
  );
}

/** `not-a-number` as "Not a number". */
function kindWords(kind: string): string {
  const words = kind.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}
