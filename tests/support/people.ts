import type pg from 'pg';
import { type Db, createDb, createPool } from '@/db/client';
import { hashPassword } from '@/lib/server/auth/password';
import { newId } from '@/lib/server/ids';
import { createTestDatabase } from './database';

export const ADDRESS = '192.0.2.7';

export interface PeopleUnderTest {
  readonly appUrl: string;
  readonly pool: pg.Pool;
  readonly db: Db;
  readonly close: () => Promise<void>;
}

/** A migrated, empty database with the application role's pool on it. */
export async function peopleUnderTest(): Promise<PeopleUnderTest> {
  const { appUrl, drop } = await createTestDatabase();
  const failures: Error[] = [];
  const pool = createPool(appUrl, 8, (error) => failures.push(error));
  const db = createDb(pool);
  const close = async (): Promise<void> => {
    await db.destroy();
    await drop();
  };
  return { appUrl, pool, db, close };
}

interface NewPerson {
  readonly email: string;
  readonly name?: string;
  /** Absent: invited, not joined. */
  readonly password?: string;
  readonly admin?: boolean;
}

export async function makePerson(
  db: Db,
  { email, name, password, admin = false }: NewPerson,
): Promise<string> {
  const id = newId();
  await db
    .insertInto('users')
    .values({
      id,
      email,
      name: name ?? email,
      is_admin: admin,
      password_hash: password === undefined ? null : await hashPassword(password),
    })
    .execute();
  return id;
}

/** The jobs that wait in the queue, by task. */
export async function queuedJobs(pool: pg.Pool, task: string): Promise<unknown[]> {
  const { rows } = await pool.query<{ payload: unknown }>(
    `select payload from graphile_worker._private_jobs jobs
     join graphile_worker._private_tasks tasks on tasks.id = jobs.task_id
     where tasks.identifier = $1 order by jobs.id`,
    [task],
  );
  return rows.map(({ payload }) => payload);
}
