import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { sql } from 'kysely';
import { findImport, findList, findRevision, type List, revisionsOfList } from '@/db/queries/lists';
import { type JobRunner, startRunner } from '@/lib/server/jobs/runner';
import { TASKS } from '@/lib/server/jobs/task-list';
import { listDeclarationsSchema, declarationsFromBody } from '@/lib/contracts/list-declarations';
import { cancelImport } from '@/lib/server/lists/cancel-import';
import { addList, saveList } from '@/lib/server/lists/save-list';
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

async function listNow(code: string): Promise<List> {
  const found = await findList(test.db, test.program.id, code);
  if (found === undefined) throw new Error(`no list ${code}`);
  return found;
}

async function cancel(list: { code: string }, id: string): Promise<void> {
  const found = await findImport(test.db, id);
  if (found === undefined) throw new Error(`no import ${id}`);
  await cancelImport(test.db, { person: test.crew.weights, list: await listNow(list.code), found });
}

/** Every row version of a list, whatever revision it belongs to. */
async function storedRowsOf(listId: string): Promise<number> {
  const { count } = await test.db
    .selectFrom('row_versions')
    .innerJoin('lists', 'lists.list_no', 'row_versions.list_no')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('lists.id', '=', listId)
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

  it(
    'that is killed again and again, at whatever moment, is none or one whole revision in the end',
    { timeout: 180_000 },
    async () => {
      const rows = 40_000;
      const list = await newList();
      const id = await upload(test, test.crew.weights, list, longList(rows));
      for (const moment of [0, 0.2, 0.5, 0.8, 0.99]) {
        const process = startJobProcess(test);
        processes.push(process);
        await waitForImport(
          test,
          id,
          (found) => settled(found) || (found.state === 'running' && found.rows_done >= moment * rows),
        );
        await process.kill();
        const { last_revision } = await listNow(list.code);
        expect(await storedRowsOf(list.id)).toBe(last_revision === 0 ? 0 : rows);
        // The next one begins to count anew.
        await test.db.updateTable('imports').set({ rows_done: 0 }).where('state', '=', 'running').execute();
      }
      processes.push(startJobProcess(test));
      const end = await waitForImport(test, id, settled);
      expect(end).toMatchObject({ state: 'done', revision_number: 1 });
      expect(await storedRowsOf(list.id)).toBe(rows);
      expect(await listNow(list.code)).toMatchObject({ last_revision: 1 });
    },
  );

  it(
    'is one of many that two processes share: each makes its revision once',
    { timeout: 120_000 },
    async () => {
      const lists = await Promise.all([newList(), newList(), newList(), newList(), newList(), newList()]);
      const ids: string[] = [];
      for (const [k, list] of lists.entries())
        ids.push(
          await upload(
            test,
            k % 2 === 0 ? test.crew.weights : test.crew.weights2,
            list,
            longList(15_000, k + 1),
          ),
        );
      const begun = new Date();
      processes.push(startJobProcess(test), startJobProcess(test));
      const busy = new Set<number>();
      for (let left = ids; left.length > 0;) {
        const { rows } = await sql<{ lease: number }>`
          select distinct w.lease from graphile_worker.jobs j join job_workers w on w.worker_id = j.locked_by
            or starts_with(j.locked_by, w.worker_id)
          where w.started_at >= ${begun}
        `.execute(test.db);
        for (const { lease } of rows) busy.add(lease);
        const open = await test.db
          .selectFrom('imports')
          .select('id')
          .where('id', 'in', left)
          .where('state', 'in', ['waiting', 'running'])
          .execute();
        left = open.map((one) => one.id);
      }
      expect(busy.size).toBe(2);
      for (const list of lists) {
        expect(await listNow(list.code)).toMatchObject({ last_revision: 1 });
        expect(await storedRowsOf(list.id)).toBe(15_000);
      }
    },
  );

  it('that is called off while it waits is left alone by whoever takes the job', async () => {
    const list = await newList();
    const id = await upload(test, test.crew.weights, list, longList(10));
    await cancel(list, id);
    await runJobsHere();
    const later = await upload(test, test.crew.weights, list, longList(3));
    await waitForImport(test, later, settled);
    expect(await findImport(test.db, id)).toMatchObject({ state: 'cancelled', revision_id: null });
    expect(await listNow(list.code)).toMatchObject({ last_revision: 1 });
    await expect(cancel(list, later)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('that is called off while it runs stops, stores nothing and lets the next one through', async () => {
    const list = await newList();
    const id = await upload(test, test.crew.weights, list, longList(60_000));
    await runJobsHere();
    await waitForImport(test, id, ({ rows_done }) => rows_done > 0);
    await cancel(list, id);
    const later = await upload(test, test.crew.weights, list, longList(3));
    expect(await waitForImport(test, later, settled)).toMatchObject({ state: 'done', revision_number: 1 });
    expect(await findImport(test.db, id)).toMatchObject({ state: 'cancelled', revision_id: null });
    expect(await storedRowsOf(list.id)).toBe(3);
  });

  it('of the file in force makes no new revision; of the same file after another, or read otherwise, it does', async () => {
    const list = await newList();
    await runJobsHere();
    const read = async (csv: string) => {
      const id = await upload(test, test.crew.weights, list, csv);
      return waitForImport(test, id, settled);
    };
    expect(await read(longList(5))).toMatchObject({ revision_number: 1, unchanged: false });
    expect(await read(longList(5))).toMatchObject({
      state: 'done',
      revision_number: 1,
      unchanged: true,
      rows_done: 5,
    });
    expect(await read(longList(6))).toMatchObject({ revision_number: 2, unchanged: false });
    expect(await read(longList(5))).toMatchObject({ revision_number: 3, unchanged: false });
    await saveList(test.db, {
      person: test.crew.weights,
      programId: test.program.id,
      code: list.code,
      title: list.code,
      declarations: { ...declarations, massUnit: 'lb' },
    });
    expect(await read(longList(5))).toMatchObject({ revision_number: 4, unchanged: false });
  });

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
