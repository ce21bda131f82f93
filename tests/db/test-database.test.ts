import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createTestDatabase, type TestDatabase } from '../support/database';

let database: TestDatabase;
let app: pg.Client;

beforeAll(async () => {
  database = await createTestDatabase();
  app = new pg.Client({ connectionString: database.appUrl });
  await app.connect();
});

afterAll(async () => {
  await app.end();
  await database.drop();
});

describe('the application role', () => {
  it('makes no tables', async () => {
    await expect(app.query('create table t (n int)')).rejects.toThrow(/permission denied/);
    await expect(app.query('create schema s')).rejects.toThrow(/permission denied/);
    await expect(app.query('create temporary table t (n int)')).rejects.toThrow(/permission denied/);
  });

  it('has a limit on how long a statement may run', async () => {
    const { rows } = await app.query<{ statement_timeout: string }>('show statement_timeout');
    expect(rows[0]?.statement_timeout).toBe('30s');
  });

  it('does not see what the owner alone may', async () => {
    const owner = new pg.Client({ connectionString: database.ownerUrl });
    await owner.connect();
    await owner.query('create table only_owners (n int)');
    await owner.end();
    await expect(app.query('select * from only_owners')).rejects.toThrow(/permission denied/);
  });
});
