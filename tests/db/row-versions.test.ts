import { createHash, randomBytes } from 'node:crypto';
import { readdirSync } from 'node:fs';
import path from 'node:path';
import { Kysely, Migrator, type Migration, PostgresDialect, sql } from 'kysely';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb, createPool, type Db } from '@/db/client';
import { migrateToLatest } from '@/db/migrate';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { contentHead, contentLine } from '@/lib/server/lists/content-hash';
import { hashRevision } from '@/lib/server/lists/hash-revision';
import { publishRevision } from '@/lib/server/lists/publish-revision';
import { SIGMA_FIELDS } from '@/lib/server/lists/row-codec';
import { storedRows } from '@/lib/server/lists/stored-rows';
import { APP, createDatabase, databaseUrl, OWNER, withClient } from '@/lib/server/commands/local/roles.mjs';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { testCluster } from '@/tests/support/cluster';
import { aComponent, declarations as aList } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';

/* A database of the released shape with revisions of a list, through the migrations that came after. */
const RELEASED = '2026-12-01T1230-baselines';
const MIGRATIONS = path.join(import.meta.dirname, '../../migrations');
const name = `test_${randomBytes(6).toString('hex')}`;
const declarations: ListDeclarations = aList();
const random = randomNumbers(11);

/** Rows whose figures are no short decimals, some with everything that a row can say. */
function row(item: string, said: Partial<Component> = {}): Component {
  const isFull = random() < 0.4;
  return aComponent({
    item,
    mass: 1 + random(),
    position: [random() * 10, random() - 0.5, random()],
    group: random() < 0.5 ? 'Wing/Spars' : 'Tail',
    ...(isFull
      ? {
          description: 'Rib, "aft"\nsecond line',
          growth: random() / 10,
          sigma: { ...NO_SIGMA, mass: random() / 100, z: 0 },
          maturity: 'C',
          extra: { Zone: '12', 'Bay "B"': 'é' },
        }
      : {}),
    ...said,
  });
}

const NO_SIGMA = {
  mass: null,
  x: null,
  y: null,
  z: null,
  ixx: null,
  iyy: null,
  izz: null,
  ixy: null,
  ixz: null,
  iyz: null,
};

const first = Array.from({ length: 60 }, (_, k) => row(`P-${k}`));
const without = (rows: readonly Component[], item: string): Component[] =>
  rows.filter((one) => one.item !== item);
const second = without(first, 'P-9').map((one) => (one.item === 'P-30' ? { ...one, mass: 7 } : one));
second.splice(20, 0, row('N-1'), row('N-2'));
const third = [...second.slice(40), ...second.slice(0, 40)];
const fourth = [row('B-0'), ...third, row('P-9')];
const HISTORY = [first, second, third, third, fourth, [row('alone')], first];

let db: Db;
let pool: pg.Pool;
const ids = HISTORY.map((_, k) => `r${k + 1}`);

beforeAll(async () => {
  const cluster = testCluster();
  await withClient(superuserUrl(cluster), (client) => createDatabase(client, name));
  const ownerUrl = databaseUrl(OWNER, cluster.owner, cluster.port, name);
  const owner = new Kysely<unknown>({
    dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: ownerUrl, max: 1 }) }),
  });
  const { error } = await new Migrator({ db: owner, provider: { getMigrations } }).migrateTo(RELEASED);
  expect(error).toBeUndefined();
  await fill(owner);
  await owner.destroy();
  await migrateToLatest(ownerUrl, APP);
  pool = createPool(databaseUrl(APP, cluster.app, cluster.port, name), 4, (failure) => {
    throw failure;
  });
  db = createDb(pool);
}, 120_000);
afterAll(async () => {
  await db.destroy();
  await withClient(superuserUrl(testCluster()), async (client) => {
    await client.query(`drop database ${client.escapeIdentifier(name)} with (force)`);
  });
});

async function getMigrations(): Promise<Record<string, Migration>> {
  const files = readdirSync(MIGRATIONS).sort();
  const loaded = files.map(async (file) => [
    file.slice(0, -3),
    (await import(path.join(MIGRATIONS, file))) as Migration,
  ]);
  return Object.fromEntries(await Promise.all(loaded)) as Record<string, Migration>;
}

function hashOf(rows: readonly Component[]): string {
  const hash = createHash('sha256').update(contentHead(declarations));
  for (const one of rows) hash.update(contentLine(one));
  return hash.digest('hex');
}

async function fill(owner: Kysely<unknown>): Promise<void> {
  const stated = JSON.stringify(declarations);
  await sql`
    insert into users (id, email, name) values ('u', 'weights@skerry.example', 'Weights');
    insert into programs (id, code, title, created_by) values ('p', 'hopper', 'Hopper', 'u');
    insert into frame_issues (id, program_id, number, title, axis_x, axis_y, axis_z, lemac, mac, span, length, lateral_plane,
      incidence, reference, valid_from, reason, created_by)
    values ('f', 'p', 1, 'First', 'aft', 'right', 'up', '{6,0,1}', 2, 18, 15, 0, 0, '{6.5,0,1}', '2026-01-05', 'first', 'u');
    insert into lists (id, program_id, code, title, frame_issue_id, declarations, last_revision, created_by)
    values ('l', 'p', 'wing', 'Wing', 'f', ${sql.lit(stated)}, ${sql.lit(HISTORY.length)}, 'u'),
      ('l2', 'p', 'tail', 'Tail', 'f', ${sql.lit(stated)}, 0, 'u');
  `.execute(owner);
  for (const [k, rows] of HISTORY.entries()) {
    await owner.transaction().execute(async (trx) => {
      await sql`
        insert into mass_rows select * from jsonb_populate_recordset(null::mass_rows, ${JSON.stringify(rows.map((one, at) => oldRow(ids[k] ?? '', at + 1, one)))}::jsonb)
      `.execute(trx);
      await sql`
        insert into list_revisions (id, list_id, number, declarations, origin, reason, content_sha256, rows, memo_rows, pieces, findings, created_by)
        values (${ids[k]}, 'l', ${k + 1}, ${stated}, 'edit', 'as released', ${hashOf(rows)}, ${rows.length}, 0, ${rows.length}, '[]', 'u')
      `.execute(trx);
    });
  }
}

function oldRow(revision: string, position: number, one: Component): Record<string, unknown> {
  const { position: place, moments, orientation, sigma, extra } = one;
  return {
    revision_id: revision,
    position,
    line: position + 1,
    item: one.item,
    part_number: one.partNumber,
    part_revision: one.partRevision,
    description: one.description,
    group_path: one.group,
    category: one.category,
    parent: one.parent,
    counting: one.counting,
    quantity: one.quantity,
    mass: one.mass,
    x: place[0],
    y: place[1],
    z: place[2],
    ...moments,
    ...orientation,
    pair: one.pair,
    maturity: one.maturity,
    growth: one.growth,
    sigma: sigma === null ? null : SIGMA_FIELDS.map((field) => sigma[field]),
    source: one.source,
    source_date: one.sourceDate,
    note: one.note,
    change_ref: one.changeRef,
    status: one.status,
    extra: Object.keys(extra).length === 0 ? null : extra,
  };
}

async function itemsOf(revisionId: string): Promise<string[]> {
  const items: string[] = [];
  for await (const { item } of storedRows(db, revisionId)) items.push(item);
  return items;
}

describe('A database with rows of the released shape', () => {
  it('comes through with every revision as it was, to the last bit and in its order', async () => {
    for (const [k, rows] of HISTORY.entries()) {
      const id = ids[k] ?? '';
      expect(await itemsOf(id)).toEqual(rows.map(({ item }) => item));
      expect(await hashRevision(db, id, createHash('sha256'))).toBe(hashOf(rows));
    }
  });

  it('tells them by the view as it did by the table', async () => {
    const rows = await db
      .selectFrom('mass_rows')
      .select(['item', 'mass'])
      .where('revision_id', '=', 'r5')
      .orderBy('position')
      .execute();
    expect(rows).toEqual(fourth.map(({ item, mass }) => ({ item, mass })));
  });

  it('keeps once what did not change', async () => {
    const ranges = await db
      .selectFrom('list_revisions')
      .select(['number', 'last_row', 'last_end'])
      .orderBy('number')
      .execute();
    // 60 rows; 3 begin and 2 end; all but those of equal rank are new; nothing; 2 begin; 1 instead of all; 60 instead of it.
    expect(ranges.slice(0, 2)).toEqual([
      { number: 1, last_row: 60, last_end: 0 },
      { number: 2, last_row: 63, last_end: 2 },
    ]);
    const [, , before, same] = ranges;
    expect(same).toEqual({ ...before, number: 4 });
  });

  it('takes a next revision, which stores only what it changes', async () => {
    const changed = first.map((one) => (one.item === 'P-5' ? { ...one, note: 'weighed' } : one));
    const made = await publishRevision(
      pool,
      {
        list: { id: 'l', programId: 'p', code: 'wing', frameIssueId: 'f' },
        declarations,
        origin: 'edit',
        reason: 'after the migration',
        file: null,
        author: { userId: 'u', address: 'test' },
      },
      async (writer) => {
        for (const one of changed) await writer.add(one);
      },
      async () => undefined,
    );
    const [old, now] = await db
      .selectFrom('list_revisions')
      .select(['last_row', 'last_end', 'content_sha256', 'content_format'])
      .where('number', 'in', [HISTORY.length, made.number])
      .orderBy('number')
      .execute();
    expect(now).toMatchObject({ last_row: (old?.last_row ?? 0) + 1, last_end: (old?.last_end ?? 0) + 1 });
    expect([old?.content_format, now?.content_format]).toEqual([1, 2]);
    expect(await hashRevision(db, made.id, createHash('sha256'))).toBe(now?.content_sha256);
  });
});
