import type pg from 'pg';
import { createDb, createPool, type Db } from '@/db/client';
import { type MemberRole } from '@/lib/permissions';
import { sessionCookie, startSession } from '@/lib/server/auth/session';
import { newId } from '@/lib/server/ids';
import { makePerson } from './people';
import { testWeb } from './web';

export type Role = 'admin' | 'outsider' | MemberRole;
export const ROLES = ['admin', 'outsider', 'chief', 'weights', 'simulation'] as const;

export interface WebPeople {
  readonly db: Db;
  readonly pool: pg.Pool;
  /** Code of the program in which each has their role; `admin` and `outsider` have none. */
  readonly program: { readonly id: string; readonly code: string; readonly title: string };
  readonly ids: Readonly<Record<Role, string>>;
  readonly emails: Readonly<Record<Role, string>>;
  /** The Cookie header of a session of theirs. */
  readonly cookies: Readonly<Record<Role, string>>;
  readonly close: () => Promise<void>;
}

/** One person of each role in the running server's database, with a program of their own, all named after `code`. */
export async function webPeople(code: string, password?: string): Promise<WebPeople> {
  const web = testWeb();
  const failures: Error[] = [];
  const pool = createPool(web.appUrl, 4, (error) => failures.push(error));
  const db = createDb(pool);
  const one = async (role: Role) => {
    const email = `${role}@${code}.example`;
    const joined = password === undefined ? {} : { password };
    const id = await makePerson(db, { email, name: `The ${role}`, admin: role === 'admin', ...joined });
    const secret = await startSession(pool, id, '127.0.0.1');
    return { role, email, id, cookie: `${sessionCookie(web.url).name}=${secret}` };
  };
  const made = await Promise.all(ROLES.map(one));
  const by = (key: 'id' | 'email' | 'cookie') =>
    Object.fromEntries(made.map((each) => [each.role, each[key]])) as Record<Role, string>;
  const ids = by('id');
  const program = { id: newId(), code, title: `Program ${code}` };
  await db
    .insertInto('programs')
    .values({ ...program, created_by: ids.admin })
    .execute();
  for (const role of ['chief', 'weights', 'simulation'] as const) {
    await db
      .insertInto('program_members')
      .values({ program_id: program.id, user_id: ids[role], role, added_by: ids.admin })
      .execute();
  }
  return { db, pool, program, ids, emails: by('email'), cookies: by('cookie'), close: () => db.destroy() };
}
