import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createDb, createPool } from '@/db/client';
import { findList, findRevision, type List } from '@/db/queries/lists';
import { type RowEdit } from '@/lib/contracts/list-edits';
import { type Person } from '@/lib/server/actor';
import { compareRevisions } from '@/lib/server/lists/compare-revisions';
import { editRows } from '@/lib/server/lists/edit-rows';
import { type StoredRow } from '@/lib/server/lists/row-codec';
import { storedRows } from '@/lib/server/lists/stored-rows';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';

/** lb, in and lb.in2 with products as negative integrals: nothing of it is a whole number in SI. */
const UNITS = {
  mass_unit: 'lb',
  length_unit: 'in',
  inertia_unit: 'lb.in2',
  products: 'negative',
  uncertainty: '2sigma',
} as const;

const CSV = [
  'item,group,parent,counting,quantity,mass,x,y,z,ixx,iyy,izz,ixy,yaw,growth_percent,mass_sigma,note,Zone',
  'A-100,Wing,,memo,1,33.7,100.1,20.3,7,900.3,800.7,1200.9,-3.3,0,,0.7,"first, of two',
  'lines",12',
  'A-110,Wing,A-100,,3,7.3,101.7,21.9,7.7,90.1,80.7,120.3,-0.7,13.7,2.5,0.3,,12',
  'A-120,Wing,A-100,,1,11.8,98.3,19.1,6.1,0,0,0,0,0,,,=not a formula,',
  'B-100,Tail,,,1,5.9,300.3,0,55.1,10.1,12.3,14.9,0.9,0,,,,14',
  '',
].join('\r\n');

let test: ProgramUnderTest;
let list: List;
let made = 0;

beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());
beforeEach(async () => {
  const code = `edited-${(made += 1)}`;
  await reviseList(test, test.crew.weights, code, CSV, UNITS);
  list = await freshList(code);
});

async function freshList(code: string): Promise<List> {
  const found = await findList(test.db, test.program.id, code);
  if (found === undefined) throw new Error(`no list ${code}`);
  return found;
}

function save(edits: readonly RowEdit[], baseRevision = 1, person: Person = test.crew.weights) {
  return editRows(test, { person, list, baseRevision, reason: 'weighed again', edits });
}

async function rowsOf(number: number): Promise<StoredRow[]> {
  const revision = await findRevision(test.db, list.id, number);
  if (revision === undefined) throw new Error(`no revision ${number}`);
  const rows: StoredRow[] = [];
  for await (const row of storedRows(test.db, revision.id)) rows.push(row);
  return rows;
}

/** What a row says, without where it stands. */
function said({ list_no, row_no, sort_key, fingerprint, ...rest }: StoredRow) {
  expect([typeof list_no, typeof row_no, typeof sort_key, typeof fingerprint]).toEqual([
    'number',
    'number',
    'number',
    'string',
  ]);
  return rest;
}

const byItem = (rows: readonly StoredRow[], item: string): StoredRow => {
  const row = rows.find((one) => one.item === item);
  if (row === undefined) throw new Error(`no row ${item}`);
  return row;
};

describe('Saving edits', () => {
  it('changes the fields named and leaves every other row as it was, to the last bit', async () => {
    const before = await rowsOf(1);
    expect(
      await save([{ kind: 'change', item: 'B-100', fields: { mass: '6.25', note: 'scale 4', Zone: '15' } }]),
    ).toEqual({
      status: 'saved',
      revision: 2,
    });
    const after = await rowsOf(2);
    expect(after.map(({ item }) => item)).toEqual(['A-100', 'A-110', 'A-120', 'B-100']);
    for (const item of ['A-100', 'A-110', 'A-120'])
      expect(byItem(after, item)).toStrictEqual(byItem(before, item));
    // 1 lb = 0.45359237 kg exactly (NIST SP 811, B.8).
    expect(said(byItem(after, 'B-100'))).toStrictEqual({
      ...said(byItem(before, 'B-100')),
      mass: 6.25 * 0.45359237,
      note: 'scale 4',
      extra: { Zone: '15' },
    });
  });

  it('keeps who, why and what it was read with, and points to no file', async () => {
    await save([{ kind: 'remove', item: 'B-100' }], 1, test.crew.weights2);
    expect(await findRevision(test.db, list.id, 2)).toMatchObject({
      origin: 'edit',
      reason: 'weighed again',
      created_by: test.crew.weights2.userId,
      file_sha256: null,
      rows: 3,
      declarations: { massUnit: 'lb', products: 'negative' },
    });
  });

  it('reads fields in the units and the product sign of the list', async () => {
    await save([
      { kind: 'change', item: 'B-100', fields: { ixy: '-2', x: '10' } },
      { kind: 'add', fields: { item: 'C-1', mass: '2', x: '1', y: '0', z: '0' } },
    ]);
    const after = await rowsOf(2);
    const lbIn2 = 0.45359237 * 0.0254 ** 2;
    expect(byItem(after, 'B-100').ixy).toBeCloseTo(2 * lbIn2, 15);
    expect(byItem(after, 'B-100').x).toBeCloseTo(0.254, 15);
    expect(after.at(-1)).toMatchObject({
      item: 'C-1',
      group_path: 'Ungrouped',
      mass: 2 * 0.45359237,
    });
  });

  it('blanks a cell that is given as nothing', async () => {
    await save([{ kind: 'change', item: 'A-110', fields: { growth_percent: '', mass_sigma: '', Zone: '' } }]);
    expect(byItem(await rowsOf(2), 'A-110')).toMatchObject({ growth: null, sigma: null, extra: null });
  });

  it('is refused when the list has moved on, naming who moved it', async () => {
    await save([{ kind: 'change', item: 'B-100', fields: { mass: '6' } }], 1, test.crew.weights2);
    const late = save([{ kind: 'change', item: 'A-120', fields: { mass: '12' } }]);
    await expect(late).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(
        /^weights2 made revision 2 after you began from revision 1\. Nothing was saved/,
      ),
    });
    expect(await freshList(list.code)).toMatchObject({ last_revision: 2 });
  });

  it('made from a newer revision names the fields that are no longer what was seen', async () => {
    await save([{ kind: 'change', item: 'B-100', fields: { mass: '6' } }], 1, test.crew.weights2);
    const edit = {
      kind: 'change',
      item: 'B-100',
      fields: { mass: '7', x: '301' },
      seen: { mass: '5.9', x: '300.3' },
    } as const;
    expect(await save([edit], 2)).toMatchObject({
      status: 'problems',
      problems: [{ item: 'B-100', column: 'mass', found: '6', message: expect.stringContaining('`5.9`') }],
    });
    expect(await save([{ ...edit, seen: { mass: '6', x: '300.3' } }], 2)).toEqual({
      status: 'saved',
      revision: 3,
    });
  });

  it('from the same revision at the same time lets one through and refuses the other', async () => {
    const both = await Promise.allSettled([
      save([{ kind: 'change', item: 'B-100', fields: { mass: '6' } }]),
      save([{ kind: 'change', item: 'B-100', fields: { mass: '7' } }], 1, test.crew.weights2),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(await freshList(list.code)).toMatchObject({ last_revision: 2 });
  });

  it('comes back with every problem by item and column, as an import would find it, and saves nothing', async () => {
    const saved = await save([
      { kind: 'change', item: 'A-100', fields: { mass: '12,4.5' } },
      { kind: 'change', item: 'A-110', fields: { parent: 'nowhere' } },
      { kind: 'add', fields: { item: 'D-1', mass: '-1', x: '', y: '0', z: '0' } },
    ]);
    expect(saved).toMatchObject({
      status: 'problems',
      count: 4,
      problems: [
        { item: 'A-100', column: 'mass', found: '12,4.5' },
        { item: 'A-110', column: 'parent', found: 'nowhere' },
        { item: 'D-1', column: 'x', found: null },
        { item: 'D-1', column: 'mass', found: '-1' },
      ],
    });
    expect(await freshList(list.code)).toMatchObject({ last_revision: 1 });
  });

  it('refuses to remove an assembly from above its parts, and removes it with them', async () => {
    expect(await save([{ kind: 'remove', item: 'A-100' }])).toEqual({
      status: 'problems',
      count: 1,
      problems: [
        {
          item: 'A-100',
          column: null,
          found: 'A-100',
          message:
            '2 rows name `A-100` as the assembly they belong to: A-110, A-120. Remove them too, or give them another parent.',
        },
      ],
    });
    const whole: RowEdit[] = [
      { kind: 'remove', item: 'A-100' },
      { kind: 'remove', item: 'A-110' },
      { kind: 'change', item: 'A-120', fields: { parent: '' } },
    ];
    expect(await save(whole)).toEqual({ status: 'saved', revision: 2 });
    expect((await rowsOf(2)).map(({ item, parent }) => [item, parent])).toEqual([
      ['A-120', null],
      ['B-100', null],
    ]);
  });

  it.each<[string, RowEdit[], string]>([
    ['a row that is not there', [{ kind: 'remove', item: 'Z' }], 'Revision 1 has no row `Z`.'],
    [
      'an item that is taken',
      [{ kind: 'add', fields: { item: 'B-100' } }],
      'Revision 1 has a row `B-100` already.',
    ],
    ['a row without an item', [{ kind: 'add', fields: { mass: '1' } }], 'An added row has no item.'],
    [
      'a row edited twice',
      [
        { kind: 'remove', item: 'B-100' },
        { kind: 'change', item: 'B-100', fields: { mass: '1' } },
      ],
      'The row `B-100` is edited twice.',
    ],
    [
      'another item for a row',
      [{ kind: 'change', item: 'B-100', fields: { item: 'B-101' } }],
      'The item is what a row is known by and stays.',
    ],
  ])('refuses %s', async (_title, edits, words) => {
    const saved = await save(edits);
    expect(saved).toMatchObject({
      status: 'problems',
      count: 1,
      problems: [{ message: expect.stringContaining(words) }],
    });
  });

  it('refuses to leave a list without rows', async () => {
    const all = ['A-100', 'A-110', 'A-120', 'B-100'].map((item): RowEdit => ({ kind: 'remove', item }));
    expect(await save(all)).toMatchObject({
      status: 'problems',
      problems: [{ item: null, message: 'No row would be left. A list needs at least one.' }],
    });
  });
});

describe('Comparing two revisions', () => {
  it('counts and names the rows that differ, field by field in the units of the newer one', async () => {
    await save([
      { kind: 'change', item: 'A-110', fields: { mass: '7.4', note: 'lighter bolt' } },
      { kind: 'remove', item: 'B-100' },
      { kind: 'add', fields: { item: 'C-1', mass: '2', x: '1', y: '0', z: '0' } },
    ]);
    const [before, after] = [
      await findRevision(test.db, list.id, 1),
      await findRevision(test.db, list.id, 2),
    ];
    if (before === undefined || after === undefined) throw new Error('revisions are missing');
    const changes = await compareRevisions(test.db, before, after, { offset: 0, limit: 10 });
    expect(changes.counts).toEqual({ added: 1, removed: 1, changed: 1 });
    expect(changes.rows.map(({ item, kind }) => [item, kind])).toEqual([
      ['A-110', 'changed'],
      ['C-1', 'added'],
      ['B-100', 'removed'],
    ]);
    expect(changes.rows[0]?.fields).toEqual([
      { column: 'mass', before: 7.3, after: 7.4 },
      { column: 'note', before: null, after: 'lighter bolt' },
    ]);
  });
});

it('ends for everyone when more people save at once than there are connections: one wins, the rest are told', async () => {
  const writers = createPool(test.appUrl, 2, () => undefined);
  const readers = createPool(test.appUrl, 1, () => undefined);
  const services = { pool: writers, db: createDb(readers) };
  const edit = { kind: 'remove', item: 'B-100' } as const;
  const saves = Array.from({ length: 6 }, () =>
    editRows(services, {
      person: test.crew.weights,
      list,
      baseRevision: 1,
      reason: 'all at once',
      edits: [edit],
    }),
  );
  const ends = await Promise.allSettled(saves);
  expect(ends.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
  for (const end of ends)
    if (end.status === 'rejected') expect(end.reason).toMatchObject({ code: 'conflict' });
  await writers.end();
  await readers.end();
});
