import { describe, expect, it } from 'vitest';
import { WORKBOOK_LIMITS } from '@/lib/server/sheets/limits';
import { readSheet } from '@/lib/server/sheets/read-sheet';
import { WorkbookRefused } from '@/lib/server/sheets/refused';
import { DATE_STYLE, sheetXml, type TestSheet, xlsx, zip } from '@/tests/support/xlsx';

const SHEET: TestSheet = {
  name: 'Weights & places',
  rows: [
    ['Nacelle statement', null, null],
    [],
    ['Item', 'Mass (kg)', 'Dated'],
    ['K-1', 12.3, { xml: `<c r="@" s="${DATE_STYLE}"><v>46023</v></c>` }],
    ['K-2', { xml: '<c r="@"><f>B4*2</f><v>24.6</v></c>' }, null],
  ],
};

async function refusalOf(file: Buffer, sheet: string | null = null): Promise<WorkbookRefused> {
  const outcome = await readSheet(file, sheet).then(
    () => null,
    (error: unknown) => error,
  );
  if (!(outcome instanceof WorkbookRefused)) throw new Error(`expected a refusal, got ${String(outcome)}`);
  expect(outcome.message).toMatch(/^[A-Z].*\.$/u);
  return outcome;
}

describe('a sheet of a workbook', () => {
  it('gives its rows with their row numbers: numbers as stored, dates as ISO text, formulas as their stored values', async () => {
    const read = await readSheet(xlsx([SHEET, { name: 'Notes', rows: [['see', 'there']] }]), null);
    expect(read).toEqual({
      sheet: 'Weights & places',
      sheets: ['Weights & places', 'Notes'],
      rows: [
        { line: 1, cells: ['Nacelle statement', '', ''] },
        { line: 3, cells: ['Item', 'Mass (kg)', 'Dated'] },
        { line: 4, cells: ['K-1', 12.3, '2026-01-01'] },
        { line: 5, cells: ['K-2', 24.6, ''] },
      ],
    });
  });

  it('is the one asked for, and one that is not there is named with those that are', async () => {
    const book = xlsx([SHEET, { name: 'Notes', rows: [['see', 'there']] }]);
    expect((await readSheet(book, 'Notes')).rows).toEqual([{ line: 1, cells: ['see', 'there'] }]);
    const refusal = await refusalOf(book, 'Sheet9');
    expect(refusal.kind).toBe('no-such-sheet');
    expect(refusal.message).toContain('Weights & places, Notes');
  });

  it('says errors and formulas without a value instead of passing them over as blank', async () => {
    const rows: TestSheet['rows'] = [
      ['Item', 'Mass', 'X'],
      [
        'A',
        { xml: '<c r="@" t="e"><f>B9/0</f><v>#DIV/0!</v></c>' },
        { xml: '<c r="@" t="e"><v>#REF!</v></c>' },
      ],
      ['B', { xml: '<c r="@"><f>SUM(B2:B3)&amp;"x"</f></c>' }, { xml: '<c r="@"><f>C1</f><v></v></c>' }],
    ];
    const read = await readSheet(xlsx([{ name: 'S', rows }]), null);
    expect(read.rows.slice(1).map(({ cells }) => cells)).toEqual([
      ['A', '#DIV/0!', '#REF!'],
      ['B', '=SUM(B2:B3)&"x"', '=C1'],
    ]);
  });

  it('has a merged text in every row of its block, and a merged number in none but the first', async () => {
    const rows: TestSheet['rows'] = [
      ['Wing', 'W-1', 10],
      [null, 'W-2', null],
      [null, 'W-3', null],
    ];
    const read = await readSheet(xlsx([{ name: 'S', rows, merged: ['A1:A3', 'C1:C3'] }]), null);
    expect(read.rows.map(({ cells }) => cells)).toEqual([
      ['Wing', 'W-1', 10],
      ['Wing', 'W-2', 'merged with C1'],
      ['Wing', 'W-3', 'merged with C1'],
    ]);
  });

  it('reads the number that a spreadsheet stores with its digits to the last bit', async () => {
    const stored = [0.1, 1 / 3, 12.300000000000001, 1.7976931348623157e308, 5e-324];
    const read = await readSheet(xlsx([{ name: 'S', rows: [stored] }]), null);
    expect(read.rows[0]?.cells).toEqual(stored);
  });

  it(
    `of ${WORKBOOK_LIMITS.rows} rows is read, one more is refused by its number`,
    { timeout: 60_000 },
    async () => {
      const row = (line: number): TestSheet['rows'][number] => [`P-${line}`, line / 8, 1.5, 0, 2];
      const rows = Array.from({ length: WORKBOOK_LIMITS.rows }, (_, index) => row(index));
      const read = await readSheet(xlsx([{ name: 'S', rows }]), null);
      expect(read.rows).toHaveLength(WORKBOOK_LIMITS.rows);
      expect(read.rows.at(-1)).toEqual({
        line: WORKBOOK_LIMITS.rows,
        cells: [`P-${WORKBOOK_LIMITS.rows - 1}`, (WORKBOOK_LIMITS.rows - 1) / 8, 1.5, 0, 2],
      });
      const more = await refusalOf(xlsx([{ name: 'S', rows: [...rows, row(0)] }]));
      expect(more.message).toContain(`at most ${WORKBOOK_LIMITS.rows}`);
    },
  );
});

describe('a workbook is refused', () => {
  const COMPOUND = Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]);
  const part = (name: string, text: string) => ({ name, bytes: Buffer.from(text) });

  it('as a bomb by what its directory declares, before a byte is unpacked', async () => {
    const bomb = xlsx(
      [SHEET],
      [{ name: 'xl/worksheets/sheet1.xml', bytes: Buffer.alloc(64 * 1024 ** 2, ' ') }],
    );
    expect(bomb.length).toBeLessThan(100_000);
    expect(await refusalOf(bomb)).toMatchObject({ kind: 'workbook-too-large' });
    const wide = Array.from({ length: 40 }, (_, k) => ({
      name: `xl/media/${k}.xml`,
      bytes: Buffer.from('x'),
      claims: 4 * 1024 ** 2,
    }));
    expect((await refusalOf(xlsx([SHEET], wide))).kind).toBe('workbook-too-large');
    const many = Array.from({ length: WORKBOOK_LIMITS.parts + 1 }, (_, k) => part(`xl/media/${k}.xml`, 'x'));
    expect((await refusalOf(zip(many))).message).toContain('parts');
  });

  it('as a bomb that declares less than it unpacks to', async () => {
    const liar = { name: 'xl/worksheets/sheet1.xml', bytes: Buffer.alloc(64 * 1024 ** 2, ' '), claims: 1000 };
    const before = process.memoryUsage().arrayBuffers;
    expect((await refusalOf(xlsx([SHEET], [liar]))).kind).toBe('workbook-too-large');
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(100 * 1024 ** 2);
  });

  it('with cells so far out that the rows between would fill the memory', async () => {
    const far = (xml: string) => refusalOf(xlsx([SHEET], [part('xl/worksheets/sheet1.xml', xml)]));
    const cell = (address: string, row: string) =>
      `<worksheet><sheetData><row r="${row}"><c r="${address}"><v>1</v></c></row></sheetData></worksheet>`;
    expect((await far(cell('A1048576', '1048576'))).message).toContain('rows');
    expect((await far(cell('XFD1', '1'))).message).toContain('columns');
    expect(
      (await far('<worksheet><sheetData><row r="99999999999"></row></sheetData></worksheet>')).kind,
    ).toBe('workbook-too-large');
  });

  it('with macros, whatever its name', async () => {
    expect((await refusalOf(xlsx([SHEET], [part('xl/vbaProject.bin', 'x')]))).kind).toBe('workbook-macros');
    const types = part(
      '[Content_Types].xml',
      '<Types><Override PartName="/xl/workbook.xml" ContentType="application/vnd.ms-excel.sheet.macroEnabled.main+xml"/></Types>',
    );
    expect((await refusalOf(xlsx([SHEET], [types]))).kind).toBe('workbook-macros');
  });

  it('behind a password, and says so', async () => {
    const office = Buffer.concat([
      COMPOUND,
      Buffer.alloc(1000),
      Buffer.from('EncryptedPackage', 'utf16le'),
      Buffer.alloc(1000),
    ]);
    expect((await refusalOf(office)).kind).toBe('workbook-encrypted');
    const sheet = { ...part('xl/worksheets/sheet1.xml', sheetXml(SHEET)), encrypted: true };
    expect((await refusalOf(xlsx([SHEET], [sheet]))).kind).toBe('workbook-encrypted');
  });

  it('in the old binary form, and in other forms, each by its name', async () => {
    const old = Buffer.concat([
      COMPOUND,
      Buffer.alloc(1000),
      Buffer.from('Workbook', 'utf16le'),
      Buffer.alloc(1000),
    ]);
    expect((await refusalOf(old)).message).toContain('.xls)');
    expect((await refusalOf(zip([part('xl/workbook.bin', 'x')]))).message).toContain('.xlsb');
    expect((await refusalOf(zip([part('word/document.xml', '<x/>')]))).kind).toBe('not-a-workbook');
  });

  it('when it is cut short or altered', async () => {
    const whole = xlsx([SHEET]);
    expect((await refusalOf(whole.subarray(0, whole.length - 30))).kind).toBe('workbook-damaged');
    const altered = Buffer.from(whole);
    const at = altered.indexOf('xl/worksheets/sheet1.xml') + 60;
    altered.writeUInt8(altered.readUInt8(at) ^ 0xff, at);
    expect(['workbook-damaged', 'workbook-too-large']).toContain((await refusalOf(altered)).kind);
  });

  it('when a part defines names that unfold', async () => {
    const xml =
      '<!DOCTYPE x [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;">]><worksheet><sheetData/></worksheet>';
    expect((await refusalOf(xlsx([SHEET], [part('xl/worksheets/sheet1.xml', xml)]))).kind).toBe(
      'workbook-unusual',
    );
  });
});
