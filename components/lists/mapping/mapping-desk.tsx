'use client';

import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { ask } from '@/components/lists/ask';
import { CheckResult } from '@/components/lists/mapping/check-result';
import { HeaderChoice } from '@/components/lists/mapping/header-choice';
import { MappedColumns } from '@/components/lists/mapping/mapped-columns';
import { PreviewTable } from '@/components/lists/mapping/preview-table';
import { ReadingChoices } from '@/components/lists/mapping/reading-choices';
import { Quoted } from '@/components/lists/quoted';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { importStartedSchema } from '@/lib/contracts/list-imports';
import { type MappingCheck, mappingCheckSchema, sampleSchema } from '@/lib/contracts/list-mapping';
import { draftOf } from '@/lib/ingest/mapping/draft';
import { type FileSample } from '@/lib/ingest/mapping/grid';
import { dataRows, guessMapping, type Guesses } from '@/lib/ingest/mapping/guess';
import { type Draft, type Mapping } from '@/lib/ingest/mapping/mapping';
import { mappingOf, questionsOf } from '@/lib/ingest/mapping/questions';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface MappingDeskProps {
  readonly sample: FileSample;
  readonly declarations: ListDeclarations;
  /** What the list remembers for these headings. */
  readonly remembered: { readonly mapping: Mapping; readonly by: string } | null;
  /** The internal route of the pending upload. */
  readonly route: string;
  readonly listHref: string;
  readonly nextRevision: number;
}

const PREVIEWED = 12;

/** Says how a file is read: guesses and what is remembered are shown with their reasons, and nothing is read until all is answered. */
export function MappingDesk({
  declarations,
  remembered,
  route,
  listHref,
  nextRevision,
  ...initial
}: MappingDeskProps) {
  const router = useRouter();
  const [sample, setSample] = useState(initial.sample);
  const [guesses, setGuesses] = useState<Guesses>(() =>
    guessMapping(initial.sample, declarations, remembered?.mapping.header ?? null),
  );
  const [draft, setDraft] = useState<Draft>(() =>
    remembered === null ? guesses.draft : draftOf(remembered.mapping),
  );
  const [fromMemory, setFromMemory] = useState(remembered !== null);
  const [check, setCheck] = useState<MappingCheck | null>(null);
  const [accepted, setAccepted] = useState(false);
  const [busy, setBusy] = useState<'sheet' | 'check' | 'import' | 'drop' | null>(null);
  const [failure, setFailure] = useState<string | null>(null);

  const questions = questionsOf(draft);
  const mapping = mappingOf(draft);
  const rows = useMemo(
    () => (draft.header === null ? [] : dataRows(sample, draft.header)),
    [sample, draft.header],
  );
  const change = (next: Draft) => {
    setDraft(next);
    setCheck(null);
    setAccepted(false);
  };
  const guessAgain = (of: FileSample, header: Draft['header']) => {
    const next = guessMapping(of, declarations, header);
    setGuesses(next);
    setFromMemory(false);
    change(next.draft);
  };
  const during = async (what: NonNullable<typeof busy>, work: () => Promise<void>) => {
    setBusy(what);
    setFailure(null);
    try {
      await work();
    } catch (error) {
      setFailure(error instanceof Error ? error.message : String(error));
    } finally {
      setBusy(null);
    }
  };
  const post = (body: unknown): RequestInit => ({
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(body),
  });
  const takeSheet = (name: string) =>
    during('sheet', async () => {
      const next = await ask(
        `${route}/sample?${new URLSearchParams({ sheet: name }).toString()}`,
        sampleSchema,
      );
      setSample(next);
      guessAgain(next, null);
    });
  const checkFile = () =>
    during('check', async () => setCheck(await ask(`${route}/check`, mappingCheckSchema, post({ mapping }))));
  const startImport = () =>
    during('import', async () => {
      const started = await ask(
        `${route}/import`,
        importStartedSchema,
        post({ mapping, acceptTotals: accepted }),
      );
      router.push(`${listHref}/imports/${started.import}`);
    });
  const agreed = check?.totals.every(({ agrees }) => agrees) === true || accepted;
  const ready = mapping !== null && check?.problemCount === 0 && agreed;

  return (
    <div className="grid min-w-0 gap-8">
      {remembered !== null && fromMemory ? (
        <Banner
          severity="note"
          word="Remembered"
          title={`Filled in as ${remembered.by}`}
          action={
            <Button onClick={() => guessAgain(sample, remembered.mapping.header)}>Start from guesses</Button>
          }
        >
          <p>The headings are the same. Look it over, then check the file.</p>
        </Banner>
      ) : null}
      <Section
        title="Headings"
        lead={
          guesses.header === null
            ? 'No row could be told to hold the names of the columns.'
            : guesses.header.because
        }
      >
        <HeaderChoice
          sample={sample}
          header={draft.header}
          disabled={busy !== null}
          onSheet={(name) => void takeSheet(name)}
          onHeader={(header) => guessAgain(sample, header)}
        />
      </Section>
      {draft.header === null ? null : (
        <>
          <Section
            title="Columns"
            aside={`${draft.columns.length} in the file`}
            lead="What each becomes, in which unit, and why."
          >
            <MappedColumns
              draft={draft}
              guesses={guesses.columns}
              rows={rows}
              declarations={declarations}
              onDraft={change}
            />
          </Section>
          <Section title="Numbers and rows">
            <ReadingChoices draft={draft} numbers={guesses.numbers} onDraft={change} />
          </Section>
          <Section
            title="As it would be read"
            lead={`The first rows${sample.tail.length > 0 ? ' and the last ones' : ''} of ${sample.rows}, in SI.`}
          >
            <PreviewTable
              rows={[...rows.slice(0, PREVIEWED), ...rows.slice(Math.max(PREVIEWED, rows.length - 4))]}
              draft={draft}
              declarations={declarations}
            />
          </Section>
        </>
      )}
      <Section title="Check and import">
        {questions.length === 0 ? null : (
          <div className="grid gap-2" role="status">
            <p className="font-semibold">
              {questions.length === 1 ? 'One question is open' : `${questions.length} questions are open`}
            </p>
            <ul className="grid list-disc gap-1 pl-5">
              {questions.map(({ text }, index) => (
                <li key={index}>
                  <Quoted text={text} />
                </li>
              ))}
            </ul>
          </div>
        )}
        {failure === null ? null : (
          <Banner severity="blocker" word="Failed" live title={failure}>
            <p>The file is kept, and so is what you chose here.</p>
          </Banner>
        )}
        {check === null ? null : <CheckResult check={check} accepted={accepted} onAccept={setAccepted} />}
        <Actions>
          {check === null ? (
            <Button
              kind="primary"
              disabled={mapping === null || busy !== null}
              onClick={() => void checkFile()}
            >
              {busy === 'check' ? 'Checking the file' : 'Check the whole file'}
            </Button>
          ) : (
            <Button kind="primary" disabled={!ready || busy !== null} onClick={() => void startImport()}>
              {`Import as revision ${nextRevision}`}
            </Button>
          )}
          <Button
            disabled={busy !== null}
            onClick={() =>
              void during('drop', async () => {
                const answer = await fetch(route, { method: 'DELETE' });
                if (!answer.ok) throw new Error('The file was not dropped. Try again.');
                router.push(listHref);
                router.refresh();
              })
            }
          >
            Drop this file
          </Button>
        </Actions>
      </Section>
    </div>
  );
}
