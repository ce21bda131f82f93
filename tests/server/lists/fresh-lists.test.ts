import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findList, findRevision } from '@/db/queries/lists';
import { pageOfView } from '@/db/queries/list-rows';
import { compareRevisions } from '@/lib/server/lists/compare-revisions';
import { programUnderTest, type ProgramUnderTest, reviseList } from '@/tests/support/program';
import { longList } from './uploads';

const ROWS = 60_000;
/** What takes seconds at most takes minutes where a plan looks through the list for each of its rows. */
const SOON = 20_000;
let test: ProgramUnderTest;

beforeAll(async () => {
  test = await programUnderTest();
  const owner = new pg.Client({ connectionString: test.ownerUrl });
  await owner.connect();
  await owner.query('alter table row_versions set (autovacuum_enabled = off)');
  await owner.query('alter table row_ends set (autovacuum_enabled = off)');
  for (let k = 0; k < 4; k += 1)
    for (const mass of [2, 3]) await reviseList(test, test.crew.weights, `known-${k}`, longList(300, mass));
  await owner.query('analyze row_versions, row_ends');
  await owner.end();
});
afterAll(() => test.close());

/** A tenth of the rows weighs otherwise. */
const second = longList(ROWS)
  .split('\r\n')
  .map((line, k) => (k % 10 === 5 ? line.replace(',2,', ',3,') : line))
  .join('\r\n');

describe('A list that the database has no statistics of yet', () => {
  it('is revised, shown and compared as soon as one that it knows', { timeout: 4 * SOON }, async () => {
    const start = performance.now();
    await reviseList(test, test.crew.weights, 'fresh', longList(ROWS));
    await reviseList(test, test.crew.weights, 'fresh', second);
    const list = await findList(test.db, test.program.id, 'fresh');
    const [one, two] = await Promise.all(
      [1, 2].map((number) => findRevision(test.db, list?.id ?? '', number)),
    );
    if (one === undefined || two === undefined) throw new Error('no revisions');
    const page = await pageOfView(
      test.db,
      two.id,
      { text: '', groups: null, only: null, category: null, counting: null, items: null },
      { column: 'mass', descending: true },
      { offset: 0, limit: 5 },
    );
    expect(page.rows.map(({ mass }) => mass)).toEqual([3, 3, 3, 3, 3]);
    const { counts } = await compareRevisions(test.db, one, two, { offset: 0, limit: 10 });
    expect(counts).toEqual({ added: 0, removed: 0, changed: ROWS / 10 });
    expect(performance.now() - start).toBeLessThan(3 * SOON);
  });
});
