import { Kysely, PostgresDialect, sql } from 'kysely';
import pg from 'pg';
import { randomBytes } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDatabase, databaseUrl, OWNER, withClient } from '@/lib/server/commands/local/roles.mjs';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { up as people } from '@/migrations/2026-12-01T1200-people-and-programs';
import { up as allowances } from '@/migrations/2026-12-01T1510-allowances-by-group';
import { up as limits } from '@/migrations/2026-12-01T1511-limits-of-any-quantity';
import { testCluster } from '@/tests/support/cluster';

/* A database of the released shape, filled, through the migrations that came after. */
const name = `test_${randomBytes(6).toString('hex')}`;
let db: Kysely<unknown>;

beforeAll(async () => {
  const cluster = testCluster();
  await withClient(superuserUrl(cluster), (client) => createDatabase(client, name));
  const pool = new pg.Pool({
    connectionString: databaseUrl(OWNER, cluster.owner, cluster.port, name),
    max: 2,
  });
  db = new Kysely({ dialect: new PostgresDialect({ pool }) });
  await people(db);
  await sql`
    insert into users (id, email, name) values ('u', 'chief@skerry.example', 'Chief');
    insert into programs (id, code, title, created_by) values ('p', 'hopper', 'Hopper', 'u');
    insert into limits (id, program_id, quantity, kind, value, source, source_date, created_by, created_at) values
      ('f', 'p', 'cg-forward-percent-mac', 'specification', 14, 'a document', '2025-11-03', 'u', '2026-03-01T23:30:00-02:00'),
      ('a', 'p', 'cg-aft-percent-mac', 'specification', 34, 'a document', '2025-11-03', 'u', '2026-03-01T12:00:00Z'),
      ('m', 'p', 'mass-maximum', 'contract', 7450, 'a contract', '2025-01-15', 'u', '2026-03-01T12:00:00Z');
    insert into growth_allowances (program_id, maturity, fraction, source) values ('p', 'E', 0.06, 'a plan'), ('p', 'C', 0.02, 'a plan');
  `.execute(db);
  await allowances(db);
  await limits(db);
});
afterAll(async () => {
  await db.destroy();
  await withClient(superuserUrl(testCluster()), async (client) => {
    await client.query(`drop database ${client.escapeIdentifier(name)} with (force)`);
  });
});

describe('a database with limits and allowances of the released shape', () => {
  it('comes through with each limit as one of the whole aircraft in every condition, from the same side', async () => {
    const { rows } = await sql`
      select id, quantity, sense, value, group_path, condition_code, frame_issue_id, valid_from::text, valid_until, kind
      from limits order by id
    `.execute(db);
    const always = { group_path: '', condition_code: null, frame_issue_id: null, valid_until: null };
    expect(rows).toEqual([
      {
        ...always,
        id: 'a',
        quantity: 'percentMac',
        sense: 'at-most',
        value: 34,
        valid_from: '2026-03-01',
        kind: 'specification',
      },
      {
        ...always,
        id: 'f',
        quantity: 'percentMac',
        sense: 'at-least',
        value: 14,
        valid_from: '2026-03-02',
        kind: 'specification',
      },
      {
        ...always,
        id: 'm',
        quantity: 'mass',
        sense: 'at-most',
        value: 7450,
        valid_from: '2026-03-01',
        kind: 'contract',
      },
    ]);
  });

  it('comes through with each allowance as the program’s own, and takes one of a group beside it', async () => {
    await sql`
      insert into growth_allowances (program_id, group_path, maturity, fraction, source) values ('p', 'Wing', 'E', 0.1, 'a plan')
    `.execute(db);
    const { rows } = await sql`
      select group_path, maturity, fraction from growth_allowances order by group_path, maturity
    `.execute(db);
    expect(rows).toEqual([
      { group_path: '', maturity: 'C', fraction: 0.02 },
      { group_path: '', maturity: 'E', fraction: 0.06 },
      { group_path: 'Wing', maturity: 'E', fraction: 0.1 },
    ]);
  });

  it('refuses a place without a frame issue and a last day before the first', async () => {
    const limit = (quantity: string, until: string | null) =>
      sql`
      insert into limits (id, program_id, quantity, sense, kind, value, source, source_date, created_by, group_path, valid_from, valid_until)
      values ('x', 'p', ${quantity}, 'at-most', 'target', 1, 's', '2026-01-01', 'u', '', '2026-01-02', ${until}::date)
    `.execute(db);
    await expect(limit('cgx', null)).rejects.toMatchObject({ code: '23514' });
    await expect(limit('mass', '2026-01-01')).rejects.toMatchObject({ code: '23514' });
    await expect(limit('nonsense', null)).rejects.toMatchObject({ code: '23514' });
  });
});
