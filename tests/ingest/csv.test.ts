import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { headerDelimiter } from '@/lib/ingest/csv/delimiter';
import { type CsvBatch, readRecords } from '@/lib/ingest/csv/records';
import { type CsvRecord } from '@/lib/ingest/csv/splitter';
import { fixtureBytes, fixtureNames, inPieces, utf8 } from './support';

const LENGTH = 65_536;

interface Outcome {
  readonly records: readonly CsvRecord[];
  readonly fault: CsvFault['problem'] | null;
}

/** All records of a file and the fault that ended it; anything else that is thrown fails the test. */
async function outcome(batches: AsyncIterable<CsvBatch>): Promise<Outcome> {
  const records: CsvRecord[] = [];
  try {
    for await (const batch of batches) records.push(...batch.records);
  } catch (error) {
    if (error instanceof CsvFault) return { records, fault: error.problem };
    throw error;
  }
  return { records, fault: null };
}

const cell = fc.oneof(
  fc.string({ maxLength: 12 }),
  fc.string({ unit: 'binary', maxLength: 6 }),
  fc.string({
    unit: fc.constantFrom('a', '"', ',', ';', '\t', '\n', '\r', ' ', 'é', '€', '😀'),
    maxLength: 10,
  }),
);
const clean = cell.map((text) => text.replaceAll('\0', '').replaceAll('\uFEFF', ''));
const table = fc.array(fc.array(clean, { minLength: 1, maxLength: 5 }), { minLength: 1, maxLength: 12 });
const newline = fc.constantFrom('\n', '\r\n', '\r');
const unix = (text: string): string => text.replace(/\r\n?/gu, '\n');

describe('CSV records', () => {
  it('are those of papaparse over the whole text, blank rows aside, for any delimiter and line end', async () => {
    const delimiter = fc.constantFrom(',', ';', '\t');
    await fc.assert(
      fc.asyncProperty(
        table,
        delimiter,
        newline,
        fc.integer({ min: 1, max: 40 }),
        async (rows, mark, end, size) => {
          const head = ['item', 'mass', 'x', 'y', 'z', 'note'].join(mark);
          const text = head + end + Papa.unparse(rows, { delimiter: mark, newline: end });
          const whole = Papa.parse<string[]>(unix(text), { delimiter: mark, newline: '\n' });
          const wanted = whole.data.filter((fields) => fields.some((field) => field.trim() !== ''));
          const { records, fault } = await outcome(readRecords(inPieces(utf8(text)), LENGTH, size));
          expect(fault).toBeNull();
          expect(records.map(({ fields }) => fields)).toEqual(wanted);
        },
      ),
      { seed: 40, numRuns: 400 },
    );
  });

  it('carry the physical line where they begin, whatever their quoted texts hold', async () => {
    await fc.assert(
      fc.asyncProperty(table, newline, fc.integer({ min: 1, max: 40 }), async (rows, end, size) => {
        const lines: number[] = [];
        let text = '';
        for (const row of [['item', 'mass', 'x'], ...rows]) {
          if (row.some((field) => field.trim() !== '')) lines.push(unix(text).split('\n').length);
          text += row.map((field) => `"${field.replaceAll('"', '""')}"`).join(',') + end;
        }
        const { records } = await outcome(readRecords(inPieces(utf8(text)), LENGTH, size));
        expect(records.map(({ line }) => line)).toEqual(lines);
      }),
      { seed: 41, numRuns: 300 },
    );
  });

  it('do not depend on how the bytes arrive, broken files and cut characters included', async () => {
    const bytes = fc.oneof(
      fc.uint8Array({ maxLength: 60 }),
      table.map((rows) => utf8(Papa.unparse(rows))),
      fc.tuple(table, fc.uint8Array({ minLength: 1, maxLength: 4 })).map(([rows, broken]) => {
        return new Uint8Array([...utf8(`a,b\n${Papa.unparse(rows)}\n`), ...broken, ...utf8('\nlast,1\n')]);
      }),
    );
    const size = fc.integer({ min: 1, max: 9 });
    await fc.assert(
      fc.asyncProperty(bytes, size, size, async (file, block, piece) => {
        const whole = await outcome(readRecords(inPieces(file), LENGTH));
        const cut = await outcome(readRecords(inPieces(file, piece), LENGTH, block));
        expect(cut).toEqual(whole);
      }),
      { seed: 42, numRuns: 600 },
    );
  });

  it.each(
    fixtureNames('lists/invalid').filter((name) => !['over-long-line', 'over-long-field'].includes(name)),
  )('of the fixture %s are the same in blocks of 1 to 5 bytes', async (name) => {
    const file = fixtureBytes('lists/invalid', name);
    const whole = await outcome(readRecords(inPieces(file), LENGTH));
    for (const block of [1, 2, 3, 5]) {
      expect(await outcome(readRecords(inPieces(file, 7), LENGTH, block))).toEqual(whole);
    }
  });

  it('stop at a quote left open once it has swallowed as much as a row may hold, in bounded memory', async () => {
    let served = 0;
    async function* endless(): AsyncGenerator<Uint8Array> {
      yield utf8('item,mass\nA,1\nB,"2\n');
      for (;;) {
        served += 1;
        yield utf8('C,3\n'.repeat(4096));
      }
    }
    const { records, fault } = await outcome(readRecords(endless(), LENGTH));
    expect(records.map(({ fields }) => fields[0])).toEqual(['item', 'A']);
    expect(fault).toMatchObject({ kind: 'unclosed-quote', line: 3 });
    expect(served).toBeLessThan(20);
  });

  it('stop at a line that does not end', async () => {
    async function* endless(): AsyncGenerator<Uint8Array> {
      yield utf8('item,mass\n');
      for (;;) yield utf8('A,1,'.repeat(4096));
    }
    expect((await outcome(readRecords(endless(), LENGTH))).fault).toMatchObject({
      kind: 'line-too-long',
      line: 2,
    });
  });

  it('end the source when their reader leaves early', async () => {
    let ended = false;
    async function* source(): AsyncGenerator<Uint8Array> {
      try {
        for (;;) yield utf8('item,mass\n'.repeat(10_000));
      } finally {
        ended = true;
      }
    }
    for await (const batch of readRecords(source(), LENGTH)) {
      expect(batch.records.length).toBeGreaterThan(0);
      break;
    }
    expect(ended).toBe(true);
  });
});

describe('the delimiter', () => {
  it.each([
    ['item,mass,x\n', ','],
    ['item;mass;x\n', ';'],
    ['item\tmass\tx\n', '\t'],
    ['"a,b,c,d";mass;x\n', ';'],
    ['\n\nitem;mass\n', ';'],
    ['item\n', ','],
  ])('of %j is %j', (text, delimiter) => {
    expect(headerDelimiter(text, false)).toBe(delimiter);
  });

  it('waits for the end of the header row', () => {
    expect(headerDelimiter('item;mass', false)).toBeNull();
    expect(headerDelimiter('"item\n;mass', false)).toBeNull();
    expect(headerDelimiter('item;mass', true)).toBe(';');
  });
});
