import { describe, expect, it } from 'vitest';
import { fieldNumber } from '@/lib/ingest/blocks/field-number';
import { CROWDED, ItemIndex, hashOf } from '@/lib/ingest/blocks/item-index';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { readRecords } from '@/lib/ingest/csv/records';
import { MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { ListRows } from '@/lib/ingest/mass-list/list-rows';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { readMassListBlocks } from '@/lib/ingest/read-blocks';
import { readNumber } from '@/lib/ingest/table/number-text';
import { refuseEmpty, tooManyRows } from '@/lib/ingest/table/read-table';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { bigListText } from '@/tests/bench/big-list';
import { randomNumbers } from '@/tests/support/random';
import { declare, fixtureBytes, fixtureNames, inPieces, readList, utf8 } from './support';

const LIMITS = { ...MASS_LIST_LIMITS, rows: 60, fieldLength: 40 };

/** A list read record by record as text, with nothing read from bytes: what reading by blocks has to agree with. */
async function asText(file: Uint8Array, list: ListDeclarations, limits = LIMITS) {
  const log = new ProblemLog();
  const rows = new ListRows(list, limits, {}, log);
  const components: Component[] = [];
  const lines: number[] = [];
  let [count, hasHeader, isWhole] = [0, false, true];
  try {
    reading: for await (const { records, delimiter } of readRecords(inPieces(file), limits.recordLength))
      for (const record of records) {
        if (!hasHeader) {
          if (rows.takeHeader(record, delimiter) === null) {
            isWhole = false;
            break reading;
          }
          hasHeader = true;
          continue;
        }
        if (count === limits.rows) throw tooManyRows(record.line, limits.rows);
        count += 1;
        const component = rows.takeRow(record);
        if (component === null) continue;
        components.push(component);
        lines.push(record.line);
      }
    if (isWhole) refuseEmpty(log, hasHeader, count);
  } catch (error) {
    if (!(error instanceof CsvFault)) throw error;
    log.add(error.problem);
    isWhole = false;
  }
  rows.finish(isWhole);
  return {
    reading: {
      rows: count,
      problems: log.problems(),
      problemCounts: log.counts(),
      unknownColumns: rows.ownColumns,
    },
    components,
    lines,
  };
}

async function byBlocks(file: Uint8Array, list: ListDeclarations, piece: number, limits = LIMITS) {
  const components: Component[] = [];
  const lines: number[] = [];
  const reading = await readMassListBlocks(inPieces(file, piece), list, {
    limits,
    onBlock(block) {
      expect(block.first).toBe(components.length);
      for (let row = 0; row < block.rows; row += 1) {
        components.push(block.component(row));
        lines.push(block.lines[row] ?? 0);
      }
    },
  });
  return { reading, components, lines };
}

const COLUMNS = [
  'item', 'part_number', 'part_revision', 'description', 'group', 'category', 'parent', 'counting', 'quantity',
  'mass', 'x', 'y', 'z', 'ixx', 'iyy', 'ixz', 'yaw', 'symmetry', 'maturity', 'growth_percent', 'mass_sigma', 'x_sigma', 'note',
  'zone', "'=own",
] as const; // prettier-ignore

const NUMBERS = ['1', '-2.5', '0', '-0', '+3', '.5', '5.', '1e-3', '2E+2', '123456789012', '0.1234567890123456', '9007199254740993', '1.2345e-30', '1e23', '1,5', '1.234', '12,345', ' 7 ', '"8"', '"9.25"', ''] as const; // prettier-ignore
const WRONG = ['x', '1e', '.', '1.2.3', '=A1', 'NaN', '1e41', '--1', '"4', '−3'] as const;
/** Numbers that are right in any file. */
const CLEAN = NUMBERS.filter((text) => text !== '' && !/,|1\.234$/u.test(text));
const TEXTS = ['', 'Rib', ' Rib ', '"Rib, ""A"""', '"two\nlines"', '"two\r\nlines"', "'=SUM(A1)", "'", 'Flügel', '\u00A0x\u00A0', '=1', 'a"b', '" padded "', 'x'.repeat(41)] as const; // prettier-ignore

type Random = () => number;
const one = <T>(random: Random, values: readonly T[]): T => {
  const value = values[Math.floor(random() * values.length)];
  if (value === undefined) throw new Error('nothing to choose from');
  return value;
};

/** A field of a column, mostly right. */
function anyField(random: Random, column: string, row: number, faults: number): string {
  const isWrong = random() < faults;
  switch (column) {
    case 'item':
      if (faults === 0 && row === 1) return 'top';
      return isWrong
        ? one(random, ['', 'A1', ' ', '"A1"'])
        : one(random, [`A${row}`, `A${row}`, `"A${row}"`, ` A${row}`, `Ä${row}`]);
    case 'part_number':
      return isWrong ? 'P1' : `P${row}`;
    case 'group':
      return one(random, ['Wing', 'Wing', 'Wing/Ribs', ' Wing / Ribs ', '"Wing/Ribs"', '', '/', "'=g"]);
    case 'category':
      return isWrong ? 'feul' : one(random, ['empty', 'Fuel', '', ' payload ', '"empty"']);
    case 'parent':
      if (faults === 0) return one(random, ['', '', 'top', ' top ']);
      return isWrong ? 'nobody' : one(random, ['', '', '', `A${Math.max(1, row - 1)}`, '"A1"', ' A2 ']);
    case 'counting':
      return one(random, ['', 'memo', 'Counted']);
    case 'quantity':
      return isWrong
        ? one(random, ['0', '1.5', '1000001', 'two'])
        : one(random, ['', '1', '3', '2.0', '"4"']);
    case 'symmetry':
      return isWrong ? 'both' : one(random, faults === 0 ? ['', ''] : ['', '', 'pair', 'PAIR']);
    case 'maturity':
      return isWrong ? 'Q' : one(random, ['E', 'c', ' A', '']);
    case 'mass':
      return isWrong
        ? one(random, [...WRONG, '', '-1'])
        : one(random, ['1', '2.5', '0.25', '1e-3', ' 3', faults === 0 ? '4' : '0', '"12"']);
    case 'growth_percent':
      return isWrong ? '-100' : one(random, ['', '5', '-5']);
    case 'mass_sigma':
    case 'x_sigma':
      return isWrong ? '-1' : one(random, ['', '', '0', '0.5', '1e-4']);
    case 'x':
    case 'y':
    case 'z':
      return isWrong ? one(random, [...WRONG, '']) : one(random, faults === 0 ? CLEAN : NUMBERS.slice(0, -1));
    case 'ixx':
    case 'iyy':
    case 'ixz':
    case 'yaw':
      return isWrong ? one(random, WRONG) : random() < 0.6 ? '' : one(random, faults === 0 ? CLEAN : NUMBERS);
    default:
      return one(random, faults === 0 ? TEXTS.slice(0, -1) : TEXTS);
  }
}

/** A small mass list with a share of faults; some are broken as files too. */
function anyList(random: Random): Uint8Array {
  const delimiter = one(random, [',', ',', ';', '\t']);
  const faults = one(random, [0, 0, 0, 0.01, 0.1]);
  const end = one(random, ['\n', '\n', '\r\n', '\r']);
  const needed = random() < 0.95;
  const columns = COLUMNS.filter(
    (column) => (needed && /^(item|mass|x|y|z)$/u.test(column)) || random() < 0.6,
  )
    .map((column) => ({ column, at: random() }))
    .sort((a, b) => a.at - b.at)
    .map(({ column }) => column);
  const more = one(random, ['', '', delimiter, delimiter.repeat(3)]);
  const quote = (field: string): string =>
    !field.startsWith('"') && (field.includes(delimiter) || field.includes('\n')) ? `"${field}"` : field;
  let text =
    one(random, ['', '', '\uFEFF', '\n', `${delimiter}${delimiter}\n`]) +
    columns.join(delimiter) +
    more +
    end;
  for (let row = 1; row < 70 * random(); row += 1) {
    const fields = columns.map((column) => quote(anyField(random, column, row, faults)));
    if (random() < faults) fields.pop();
    if (random() < faults) fields.push('more');
    text += fields.join(delimiter) + more + end;
    if (random() < 0.03) text += one(random, [end, delimiter + end, ` ${delimiter}${end}`]);
  }
  if (random() < 0.3) text = text.slice(0, -end.length);
  const bytes = utf8(text);
  if (random() < 0.9) return bytes;
  bytes[Math.floor(random() * bytes.length)] = one(random, [0, 13, 34, 0x80, 0xff, 10]);
  return bytes;
}

const DECLARED = [
  declare(),
  declare({
    mass_unit: 'lb',
    length_unit: 'mm',
    inertia_unit: 'lb.in2',
    products: 'negative',
    uncertainty: '3sigma',
  }),
  declare({ kind: 'adjustments' }),
  declare({ extent: 'left-half', uncertainty: 'half-width' }),
];

describe('a mass list read by blocks', () => {
  it('has the rows, lines, bits and problems of one read record by record as text, however its bytes arrive', async () => {
    const random = randomNumbers(40);
    let [right, wrong] = [0, 0];
    for (let k = 0; k < 1500; k += 1) {
      const file = anyList(random);
      const list = one(random, DECLARED);
      const wanted = await asText(file, list);
      const read = await byBlocks(file, list, one(random, [7, 100, 100_000]));
      if (JSON.stringify(read) !== JSON.stringify(wanted))
        expect({ file: new TextDecoder().decode(file), ...read }).toEqual({
          file: new TextDecoder().decode(file),
          ...wanted,
        });
      if (wanted.reading.problems.length === 0) right += wanted.components.length;
      else wrong += 1;
    }
    expect(right).toBeGreaterThan(2000);
    expect(wrong).toBeGreaterThan(400);
  }, 60_000);

  it.each([
    ['plain', {}],
    ['quoted', { quoted: true }],
    ['turned, with every σ', { turned: true, uncertain: true }],
    ['spoiled at its end', { spoiled: true }],
  ])('is so for a %s list of several blocks', async (_, shape) => {
    const file = utf8([...bigListText({ rows: 3000, seed: 9, ...shape })].join(''));
    const wanted = await asText(file, declare(), MASS_LIST_LIMITS);
    expect(await byBlocks(file, declare(), 1000, MASS_LIST_LIMITS)).toEqual(wanted);
    expect(wanted.components.length).toBeGreaterThan(2990);
  });

  it.each([...fixtureNames('lists/valid'), ...fixtureNames('lists/invalid')])(
    'is so for the fixture %s',
    async (name) => {
      const folder = fixtureNames('lists/valid').includes(name) ? 'lists/valid' : 'lists/invalid';
      const file = fixtureBytes(folder, name);
      const wanted = await asText(file, declare(), MASS_LIST_LIMITS);
      for (const piece of [3, 100_000])
        expect(await byBlocks(file, declare(), piece, MASS_LIST_LIMITS)).toEqual(wanted);
    },
  );

  it('tells an item that stands 100,000 rows earlier, and its line', async () => {
    let text = 'item,mass,x,y,z\n';
    for (let row = 0; row < 100_000; row += 1) text += `I${row},1,0,0,0\n`;
    const { problems } = await readList(utf8(`${text}I7,1,0,0,0\n`));
    expect(problems).toMatchObject([{ kind: 'duplicate-item', line: 100_002, found: 'I7' }]);
    expect(problems[0]?.message).toContain('line 9');
  });
});

describe('items', () => {
  it('that were made to have one hash end the reading with a problem, and not the patience of whoever waits', () => {
    const index = new ItemIndex();
    const answers = new Set<number>();
    const words = new Int32Array(2);
    const bytes = new Uint8Array(words.buffer);
    for (let k = 0; k < 12_000; k += 1) {
      // The second word undoes what the first one did to the hash.
      const first = Math.imul(8 ^ k, 0x2c1b3c6d);
      words.set([k, first ^ (first >>> 15)]);
      expect(hashOf(bytes, 0, 8)).toBe(0);
      answers.add(index.add(bytes, 0, 8, 0));
    }
    expect(answers).toEqual(new Set([-1, CROWDED]));
  });
});

describe('a number in bytes', () => {
  it('has the bits of its text read by Number, or is left to the text', () => {
    const random = randomNumbers(3);
    let left = 0;
    for (let k = 0; k < 100_000; k += 1) {
      const digits =
        String(Math.floor(random() * 10 ** one(random, [1, 4, 9, 15]))) +
        one(random, ['', '', '0', '12345678']);
      const fraction = one(random, [
        '',
        '.',
        `.${String(Math.floor(random() * 10 ** one(random, [1, 5, 12])))}`,
      ]);
      const text = `${one(random, ['', '-', '+'])}${digits}${fraction}${one(random, ['', '', `e${Math.floor(60 * random() - 30)}`, 'E+5', 'e', ' '])}`;
      const bytes = utf8(text);
      const value = fieldNumber(bytes, 0, bytes.length, false);
      const wanted = readNumber(text, false);
      if (Number.isNaN(value)) left += 1;
      if (typeof wanted === 'number') expect([text, value]).toEqual([text, wanted]);
      else expect([text, value]).toEqual([text, NaN]);
    }
    expect(left).toBeLessThan(50_000);
  });
});
