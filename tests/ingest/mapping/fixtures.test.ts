import { describe, expect, it } from 'vitest';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { csvGridRows, sampleRows } from '@/lib/ingest/mapping/csv-rows';
import { type FileSample } from '@/lib/ingest/mapping/grid';
import { type ColumnGuess, guessMapping } from '@/lib/ingest/mapping/guess';
import { type ColumnUse, type Draft } from '@/lib/ingest/mapping/mapping';
import { mappingOf, questionsOf } from '@/lib/ingest/mapping/questions';
import { readMapped } from '@/lib/ingest/mapping/read-mapped';
import { type Component } from '@/lib/mass/component';
import { declare, fixtureBytes, fixtureExpectation, fixtureNames, inPieces } from '../support';

/* Files as suppliers send them, invented. Expected SI values are the file's figures times the factors of NIST SP 811. */

interface Expectation {
  readonly declarations: unknown;
  readonly fault?: { readonly kind: string; readonly line: number; readonly says: string };
  readonly guess?: {
    readonly header: unknown;
    /** `column unit`, `extra` or `ignored`; after a question mark what is not sure. */
    readonly columns: readonly string[];
    readonly numbers: unknown;
    readonly per: unknown;
    readonly questions: readonly string[];
  };
  readonly answers?: Partial<Omit<Draft, 'columns'>> & {
    readonly columns?: Readonly<Record<string, ColumnUse>>;
  };
  readonly result?: {
    readonly rows: number;
    readonly leftOut: readonly [number, string][];
    /** What, as stated, whether it agrees. */
    readonly totals: readonly [string, number, boolean][];
    readonly problems?: readonly {
      readonly kind: string;
      readonly line: number;
      readonly column: string;
      readonly says: string;
    }[];
    readonly expect: Readonly<Record<string, object>>;
  };
}

const FOLDER = 'lists/mapped';
const NAMES = fixtureNames(FOLDER);

async function sampleOf(name: string): Promise<FileSample> {
  let delimiter: FileSample['delimiter'] = null;
  const rows = csvGridRows(inPieces(fixtureBytes(FOLDER, name), 7), null, (found) => (delimiter = found));
  const sample = await sampleRows(rows);
  return { ...sample, delimiter, sheet: null, sheets: [] };
}

function words({ to, sure }: ColumnGuess): string {
  const what = to.use === 'column' ? [to.column, to.unit].filter((part) => part !== null).join(' ') : to.use;
  return sure ? what : `? ${what}`;
}

function answered(draft: Draft, answers: Expectation['answers']): Draft {
  const { columns = {}, leaveOut, ...rest } = answers ?? {};
  return {
    ...draft,
    ...rest,
    columns: draft.columns.map((column, index) => ({ ...column, to: columns[String(index)] ?? column.to })),
    leaveOut: { ...draft.leaveOut, ...leaveOut },
  };
}

/** Numbers within a few roundings, everything else as it stands. */
function near(value: unknown): unknown {
  if (typeof value === 'number') return value === 0 ? 0 : Number(value.toPrecision(14));
  if (Array.isArray(value)) return value.map(near);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, one]) => [key, near(one)]));
}

describe("a supplier's file", () => {
  it.each(NAMES.filter((name) => fixtureExpectation<Expectation>(FOLDER, name).guess !== undefined))(
    '%s is guessed at as expected, and what is not understood is asked',
    async (name) => {
      const { declarations, guess } = fixtureExpectation<Expectation>(FOLDER, name);
      const guesses = guessMapping(await sampleOf(name), declare(declarations));
      expect(guesses.draft.header).toEqual(guess?.header);
      expect(guesses.columns.map(words)).toEqual(guess?.columns);
      expect(guesses.draft.numbers).toEqual(guess?.numbers);
      expect(guesses.draft.per).toEqual(guess?.per);
      expect(questionsOf(guesses.draft).map(({ id }) => id)).toEqual(guess?.questions);
      for (const { because } of guesses.columns) expect(because).toMatch(/^[A-Z].*\.$/u);
      // An open question never becomes a mapping.
      expect(mappingOf(guesses.draft) === null).toBe(guess?.questions.length !== 0);
    },
  );

  it.each(NAMES.filter((name) => fixtureExpectation<Expectation>(FOLDER, name).result !== undefined))(
    '%s gives the rows, the rows left out, the totals and the problems expected',
    async (name) => {
      const { declarations, answers, result } = fixtureExpectation<Expectation>(FOLDER, name);
      const declared = declare(declarations);
      const mapping = mappingOf(answered(guessMapping(await sampleOf(name), declared).draft, answers));
      if (mapping === null || result === undefined) throw new Error('the answers leave something open');
      const read: Component[] = [];
      const reading = await readMapped(
        csvGridRows(inPieces(fixtureBytes(FOLDER, name)), mapping.delimiter),
        mapping,
        declared,
        {
          onComponent: (component) => void read.push(component),
          acceptTotals: false,
        },
      );
      expect(reading.rows).toBe(result.rows);
      expect(reading.leftOut.map(({ line, why }) => [line, why])).toEqual(result.leftOut);
      expect(reading.totals.map(({ what, stated, agrees }) => [what, stated, agrees])).toEqual(result.totals);
      const wanted = result.problems ?? [];
      expect(reading.problems.map(({ kind, line, column }) => ({ kind, line, column }))).toEqual(
        wanted.map(({ kind, line, column }) => ({ kind, line, column })),
      );
      reading.problems.forEach(({ message }, index) => expect(message).toContain(wanted[index]?.says));
      for (const [item, members] of Object.entries(result.expect)) {
        expect(
          near(read.find((component) => component.item === item || component.partNumber === item)),
        ).toMatchObject(near(members) as object);
      }
    },
  );

  it.each(NAMES.filter((name) => fixtureExpectation<Expectation>(FOLDER, name).fault !== undefined))(
    '%s cannot be read as text, and the fault says where and what would be right',
    async (name) => {
      const { fault } = fixtureExpectation<Expectation>(FOLDER, name);
      const outcome = await sampleOf(name).then(
        () => null,
        (error: unknown) => error,
      );
      if (!(outcome instanceof CsvFault)) throw new Error('the file was read');
      expect(outcome.problem).toMatchObject({ kind: fault?.kind, line: fault?.line });
      expect(outcome.problem.message).toContain(fault?.says);
    },
  );

  it('is not read by the mapping of other headings', async () => {
    const declared = declare();
    const mapping = mappingOf(
      answered(guessMapping(await sampleOf('totals-wrong'), declared).draft, {
        leaveOut: { totals: true, texts: false, headings: false },
      }),
    );
    if (mapping === null) throw new Error('the answers leave something open');
    const rows = csvGridRows(inPieces(fixtureBytes(FOLDER, 'sections-and-subtotals')), ',');
    let components = 0;
    const reading = await readMapped(rows, mapping, declared, {
      onComponent: () => void (components += 1),
      acceptTotals: true,
    });
    expect(components).toBe(0);
    expect(reading.problemCounts).toEqual({ 'other-headings': 1 });
  });
});
