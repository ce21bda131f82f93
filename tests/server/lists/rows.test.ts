import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { countRows, pageOfView } from '@/db/queries/list-rows';
import { findRevision, type ListRevision } from '@/db/queries/lists';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { type GroupingColumn, listViewOf } from '@/lib/contracts/list-view';
import { readMassList } from '@/lib/ingest/mass-list';
import { type Component } from '@/lib/mass/component';
import { findFrameIssue, geometryOf } from '@/db/queries/frames';
import { exportColumnsOf, exportRows } from '@/lib/server/lists/export-rows';
import { loadGroups } from '@/lib/server/lists/load-groups';
import { totalsOfRevision, totalsOfView } from '@/lib/server/lists/row-totals';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { filterOf, orderOf, rowReader } from '@/lib/server/lists/row-view';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';

const CSV = [
  'item,description,group,counting,quantity,mass,x,y,z,ixx,iyy,izz,ixy,symmetry,maturity,Supplier',
  'P-1,Front spar,Wing/Spars,,1,40,5,2,1,0,0,0,0,pair,C,Tern Metals',
  'P-2,Rear spar,Wing/Spars,,1,30,6,2,1,1,1,1,0.2,pair,E,Tern Metals',
  'P-3,Rib,Wing/Ribs,,4,2.5,5.5,1,1,1,1,1,-0.1,,,',
  'P-4,Wing tips,Wing tips,,2,1,6.5,8,1,0,0,0,0,,A,100 % Sand_piper',
  'P-5,Wing complete,Wing,memo,1,999,0,0,0,0,0,0,0,,,',
  'P-6,=SUM(A1),Tail,,1,12,14,0,3,0,0,0,0,,C,',
  '',
].join('\n');

let test: ProgramUnderTest;
let revision: ListRevision;

beforeAll(async () => {
  test = await programUnderTest();
  revision = await revise('rows', {});
});
afterAll(() => test.close());

async function revise(
  code: string,
  declarations: Parameters<typeof reviseList>[4],
  csv = CSV,
): Promise<ListRevision> {
  await reviseList(test, test.crew.weights, code, csv, declarations);
  const list = await test.db
    .selectFrom('lists')
    .select('id')
    .where('program_id', '=', test.program.id)
    .where('code', '=', code)
    .executeTakeFirstOrThrow();
  const found = await findRevision(test.db, list.id, 1);
  if (found === undefined) throw new Error('no revision');
  return found;
}

async function itemsOf(address: string, of = revision, page = { offset: 0, limit: 100 }): Promise<string[]> {
  const view = listViewOf(new URLSearchParams(address));
  const filter = filterOf(view, of.findings, await revisionGroups(test.db, of.id));
  const { rows, total } = await pageOfView(test.db, of.id, filter, orderOf(view, of.declarations), page);
  expect(total).toBe(await countRows(test.db, of.id, filter));
  if (page.offset === 0 && page.limit === 100) expect(total).toBe(rows.length);
  return rows.map(({ item }) => item);
}

describe('The rows of a view', () => {
  it.each([
    ['', 'P-1 P-2 P-3 P-4 P-5 P-6'],
    ['find=spar', 'P-1 P-2'],
    ['find=SPAR', 'P-1 P-2'],
    ['find=tern+metals', 'P-1 P-2'],
    ['find=%25', 'P-4'],
    ['find=_piper', 'P-4'],
    ['find=Sandxpiper', ''],
    ['find=Supplier', ''],
    ['where=own:Supplier&is=Tern+Metals', 'P-1 P-2'],
    ['where=own:Supplier', 'P-3 P-5 P-6'],
    ['where=maturity&is=C', 'P-1 P-6'],
    ['where=maturity&is=C&group=Wing', 'P-1'],
    ['where=nonsense&is=C', 'P-1 P-2 P-3 P-4 P-5 P-6'],
    ['sort=own:Supplier', 'P-4 P-1 P-2 P-3 P-5 P-6'],
    ['sort=-own:Supplier&find=P-', 'P-1 P-2 P-4 P-3 P-5 P-6'],
    ['sort=symmetry', 'P-1 P-2 P-3 P-4 P-5 P-6'],
    ['sort=mass_sigma', 'P-1 P-2 P-3 P-4 P-5 P-6'],
    ['group=Wing', 'P-1 P-2 P-3 P-5'],
    ['group=Wing/Spars', 'P-1 P-2'],
    ['group=Wing+tips', 'P-4'],
    ['counting=memo', 'P-5'],
    ['category=fuel', ''],
    ['sort=mass', 'P-4 P-3 P-6 P-2 P-1 P-5'],
    ['sort=-mass', 'P-5 P-1 P-2 P-6 P-3 P-4'],
    ['sort=maturity', 'P-4 P-1 P-6 P-2 P-3 P-5'],
    ['sort=-maturity', 'P-2 P-1 P-6 P-4 P-3 P-5'],
    ['sort=nonsense&category=nonsense', 'P-1 P-2 P-3 P-4 P-5 P-6'],
    ['group=Wing&find=rear&sort=-x', 'P-2'],
    ['finding=memo-rows', 'P-5'],
    ['finding=no-such-rule', ''],
  ])('%s', async (address, items) => {
    expect((await itemsOf(address)).join(' ')).toBe(items);
  });

  it('come a page at a time, without a gap or a row twice, in an order with ties', async () => {
    const pages = [0, 2, 4].map((offset) => itemsOf('sort=z', revision, { offset, limit: 2 }));
    expect((await Promise.all(pages)).flat()).toEqual(['P-5', 'P-1', 'P-2', 'P-3', 'P-4', 'P-6']);
  });

  it('are ordered by the products that they show, whichever sign the list declares', async () => {
    const negative = await revise('negative', { products: 'negative' });
    expect((await itemsOf('sort=-ixy', negative)).slice(0, 2)).toEqual(['P-2', 'P-1']);
    expect((await itemsOf('sort=ixy', negative))[0]).toBe('P-3');
    expect((await itemsOf('sort=ixy'))[0]).toBe('P-3');
  });

  it('are stated in the units and signs of the list, blank cells left out', async () => {
    const stated = await revise('stated', {
      mass_unit: 'lb',
      length_unit: 'in',
      inertia_unit: 'slug.ft2',
      products: 'negative',
    });
    const { rows } = await pageOfView(
      test.db,
      stated.id,
      filterOf(listViewOf(new URLSearchParams('find=P-3')), [], await revisionGroups(test.db, stated.id)),
      { column: 'position', descending: false },
      { offset: 0, limit: 1 },
    );
    expect(rows.map(rowReader(stated.declarations))).toMatchObject([
      { cells: { item: 'P-3', quantity: 4, mass: 2.5, x: 5.5, ixx: 1, ixy: -0.1 }, own: {} },
    ]);
    expect(Object.keys(rows.map(rowReader(stated.declarations))[0]?.cells ?? {})).not.toContain('maturity');
  });
});

describe('The totals of a list', () => {
  const frameOf = async (of: ListRevision) => ({
    declarations: of.declarations,
    geometry: geometryOf(await findFrameIssue(test.db, test.frameIssueId)),
  });

  it('count pieces and mirror images, leave memo rows out, and put the CG into list axes and units', async () => {
    const { whole, groups } = await totalsOfRevision(
      test.db,
      revision.id,
      test.frameIssueId,
      await frameOf(revision),
    );
    // By hand: 2(40) + 2(30) + 4(2.5) + 2(1) + 12 = 164; x: (400 + 360 + 55 + 13 + 168)/164; y: (10 + 16)/164.
    expect(whole).toMatchObject({ rows: 5, pieces: 11, mass: 164, memoRows: 1, waitingRows: 0 });
    expect(whole.cg?.[0]).toBeCloseTo(996 / 164, 12);
    expect(whole.cg?.[1]).toBeCloseTo(26 / 164, 12);
    expect(whole.cg?.[2]).toBeCloseTo((80 + 60 + 10 + 2 + 36) / 164, 12);
    expect(groups.map(({ group, rows, mass }) => [group, rows, mass])).toEqual([
      ['Tail', 1, 12],
      ['Wing', 3, 150],
      ['Wing/Ribs', 1, 10],
      ['Wing/Spars', 2, 140],
      ['Wing tips', 1, 2],
    ]);
  });

  it.each([
    ['in the usual axes', {}],
    [
      'in a turned, moved, left-handed frame and pounds',
      {
        mass_unit: 'lb',
        length_unit: 'in',
        axes: 'forward,right,up',
        frame: { origin: { x: 500, y: 3, z: -20 }, yaw: 3, pitch: -7, roll: 11 },
      },
    ],
    ['of a left half', { extent: 'left-half' }],
  ] as const)('summed from rows are those kept with the revision: %s', async (title, declarations) => {
    const csv = 'extent' in declarations ? CSV.replaceAll(',pair,', ',,') : CSV;
    const of = await revise(`totals-${title.replace(/\W+/g, '-')}`, declarations, csv);
    const frame = await frameOf(of);
    const kept = await totalsOfRevision(test.db, of.id, test.frameIssueId, frame);
    const summed = await totalsOfView(
      test.db,
      of.id,
      filterOf(listViewOf(new URLSearchParams()), [], await revisionGroups(test.db, of.id)),
      frame,
    );
    expect({ ...summed, mass: 0, cg: 0 }).toEqual({ ...kept.whole, mass: 0, cg: 0 });
    expect(summed.mass).toBeCloseTo(kept.whole.mass, 9);
    for (const axis of [0, 1, 2] as const)
      expect(summed.cg?.[axis]).toBeCloseTo(kept.whole.cg?.[axis] ?? NaN, 9);
  });
});

describe('The groups of a view', () => {
  const groupsOf = (by: GroupingColumn, address = '', of = revision) =>
    loadGroups(test.db, of, listViewOf(new URLSearchParams(address)), by);

  it('by group come as a tree of the stored subtotals, with the share of each', async () => {
    const { of, groups, whole } = await groupsOf('group');
    expect(of).toBe(5);
    expect(whole.mass).toBe(164);
    expect(groups.map(({ value, rows, mass, share }) => [value, rows, mass, share])).toEqual([
      ['Tail', 1, 12, 12 / 164],
      ['Wing', 3, 150, 150 / 164],
      ['Wing/Ribs', 1, 10, 10 / 164],
      ['Wing/Spars', 2, 140, 140 / 164],
      ['Wing tips', 1, 2, 2 / 164],
    ]);
  });

  it('by a column of the list’s own add up pairs with their mirror images, heaviest first', async () => {
    const { groups, whole } = await groupsOf('own:Supplier');
    expect(whole).toMatchObject({ rows: 5, mass: 164, memoRows: 1 });
    expect(
      groups.map(({ value, rows, pieces, mass, memoRows }) => [value, rows, pieces, mass, memoRows]),
    ).toEqual([
      ['Tern Metals', 2, 4, 140, 0],
      ['', 2, 5, 22, 1],
      ['100 % Sand_piper', 1, 2, 2, 0],
    ]);
    // By hand: x of the two pairs (2 × 40 × 5 + 2 × 30 × 6) / 140; their images bring y to the plane of symmetry.
    expect(groups[0]?.cg?.[0]).toBeCloseTo(760 / 140, 12);
    expect(groups[0]?.cg?.[1]).toBeCloseTo(0, 12);
  });

  it.each(['group', 'maturity', 'category'] as const)(
    'summed from rows are those of the stored subtotals, by %s',
    async (by) => {
      const kept = await groupsOf(by);
      // A text that every item has makes the database read the rows.
      const summed = await groupsOf(by, 'find=P-');
      const byValue = (groups: RowGroups['groups']) =>
        [...groups]
          .filter(({ rows }) => rows > 0)
          .sort((a, b) => (a.value < b.value ? -1 : 1))
          .map(({ value, rows, pieces, mass, cg, share, memoRows }) => [
            value,
            rows,
            pieces,
            mass,
            cg,
            share,
            memoRows,
          ]);
      expect(byValue(summed.groups)).toEqual(
        byValue(kept.groups).map((group) =>
          group.map((one) =>
            typeof one === 'number'
              ? expect.closeTo(one, 9)
              : Array.isArray(one)
                ? one.map((x) => expect.closeTo(x, 9))
                : one,
          ),
        ),
      );
    },
  );

  it('leave the choice of one of them out, and keep the other choices', async () => {
    const all = await groupsOf('group');
    expect(await groupsOf('group', 'group=Wing')).toEqual(all);
    const { groups } = await groupsOf('maturity', 'where=maturity&is=E&group=Wing');
    expect(groups.map(({ value, mass }) => [value, mass])).toEqual([
      ['C', 80],
      ['E', 60],
      ['', 10],
    ]);
  });

  it('give the rows of each when its value is asked for', async () => {
    for (const by of ['own:Supplier', 'maturity', 'category', 'counting', 'part_number'] as const) {
      const { groups } = await groupsOf(by);
      for (const { value, rows, memoRows } of groups) {
        const asked = new URLSearchParams({ where: by, is: value });
        expect(await itemsOf(asked.toString())).toHaveLength(rows + memoRows);
      }
    }
  });

  it('tell the heaviest of very many values, and how many there are', async () => {
    const rows = Array.from({ length: 700 }, (_, k) => `N${k},${k + 1},1,0,0,L${k}`);
    const many = await revise('many', {}, `item,mass,x,y,z,Lot\n${rows.join('\n')}\n`);
    const { of, groups, whole } = await groupsOf('own:Lot', '', many);
    expect([of, groups.length, groups[0]?.value, groups[499]?.mass]).toEqual([700, 500, 'L699', 201]);
    expect(whole).toMatchObject({ rows: 700, mass: 245_350 });
  });
});

describe('The export of a view', () => {
  async function exported(address: string, marking: string | null = null): Promise<string> {
    const params = new URLSearchParams(address);
    let text = '';
    for await (const piece of exportRows(
      test.db,
      revision,
      listViewOf(params),
      marking,
      exportColumnsOf(params),
    ))
      text += piece;
    return text;
  }

  async function read(text: string): Promise<Component[]> {
    const components: Component[] = [];
    const reading = await readMassList(Readable.from([Buffer.from(text)]), revision.declarations, {
      onComponent: (component) => {
        components.push(component);
      },
    });
    expect(reading.problems).toEqual([]);
    return components;
  }

  it('reads back as the same components', async () => {
    const [first, again] = [await read(CSV), await read(await exported(''))];
    expect(again).toStrictEqual(first);
  });

  it('holds the rows that the view shows, in its order', async () => {
    const components = await read(await exported('group=Wing&sort=-mass'));
    expect(components.map(({ item }) => item)).toEqual(['P-5', 'P-1', 'P-2', 'P-3']);
  });

  it('has every column, or those asked for in their order, the list’s own among them', async () => {
    expect((await exported('')).split('\r\n')[0]).toMatch(/^item,.*,note,Supplier$/);
    const asked = 'column=item&column=own:Supplier&column=mass&column=mass&column=position&column=nonsense';
    const lines = (await exported(`${asked}&group=Wing&sort=mass`, 'Level 2')).split('\r\n');
    expect(lines).toEqual([
      'item,Supplier,mass,marking',
      'P-3,,2.5,Level 2',
      'P-2,Tern Metals,30,Level 2',
      'P-1,Tern Metals,40,Level 2',
      'P-5,,999,Level 2',
      '',
    ]);
    expect(await exported('column=own:Supplier&column=description&find=P-6')).toContain("\r\n,'=SUM(A1)\r\n");
  });

  it('neutralises texts that a spreadsheet would run', async () => {
    expect(await exported('find=P-6')).toContain(",'=SUM(A1),");
  });

  it('carries the marking of a marked list in every row', async () => {
    const lines = (await exported('', 'Skerry proprietary, level 2')).trimEnd().split('\r\n');
    expect(lines[0]).toMatch(/,marking$/);
    expect(lines).toHaveLength(7);
    for (const line of lines.slice(1)) expect(line).toMatch(/,"Skerry proprietary, level 2"$/);
  });
});
