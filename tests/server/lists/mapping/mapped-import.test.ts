import { Readable } from 'node:stream';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { GET as readImportRoute } from '@/app/api/v1/imports/[id]/route';
import { POST as addRevisionRoute } from '@/app/api/v1/programs/[program]/lists/[list]/revisions/route';
import { findImport } from '@/db/queries/lists';
import { findPendingUpload, mappedImportsOf, mappingOfImport, openUploadsOf } from '@/db/queries/mappings';
import { importEndpoint } from '@/lib/contracts/api/imports';
import { addRevisionEndpoint } from '@/lib/contracts/api/revisions';
import { mappingSchema } from '@/lib/contracts/list-mapping';
import { guessMapping } from '@/lib/ingest/mapping/guess';
import { type Draft, type Mapping } from '@/lib/ingest/mapping/mapping';
import { mappingOf } from '@/lib/ingest/mapping/questions';
import { type Person } from '@/lib/server/actor';
import { importFile } from '@/lib/server/lists/import-file';
import { checkMapping } from '@/lib/server/lists/mapping/check-mapping';
import { sampleOf } from '@/lib/server/lists/mapping/file-rows';
import { importMapped } from '@/lib/server/lists/mapping/import-mapped';
import { dropUpload } from '@/lib/server/lists/mapping/keep-upload';
import { rememberedFor } from '@/lib/server/lists/mapping/remembered';
import { takeFile } from '@/lib/server/lists/mapping/take-file';
import { addList } from '@/lib/server/lists/save-list';
import { openObject } from '@/lib/server/storage/open-object';
import { storeStream } from '@/lib/server/storage/store-stream';
import { declare } from '@/tests/ingest/support';
import { callerOfEndpoint, tokenOf } from '@/tests/server/api/calls';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { xlsx } from '@/tests/support/xlsx';

/* Invented supplier files. */

const NACELLE = [
  'Nacelle supply statement,,,,,',
  'Pos,Name,Wt [lb],FS (in),BL (in),WL (in)',
  '1,Inlet lip,12.5,200,88,60',
  '2,Cowl,30.5,220,88,71',
  'TOTAL,,43,214.2,88,67.8',
  '',
].join('\n');

let test: ProgramUnderTest;
let weights: Person;
let made = 0;

beforeAll(async () => {
  test = await programUnderTest();
  ({ weights } = test.crew);
});
// A person may have few imports under way: those that a test only asks for are run after it.
afterEach(async () => {
  for (const { id } of await test.db
    .selectFrom('imports')
    .select('id')
    .where('state', '=', 'waiting')
    .execute())
    await run(id);
});
afterAll(() => test.close());

async function newList() {
  const code = `mapped-${(made += 1)}`;
  const { id } = await addList(test.db, {
    person: weights,
    programId: test.program.id,
    code,
    title: code,
    declarations: declare(),
  });
  return { id, programId: test.program.id, code };
}
type TestList = Awaited<ReturnType<typeof newList>>;

async function send(list: TestList, body: string | Buffer, { name = 'supplier.csv', byHand = false } = {}) {
  const bytes = Buffer.from(body);
  const stored = await storeStream(Readable.from([bytes]), { contentLength: bytes.length });
  const file = { ...stored, name, lines: 5 };
  return takeFile(test.db, { person: weights, list, file, reason: 'for the test' }, byHand);
}

async function sendToMap(list: TestList, body: string | Buffer, name?: string) {
  const taken = await send(list, body, name === undefined ? {} : { name });
  if (!('upload' in taken)) throw new Error('the file was not kept for a mapping');
  const upload = await findPendingUpload(test.db, taken.upload);
  if (upload === undefined) throw new Error('no pending upload');
  return upload;
}

/** The guesses, everything that looks like a total or a title left out. */
async function guessed(sha256: string, answers: Partial<Draft> = {}): Promise<Mapping> {
  const { draft } = guessMapping(await sampleOf(await openObject(sha256), null), declare());
  const mapping = mappingOf({
    ...draft,
    leaveOut: { totals: true, texts: true, headings: true },
    ...answers,
  });
  if (mapping === null) throw new Error('the guesses leave something open');
  return mappingSchema.parse(mapping);
}

async function run(importId: string) {
  await importFile({ pool: test.pool, db: test.db, openObject: (sha256) => openObject(sha256) }, importId);
  const found = await findImport(test.db, importId);
  if (found === undefined) throw new Error('no import');
  return found;
}

const rowsOf = (revisionId: string | null) =>
  test.db
    .selectFrom('mass_rows')
    .select(['item', 'mass', 'x'])
    .where('revision_id', '=', revisionId ?? '')
    .orderBy('item')
    .execute();

describe('a file of other headings', () => {
  it('is kept in the store and found on its list until it is mapped, and then read to the very figures', async () => {
    const list = await newList();
    const upload = await sendToMap(list, NACELLE);
    expect(await openUploadsOf(test.db, list.id)).toMatchObject([
      { id: upload.id, file_name: 'supplier.csv', author: 'weights' },
    ]);
    const mapping = await guessed(upload.file_sha256);
    const importId = await importMapped(test.db, {
      person: weights,
      list,
      upload,
      mapping,
      acceptTotals: false,
    });
    expect(await openUploadsOf(test.db, list.id)).toEqual([]);
    const end = await run(importId);
    expect(end).toMatchObject({ state: 'done', revision_number: 1, problems: null });
    const rows = await rowsOf(end.revision_id);
    expect(rows.map(({ item }) => item)).toEqual(['1', '2']);
    // 12.5 lb and 200 in, by the factors of NIST SP 811.
    expect(rows[0]?.mass).toBe(12.5 * 0.45359237);
    expect(rows[0]?.x).toBe(200 * 0.0254);
    expect(await mappedImportsOf(test.db, list.id)).toEqual(new Map([[end.revision_id, importId]]));
    expect(await mappingOfImport(test.db, importId)).toMatchObject({
      mapping,
      author: 'weights',
      left_out: {
        rows: [
          { line: 1, why: 'above the headings' },
          { line: 5, why: 'totals', text: 'TOTAL' },
        ],
        counts: { totals: 1 },
      },
      totals: [
        { what: 'mass', stated: 43, computed: 43, agrees: true },
        { what: 'x', agrees: true },
        { what: 'y', agrees: true },
        { what: 'z', agrees: true },
      ],
    });
  });

  it('can be imported once only, and not after it was dropped', async () => {
    const list = await newList();
    const upload = await sendToMap(list, NACELLE);
    const asked = {
      person: weights,
      list,
      upload,
      mapping: await guessed(upload.file_sha256),
      acceptTotals: false,
    };
    await importMapped(test.db, asked);
    await expect(importMapped(test.db, asked)).rejects.toMatchObject({ code: 'conflict' });
    await expect(dropUpload(test.db, { person: weights, list, upload })).rejects.toMatchObject({
      code: 'conflict',
    });
    const other = await sendToMap(list, NACELLE);
    await dropUpload(test.db, { person: weights, list, upload: other });
    await expect(importMapped(test.db, { ...asked, upload: other })).rejects.toMatchObject({
      code: 'conflict',
    });
    const { count } = await test.db
      .selectFrom('imports')
      .select((eb) => eb.fn.countAll<number>().as('count'))
      .where('list_id', '=', list.id)
      .executeTakeFirstOrThrow();
    expect(count).toBe(1);
  });

  it('whose totals row does not agree is shown so, refused, and read once someone has accepted it', async () => {
    const list = await newList();
    const wrong = NACELLE.replace('TOTAL,,43,', 'TOTAL,,45,');
    const upload = await sendToMap(list, wrong);
    const mapping = await guessed(upload.file_sha256);
    const check = await checkMapping(await openObject(upload.file_sha256), mapping, declare());
    expect(check).toMatchObject({ rows: 2, problemCount: 0, leftOutCount: 2 });
    expect(check.totals[0]).toMatchObject({
      what: 'mass',
      unit: 'lb',
      stated: 45,
      computed: 43,
      agrees: false,
    });
    const refused = await run(
      await importMapped(test.db, { person: weights, list, upload, mapping, acceptTotals: false }),
    );
    expect(refused).toMatchObject({ state: 'failed', problem_counts: { 'totals-differ': 1 } });
    const again = await sendToMap(list, wrong);
    const accepted = await run(
      await importMapped(test.db, { person: weights, list, upload: again, mapping, acceptTotals: true }),
    );
    expect(accepted).toMatchObject({ state: 'done', revision_number: 1 });
  });

  it('that has the contract’s own headings is read at once, unless it ends in a total or is asked for by hand', async () => {
    const list = await newList();
    const plain = 'item,mass,x,y,z\nA,1,0,0,0\nB,2,1,0,0\n';
    expect(await send(list, plain)).toHaveProperty('import');
    expect(await send(list, plain, { byHand: true })).toHaveProperty('upload');
    expect(await send(list, `${plain}TOTAL,3,0.667,0,0\n`)).toHaveProperty('upload');
    expect(await send(list, Buffer.from('item,mass,x,y,z\nFl\u00fcgel,1,0,0,0\n', 'latin1'))).toHaveProperty(
      'import',
    );
  });
});

describe('a mapping', () => {
  it('is remembered by its list and offered again wherever the headings stand, with who made it', async () => {
    const list = await newList();
    const upload = await sendToMap(list, NACELLE);
    const mapping = await guessed(upload.file_sha256);
    await importMapped(test.db, { person: weights, list, upload, mapping, acceptTotals: false });
    const later = `Nacelle supply statement,,,,,\nIssue 5,,,,,\n\n${NACELLE.split('\n').slice(1).join('\n').replace('Pos,Name', 'POS, Name')}`;
    const next = await sendToMap(list, later.replaceAll(',', ';'));
    const sample = await sampleOf(await openObject(next.file_sha256), null);
    const remembered = await rememberedFor(test.db, list.id, sample);
    expect(remembered).toMatchObject({
      author: 'weights',
      mapping: { delimiter: ';', header: { first: 4, last: 4 } },
    });
    expect(remembered?.mapping.columns.map(({ to }) => to)).toEqual(mapping.columns.map(({ to }) => to));
    expect(await rememberedFor(test.db, (await newList()).id, sample)).toBeNull();
    // Taken as it is, it makes no second one.
    if (remembered === null) throw new Error('nothing remembered');
    await importMapped(test.db, {
      person: test.crew.weights2,
      list,
      upload: next,
      mapping: remembered.mapping,
      acceptTotals: false,
    });
    const kept = await test.db
      .selectFrom('list_mappings')
      .select('id')
      .where('list_id', '=', list.id)
      .execute();
    expect(kept).toHaveLength(1);
    // Changed, it is a new one, and the old one stays.
    const changed = { ...mapping, per: 'row' as const };
    const third = await sendToMap(list, NACELLE);
    await importMapped(test.db, {
      person: test.crew.weights2,
      list,
      upload: third,
      mapping: changed,
      acceptTotals: false,
    });
    expect(await rememberedFor(test.db, list.id, sample)).toMatchObject({
      author: 'weights2',
      mapping: { per: 'row' },
    });
  });

  it('and what came of it cannot be changed by the application', async () => {
    for (const table of ['list_mappings', 'import_mappings', 'import_readings'] as const) {
      await expect(test.db.deleteFrom(table).execute()).rejects.toThrow(/permission denied/);
      await expect(test.db.updateTable(table).set({ created_at: new Date() }).execute()).rejects.toThrow(
        /permission denied/,
      );
    }
  });

  it('of a column that measures something else, or of none that is needed, is refused', () => {
    const mapping = {
      version: 1,
      delimiter: ',',
      sheet: null,
      header: { first: 1, last: 1 },
      columns: ['item', 'mass', 'x', 'y', 'z'].map((column) => ({
        heading: column,
        to: { use: 'column', column, unit: null },
      })),
      numbers: { decimal: '.', thousands: '' },
      per: 'piece',
      leaveOut: { totals: true, texts: false, headings: false },
    };
    expect(mappingSchema.safeParse(mapping).success).toBe(true);
    const columns = (change: (columns: typeof mapping.columns) => unknown) =>
      mappingSchema.safeParse({ ...mapping, columns: change(mapping.columns) }).success;
    expect(columns((all) => all.slice(0, 4))).toBe(false);
    expect(columns((all) => all.slice(1))).toBe(false);
    expect(columns((all) => [...all, ...all.slice(1, 2)])).toBe(false);
    expect(
      columns(([first, , ...rest]) => [
        first,
        { heading: 'mass', to: { use: 'column', column: 'mass', unit: 'in' } },
        ...rest,
      ]),
    ).toBe(false);
    expect(mappingSchema.safeParse({ ...mapping, numbers: { decimal: ',', thousands: ',' } }).success).toBe(
      false,
    );
    expect(mappingSchema.safeParse({ ...mapping, sheet: 'S' }).success).toBe(false);
  });
});

describe('a workbook', () => {
  const rows = [
    ['Tail weights', null, null, null, null, null],
    ['Item', 'Name', 'Mass [kg]', 'X [mm]', 'Y [mm]', 'Z [mm]'],
    ['T-1', 'Fin', 48.25, 14200, 0, 3100],
    ['T-2', 'Rudder', 18.4, 15000, 0, 3050.5],
  ];

  it('is mapped and read as a text is, its problems at their cells', async () => {
    const list = await newList();
    const upload = await sendToMap(list, xlsx([{ name: 'Tail', rows }]), 'tail.xlsx');
    const done = await run(
      await importMapped(test.db, {
        person: weights,
        list,
        upload,
        mapping: await guessed(upload.file_sha256),
        acceptTotals: false,
      }),
    );
    expect(done).toMatchObject({ state: 'done', revision_number: 1 });
    expect(await rowsOf(done.revision_id)).toMatchObject([
      { item: 'T-1', mass: 48.25, x: 14.2 },
      { item: 'T-2', mass: 18.4, x: 15 },
    ]);
    const broken = [...rows, ['T-3', 'Tab', { xml: '<c r="@" t="e"><v>#REF!</v></c>' }, 15100, 0, 3000]];
    const bad = await sendToMap(list, xlsx([{ name: 'Tail', rows: broken }]), 'tail.xlsx');
    const failed = await run(
      await importMapped(test.db, {
        person: weights,
        list,
        upload: bad,
        mapping: await guessed(bad.file_sha256),
        acceptTotals: false,
      }),
    );
    expect(failed.problems).toMatchObject([{ kind: 'formula', line: 5, column: 'mass', found: '#REF!' }]);
    expect(failed.problems?.[0]?.message).toMatch(/^Tail!C5: `#REF!` is an error of the spreadsheet/);
  });

  it('that is refused is not kept', async () => {
    const list = await newList();
    const macros = xlsx([{ name: 'Tail', rows }], [{ name: 'xl/vbaProject.bin', bytes: Buffer.from('x') }]);
    await expect(send(list, macros, { name: 'tail.xlsm' })).rejects.toMatchObject({
      code: 'invalid-input',
      message: expect.stringContaining('macros') as string,
    });
    expect(await openUploadsOf(test.db, list.id)).toEqual([]);
  });
});

describe('the API', () => {
  const revisions = callerOfEndpoint(addRevisionEndpoint, addRevisionRoute);
  const imports = callerOfEndpoint(importEndpoint, readImportRoute);

  it('reads other headings by what the list remembers, and says so; without, it names what is missing', async () => {
    const list = await newList();
    const token = await tokenOf(test, weights, ['lists:write']);
    const post = async (body: string) => {
      const answer = await revisions.call({
        token,
        params: { program: test.program.code, list: list.code },
        body,
      });
      expect(answer.status).toBe(202);
      const id = String(answer.body['import']);
      await run(id);
      return (await imports.call({ token, params: { id } })).body;
    };
    const before = await post(NACELLE);
    expect(before).toMatchObject({ state: 'failed', mapping: null });
    expect(JSON.stringify(before['errors'])).toContain('The column mass is missing');
    const upload = await sendToMap(list, NACELLE);
    await importMapped(test.db, {
      person: weights,
      list,
      upload,
      mapping: await guessed(upload.file_sha256),
      acceptTotals: true,
    });
    expect(
      await post(
        NACELLE.replace('12.5', '13.5')
          .replace('TOTAL,,43,', 'TOTAL,,44,')
          .replace(/214.2,88,67.8/, '213.9,88,67.6'),
      ),
    ).toMatchObject({
      state: 'done',
      mapping: { by: 'weights' },
    });
    // Nobody is there to accept a wrong total.
    expect(await post(NACELLE.replace('TOTAL,,43,', 'TOTAL,,45,'))).toMatchObject({
      state: 'failed',
      errorCounts: { 'totals-differ': 1 },
    });
  });
});
