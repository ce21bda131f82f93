import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { findList, findRevision, revisionsOfList } from '@/db/queries/lists';
import { type JobRunner, startRunner } from '@/lib/server/jobs/runner';
import { TASKS } from '@/lib/server/jobs/task-list';
import { listDeclarationsSchema, declarationsFromBody } from '@/lib/contracts/list-declarations';
import { addList } from '@/lib/server/lists/save-list';
import { OPEN_IMPORTS } from '@/lib/server/lists/request-import';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { longList, settled, startJobProcess, upload, waitForImport } from './uploads';

let test: ProgramUnderTest;
let made = 0;
const processes: { readonly kill: () => Promise<void> }[] = [];
let runner: JobRunner | null = null;

beforeAll(async () => {
  test = await programUnderTest();
});
afterEach(async () => {
  await Promise.all(processes.splice(0).map((one) => one.kill()));
  await runner?.stop();
  runner = null;
});
afterAll(() => test.close());

const declarations = declarationsFromBody(
  listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
);

async function newList(): Promise<{ id: string; code: string }> {
  const code = `list-${(made += 1)}`;
  const { id } = await addList(test.db, {
    person: test.crew.weights,
    programId: test.program.id,
    code,
    title: code,
    declarations,
  });
  return { id, code };
}

async function runJobsHere(): Promise<void> {
  runner = await startRunner({ databaseUrl: test.appUrl, pool: test.pool, db: test.db, tasks: TASKS });
}

async function storedRowsOf(listId: string): Promise<number> {
  const { count } = await test.db
    .selectFrom('mass_rows')
    .innerJoin('list_revisions', 'list_revisions.id', 'mass_rows.revision_id')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('list_id', '=', listId)
    .executeTakeFirstOrThrow();
  return count;
}

describe('An import', () => {
  it(
    'that is killed in the middle becomes exactly one whole revision after a restart',
    { timeout: 90_000 },
    async () => {
      const rows = 60_000;
      const list = await newList();
      const id = await upload(test, test.crew.weights, list, longList(rows));
      const first = startJobProcess(test, 'stall');
      processes.push(first);
      const middle = await waitForImport(test, id, ({ rows_done }) => rows_done > 0);
      await first.kill();
      expect(middle.state).toBe('running');
      expect(middle.rows_done).toBeLessThan(rows);
      expect(await findRevision(test.db, list.id, 1)).toBeUndefined();
      expect(await storedRowsOf(list.id)).toBe(0);

      processes.push(startJobProcess(test));
      const end = await waitForImport(test, id, settled);
      expect(end).toMatchObject({ state: 'done', rows_done: rows, of_rows: rows, revision_number: 1 });
      const revisions = await revisionsOfList(test.db, list.id);
      expect(revisions.map(({ number, rows: held, pieces }) => ({ number, held, pieces }))).toEqual([
        { number: 1, held: rows, pieces: rows },
      ]);
      expect(await storedRowsOf(list.id)).toBe(rows);
    },
  );

  it('of a wrong file names the problems and leaves the revision in force', async () => {
    const list = await newList();
    await runJobsHere();
    const right = await upload(test, test.crew.weights, list, longList(3));
    await waitForImport(test, right, settled);
    const wrong = await upload(
      test,
      test.crew.weights,
      list,
      'item,mass,x,y,z\r\nA,"12,4.5",0,0,0\r\nA,1,0,0,0\r\n',
    );
    const end = await waitForImport(test, wrong, settled);
    expect(end).toMatchObject({
      state: 'failed',
      revision_id: null,
      failure: null,
      problem_counts: { 'not-a-number': 1, 'duplicate-item': 1 },
    });
    expect(end.problems).toMatchObject([
      { line: 2, column: 'mass', found: '12,4.5' },
      { line: 3, column: 'item', found: 'A' },
    ]);
    expect(await findList(test.db, test.program.id, list.code)).toMatchObject({ last_revision: 1 });
    expect(await storedRowsOf(list.id)).toBe(3);
  });

  it('asked for at the same time as another keeps the order of the two, though the second is shorter', async () => {
    const list = await newList();
    const [long, short] = [
      await upload(test, test.crew.weights, list, longList(4_000), 'the long one'),
      await upload(test, test.crew.weights2, list, longList(2), 'the short one'),
    ];
    await runJobsHere();
    const ends = await Promise.all([waitForImport(test, long, settled), waitForImport(test, short, settled)]);
    expect(ends.map(({ revision_number }) => revision_number)).toEqual([1, 2]);
    const revisions = await revisionsOfList(test.db, list.id);
    expect(revisions.map(({ reason, rows, author }) => ({ reason, rows, author }))).toEqual([
      { reason: 'the short one', rows: 2, author: 'weights2' },
      { reason: 'the long one', rows: 4_000, author: 'weights' },
    ]);
  });

  it('is refused while as many of the same person are under way as may be', async () => {
    const list = await newList();
    const ids: string[] = [];
    for (let k = 0; k < OPEN_IMPORTS; k += 1)
      ids.push(await upload(test, test.crew.weights, list, longList(1, k + 1)));
    await expect(upload(test, test.crew.weights, list, longList(1))).rejects.toMatchObject({
      code: 'too-many-requests',
    });
    await runJobsHere();
    for (const id of ids) await waitForImport(test, id, settled);
    await expect(upload(test, test.crew.weights, list, longList(1))).resolves.toBeTypeOf('string');
  });
});
