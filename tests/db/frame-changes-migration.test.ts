import { randomBytes } from 'node:crypto';
import { Kysely, PostgresDialect, sql } from 'kysely';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDatabase, databaseUrl, OWNER, withClient } from '@/lib/server/commands/local/roles.mjs';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { up as people } from '@/migrations/2026-12-01T1200-people-and-programs';
import { up as lists } from '@/migrations/2026-12-01T1210-lists-and-configurations';
import { up as baselines } from '@/migrations/2026-12-01T1230-baselines';
import { up as frames } from '@/migrations/2026-12-01T1500-frame-changes';
import { testCluster } from '@/tests/support/cluster';

/* A database of the released shape with two frame issues, through the migration that came after. */
const name = `test_${randomBytes(6).toString('hex')}`;
let db: Kysely<unknown>;

const issue = (id: string, program: string, number: number, at: string) => sql`
  insert into frame_issues (id, program_id, number, title, axis_x, axis_y, axis_z, lemac, mac, span, length, reference, valid_from, reason, created_by, created_at)
  values (${id}, ${program}, ${number}, 'an issue', 'aft', 'right', 'up', '{6,0,1}', 2, 18, 15, '{6.5,0,1}', '2026-01-05', 'layout', 'u', ${at})
`;
const rotors = (id: string, program: string, number: number, at: string) => sql`
  insert into rotor_revisions (id, program_id, number, reason, rotors, points, findings, created_by, created_at)
  values (${id}, ${program}, ${number}, 'r', '[]', '[]', '[]', 'u', ${at})
`;
const list = (id: string, frame: string) => sql`
  insert into lists (id, program_id, code, title, frame_issue_id, declarations, created_by)
  values (${id}, 'p', ${id}, 'a list', ${frame}, '{}', 'u')
`;
const revision = (id: string, of: string, number: number) => sql`
  insert into list_revisions (id, list_id, number, declarations, origin, reason, content_sha256, rows, memo_rows, pieces, findings, created_by)
  values (${id}, ${of}, ${number}, '{}', 'file', 'r', repeat('0', 64), 0, 0, 0, '[]', 'u')
`;

beforeAll(async () => {
  const cluster = testCluster();
  await withClient(superuserUrl(cluster), (client) => createDatabase(client, name));
  const pool = new pg.Pool({
    connectionString: databaseUrl(OWNER, cluster.owner, cluster.port, name),
    max: 2,
  });
  db = new Kysely({ dialect: new PostgresDialect({ pool }) });
  await people(db);
  await lists(db);
  await baselines(db);
  await sql`
    insert into users (id, email, name) values ('u', 'chief@skerry.example', 'Chief');
    insert into programs (id, code, title, created_by) values ('p', 'hopper', 'Hopper', 'u'), ('q', 'bare', 'Bare', 'u');
  `.execute(db);
  for (const step of [
    issue('one', 'p', 1, '2026-01-05T10:00Z'),
    issue('two', 'p', 2, '2026-03-05T10:00Z'),
    list('wing', 'one'),
    list('tail', 'two'),
    revision('w1', 'wing', 1),
    revision('w2', 'wing', 2),
    revision('t1', 'tail', 1),
    rotors('before', 'p', 1, '2026-01-01T10:00Z'),
    rotors('between', 'p', 2, '2026-02-01T10:00Z'),
    rotors('after', 'p', 3, '2026-04-01T10:00Z'),
    rotors('bare', 'q', 1, '2026-04-01T10:00Z'),
  ])
    await step.execute(db);
  await frames(db);
});
afterAll(async () => {
  await db.destroy();
  await withClient(superuserUrl(testCluster()), async (client) => {
    await client.query(`drop database ${client.escapeIdentifier(name)} with (force)`);
  });
});

const statedIn = async (table: string) => {
  const { rows } = await sql<{ id: string; frame_issue_id: string | null }>`
    select id, frame_issue_id from ${sql.table(table)} order by id
  `.execute(db);
  return Object.fromEntries(rows.map((row) => [row.id, row.frame_issue_id]));
};

describe('a database with frame issues of the released shape', () => {
  it('comes through with every list revision stated in the issue of its list', async () => {
    expect(await statedIn('list_revisions')).toEqual({ w1: 'one', w2: 'one', t1: 'two' });
  });

  it('comes through with rotating parts in the issue in force when they were made, in the first where there was none yet', async () => {
    expect(await statedIn('rotor_revisions')).toEqual({
      before: 'one',
      between: 'one',
      after: 'two',
      bare: null,
    });
  });

  it('knows nothing of how the issues lie against each other, for nobody said', async () => {
    const { rows } = await sql`select * from frame_steps`.execute(db);
    expect(rows).toEqual([]);
  });

  it('refuses as before that a revision is altered, and that what was said of an issue is', async () => {
    await sql`insert into frame_steps (frame_issue_id, origin, turn, stated_by) values ('two', '{1,0,0}', '{0,0,0}', 'u')`.execute(
      db,
    );
    for (const change of [
      sql`update list_revisions set frame_issue_id = 'two' where id = 'w1'`,
      sql`update rotor_revisions set frame_issue_id = 'two' where id = 'before'`,
      sql`update frame_steps set origin = '{0,0,0}'`,
      sql`delete from frame_steps`,
      sql`truncate frame_steps`,
    ])
      await expect(change.execute(db)).rejects.toMatchObject({ code: '42501' });
  });
});
