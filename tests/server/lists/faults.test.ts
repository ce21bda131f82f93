import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb, createPool, type Db } from '@/db/client';
import { findImport, findList } from '@/db/queries/lists';
import { migrateToLatest } from '@/db/migrate';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { anyFreePort } from '@/lib/server/commands/local/ports.mjs';
import {
  clusterAt,
  createCluster,
  startCluster,
  stopCluster,
} from '@/lib/server/commands/local/postgres.mjs';
import {
  APP,
  createDatabase,
  databaseUrl,
  ensureRoles,
  OWNER,
  withClient,
} from '@/lib/server/commands/local/roles.mjs';
import { randomText } from '@/lib/server/commands/local/secrets.mjs';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { importFile } from '@/lib/server/lists/import-file';
import { addList } from '@/lib/server/lists/save-list';
import { openObject } from '@/lib/server/storage/open-object';
import { bigListText } from '@/tests/bench/big-list';
import { TEMPLATE } from '@/tests/support/cluster';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { longList, upload } from './uploads';

/* A database of this file's own, which it may stop and start. */
let home: string;
let cluster: ReturnType<typeof clusterAt>;
let port: number;
let test: ProgramUnderTest;
/** Connections that are lost on purpose. */
let pool: pg.Pool;
let db: Db;
const lost: Error[] = [];
const given = process.env['POLHODE_TEST_CLUSTER'];
let made = 0;

beforeAll(async () => {
  home = mkdtempSync(path.join(os.tmpdir(), 'polhode-faults-'));
  chmodSync(home, 0o711);
  cluster = clusterAt(path.join(home, 'cluster'));
  const passwords = { superuser: randomText(), owner: randomText(), app: randomText() };
  createCluster(cluster, { password: passwords.superuser, durable: false });
  port = await anyFreePort();
  startCluster(cluster, port, { durable: false });
  const settings = { port, ...passwords };
  process.env['POLHODE_TEST_CLUSTER'] = JSON.stringify(settings);
  await withClient(superuserUrl(settings), async (client) => {
    await ensureRoles(client, passwords);
    await createDatabase(client, TEMPLATE);
  });
  await migrateToLatest(databaseUrl(OWNER, passwords.owner, port, TEMPLATE), APP);
  test = await programUnderTest();
  pool = createPool(test.appUrl, 6, (error) => lost.push(error));
  db = createDb(pool);
}, 120_000);
afterAll(async () => {
  await db.destroy();
  await test.close();
  stopCluster(cluster, 'immediate');
  rmSync(home, { recursive: true });
  process.env['POLHODE_TEST_CLUSTER'] = given;
});

async function newList(): Promise<{ id: string; code: string }> {
  const code = `list-${(made += 1)}`;
  const declarations = declarationsFromBody(
    listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
  );
  const { id } = await addList(db, {
    person: test.crew.weights,
    programId: test.program.id,
    code,
    title: code,
    declarations,
  });
  return { id, code };
}

const asked = (list: { id: string; code: string }, csv: string): Promise<string> =>
  upload({ ...test, db }, test.crew.weights, list, csv);

const run = (id: string, open: typeof openObject = openObject): Promise<void> =>
  importFile({ pool, db, openObject: (sha256) => open(sha256) }, id);

async function stateOf(list: { code: string }, id: string) {
  const found = await findImport(db, id);
  const { last_revision } = (await findList(db, test.program.id, list.code)) ?? {};
  const { count } = await db
    .selectFrom('row_versions')
    .innerJoin('lists', 'lists.list_no', 'row_versions.list_no')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('lists.code', '=', list.code)
    .executeTakeFirstOrThrow();
  return { state: found?.state, revision: last_revision, rows: count, found };
}

/** The object's bytes, with something done once part of them has come. */
function interrupted(after: number, interrupt: () => void | Promise<void>): typeof openObject {
  return (async (sha256: string) => {
    const bytes = await openObject(sha256);
    return (async function* () {
      let read = 0;
      let done = false;
      for await (const piece of bytes as AsyncIterable<Uint8Array>) {
        yield piece;
        read += piece.length;
        if (done || read < after) continue;
        done = true;
        await interrupt();
      }
    })();
  }) as unknown as typeof openObject;
}

/** Runs into a fault, finds nothing of it stored, then runs again as the queue would. */
async function survives(
  fault: (list: { id: string; code: string }, id: string) => Promise<void>,
): Promise<void> {
  const list = await newList();
  const id = await asked(list, longList(40_000));
  await fault(list, id);
  expect(await stateOf(list, id)).toMatchObject({ state: 'running', revision: 0, rows: 0 });
  await run(id);
  expect(await stateOf(list, id)).toMatchObject({ state: 'done', revision: 1, rows: 40_000 });
}

describe('An import', { timeout: 120_000 }, () => {
  // A hundred thousand rows here; `npm run bench` does it with a million and weighs the memory.
  it('of a file whose very last row is wrong stores nothing and names that row', async () => {
    const list = await newList();
    const rows = 100_000;
    const id = await asked(list, [...bigListText({ rows, seed: 5, spoiled: true })].join(''));
    await run(id);
    const { found, ...end } = await stateOf(list, id);
    expect(end).toEqual({ state: 'failed', revision: 0, rows: 0 });
    expect(found?.problems).toMatchObject([
      { kind: 'not-a-number', line: rows + 1, column: 'mass', found: '1.2.3' },
    ]);
  });

  it('whose store breaks off in the middle is none, and whole when it is tried again', async () => {
    await survives(async (_, id) => {
      const broken = interrupted(400_000, () => {
        throw new Error('the connection to the store was reset');
      });
      await expect(run(id, broken)).rejects.toThrow('was reset');
    });
  });

  it('whose file is gone from the store is none', async () => {
    const list = await newList();
    const id = await asked(list, longList(500));
    const other = await asked(await newList(), longList(500, 3));
    const wrong = ((sha256: string) => {
      expect(sha256).toMatch(/^[0-9a-f]{64}$/);
      return openObject(sha256.replace(/^./, (digit) => (digit === '0' ? '1' : '0')));
    }) as typeof openObject;
    await expect(run(id, wrong)).rejects.toMatchObject({ code: 'not-found' });
    expect(await stateOf(list, id)).toMatchObject({ state: 'running', revision: 0, rows: 0 });
    await run(other);
  });

  it('whose database restarts in the middle is none, and whole when it is tried again', async () => {
    await survives(async (_, id) => {
      const restart = interrupted(400_000, () => {
        stopCluster(cluster, 'immediate');
        startCluster(cluster, port, { durable: false });
      });
      await expect(run(id, restart)).rejects.toThrow();
      expect(lost.length).toBeGreaterThan(0);
    });
  });

  it('that meets a full disk is none, and whole when there is room again', async () => {
    await survives(async (_, id) => {
      const owner = new pg.Client({ connectionString: test.ownerUrl });
      await owner.connect();
      await owner.query(`
        create function disk_full() returns trigger language plpgsql as $$
        begin raise exception 'could not extend file: No space left on device' using errcode = 'disk_full'; end $$;
        create trigger disk_full before insert on row_versions for each row when (new.row_no = 30000) execute function disk_full();
      `);
      await expect(run(id)).rejects.toMatchObject({ code: '53100' });
      await owner.query('drop function disk_full cascade');
      await owner.end();
    });
  });

  it('of the same list as another at the same time waits for it: both are kept, one held against the other', async () => {
    const list = await newList();
    const [one, two] = [await asked(list, longList(20_000)), await asked(list, longList(20_001))];
    await Promise.all([run(one), run(two)]);
    const ends = [(await stateOf(list, one)).found, (await stateOf(list, two)).found];
    expect(ends.map((end) => end?.state)).toEqual(['done', 'done']);
    expect(ends.map((end) => end?.revision_number).sort()).toEqual([1, 2]);
    // What both have is stored once.
    expect(await stateOf(list, one)).toMatchObject({ revision: 2, rows: 20_001 });
  });

  it('that two processes take at once is made once', async () => {
    const list = await newList();
    const id = await asked(list, longList(5_000));
    await Promise.all([run(id), run(id)]);
    expect(await stateOf(list, id)).toMatchObject({ state: 'done', revision: 1, rows: 5_000 });
  });
});
