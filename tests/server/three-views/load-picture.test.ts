import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration } from '@/db/queries/configurations';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { loadPicture } from '@/lib/server/three-views/load-picture';
import { loadViews } from '@/lib/server/three-views/load-views';
import { configurationSource, type ViewsSource } from '@/lib/server/three-views/sources';
import { ON_BOARD } from '@/lib/three-views/group-key';
import { piecesOf } from '@/lib/three-views/picture';
import { sumsOf } from '@/lib/three-views/sums';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/* Invented rows. */
const WING = `item,group,category,counting,quantity,mass,x,y,z,symmetry
spar,Wing/Spars,empty,counted,1,120,6.4,2.5,1.2,pair
rib,Wing/Ribs,empty,counted,6,2,6.8,3.0,1.2,pair
clip,Wing/Ribs,empty,counted,1,0.5,6.9,3.1,1.2,
bolt,Wing/Ribs,empty,counted,1,0.25,6.95,3.15,1.2,
wing,Wing,empty,memo,1,265,6.5,0,1.2,
oil,Engine,operating,counted,1,9,5,2,1,
`;
const CHANGES = `item,group,mass,x,y,z,change_ref,status
less spar,Wing/Spars,-3,6.4,2.5,1.2,C-1,approved
less rib,Wing/Ribs,-1,6.8,3,1.2,C-2,pending
`;

let test: ProgramUnderTest;
let source: ViewsSource;

beforeAll(async () => {
  test = await programUnderTest();
  const { db, program, crew } = test;
  await reviseList(test, crew.weights, 'wing', WING);
  await reviseList(test, crew.weights, 'changes', CHANGES, { kind: 'adjustments' });
  await createConfiguration(db, {
    person: crew.weights,
    programId: program.id,
    buildCode: 'design',
    code: 'drawn',
    title: 'Drawn',
  });
  const drawn = await findConfiguration(db, program.id, 'drawn');
  if (drawn === undefined) throw new Error('no configuration');
  // Adjustments are not taken unasked.
  await pinRevisions(db, {
    person: crew.weights,
    configuration: drawn,
    version: drawn.version,
    revisions: { wing: 1, changes: 1 },
    rotors: null,
  });
  source = await configurationSource(db, program.id, 'drawn');
});

afterAll(() => test.close());

const EVERYTHING = { list: null, group: '', category: null } as const;

function firstCondition(): ViewsSource['conditions'][number] {
  const [condition] = source.conditions;
  if (condition === undefined) throw new Error('the configuration has no condition');
  return { ...condition, categories: ['empty'] };
}

describe('the picture of a configuration', () => {
  it('holds the counted, approved rows of the condition, and says what it leaves out', async () => {
    const { rows, left } = await loadPicture(test.db, source, firstCondition(), EVERYTHING);
    expect(rows.map(({ item, mass, places }) => [item, mass, places.length])).toEqual([
      ['spar', 120, 2],
      ['rib', 12, 2],
      ['less spar', -3, 1],
      ['clip', 0.5, 1],
      ['bolt', 0.25, 1],
    ]);
    expect(left).toEqual({ memo: 1, waiting: 1, ashore: 1, inCells: null, uncategorised: 0 });
  });

  it('sums to the condition, lighter rows taken together by cells or not', async () => {
    const condition = firstCondition();
    const wanted = 2 * 120 + 2 * 12 - 3 + 0.5 + 0.25;
    for (const most of [1, 2, 3, 100]) {
      const picture = await loadPicture(test.db, source, condition, EVERYTHING, most);
      const pieces = piecesOf(picture.rows);
      const { mass, cg } = sumsOf(pieces, source.geometry.reference);
      expect(mass).toBeCloseTo(wanted, 9);
      // By hand: only the single rows lie off the plane of symmetry.
      expect((cg ?? [])[1]).toBeCloseTo((-3 * 2.5 + 0.5 * 3.1 + 0.25 * 3.15) / wanted, 9);
      expect(picture.rows.reduce((sum, { rows }) => sum + rows, 0)).toBe(5);
    }
    const two = await loadPicture(test.db, source, condition, EVERYTHING, 2);
    expect(two.left.inCells).toMatchObject({ rows: 3 });
    // What is taken away is never netted with what is there.
    expect(two.rows.filter(({ cell }) => cell).map(({ mass, rows }) => [mass, rows])).toEqual([
      [-3, 1],
      [0.75, 2],
    ]);
  });

  it('keeps its bounds and the size of its marks when a filter leaves rows out', async () => {
    const whole = await loadPicture(test.db, source, firstCondition(), EVERYTHING);
    const ribs = await loadPicture(test.db, source, firstCondition(), { ...EVERYTHING, group: 'Wing/Ribs' });
    expect(ribs.rows.map(({ item }) => item)).toEqual(['rib', 'clip', 'bolt']);
    expect([ribs.bounds, ribs.radiusOfOne]).toEqual([whole.bounds, whole.radiusOfOne]);
    const changes = await loadPicture(test.db, source, firstCondition(), { ...EVERYTHING, list: 'changes' });
    expect(changes.rows.map(({ item }) => item)).toEqual(['less spar']);
  });

  it('draws items on board with the rows, by category where they have one', async () => {
    const items = [
      { name: 'Pilot', category: 'operating', mass: 86, position: [4, 0, 1] },
      { name: 'Freight', category: null, mass: 50, position: [7, 0, 1] },
    ] as const;
    const condition = { ...firstCondition(), categories: ['empty', 'operating'] as const, items };
    const names = async (filter: Parameters<typeof loadPicture>[3]) =>
      (await loadPicture(test.db, source, condition, filter)).rows.map(({ item }) => item);
    expect(await names({ ...EVERYTHING, list: ON_BOARD })).toEqual(['Pilot', 'Freight']);
    expect(await names({ ...EVERYTHING, category: 'operating' })).toEqual(['oil', 'Pilot']);
    const { left } = await loadPicture(test.db, source, condition, { ...EVERYTHING, category: 'operating' });
    expect(left.uncategorised).toBe(1);
  });

  it('is that of the first condition where the address names none that there is', async () => {
    const asked = { condition: 'no-such', list: null, within: '', category: null };
    const views = await loadViews(test.db, source, asked);
    expect(views?.condition.code).toBe(source.conditions[0]?.code);
    expect(views?.groups).toEqual(['Engine', 'Wing', 'Wing/Ribs', 'Wing/Spars']);
    expect(await loadViews(test.db, { ...source, revisions: [] }, asked)).toBeNull();
  });
});
