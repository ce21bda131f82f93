import { NodePostgresAdapter } from '@lucia-auth/adapter-postgresql';
import { Lucia, TimeSpan } from 'lucia';
import { type Transaction } from 'kysely';
import type pg from 'pg';
import { type Database } from '@/db/schema/database';
import { hashSecret, newSecret } from '@/lib/server/auth/secret';

/** A session ends after this long without a request, and at the latest this long after sign-in. */
const IDLE = new TimeSpan(8, 'h');
const ABSOLUTE = new TimeSpan(7, 'd');

export interface SignedIn {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly admin: boolean;
}

interface SessionRow {
  started_at: Date;
  address: string;
}

interface UserRow {
  email: string;
  name: string;
  is_admin: boolean;
  disabled_at: Date | null;
}

declare module 'lucia' {
  interface Register {
    Lucia: ReturnType<typeof createLucia>;
    DatabaseSessionAttributes: SessionRow;
    DatabaseUserAttributes: UserRow;
  }
}

function createLucia(pool: pg.Pool) {
  return new Lucia(new NodePostgresAdapter(pool, { user: 'users', session: 'sessions' }), {
    sessionExpiresIn: IDLE,
    getSessionAttributes: (row) => ({ startedAt: row.started_at }),
    getUserAttributes: (row) => ({
      email: row.email,
      name: row.name,
      admin: row.is_admin,
      disabled: row.disabled_at !== null,
    }),
  });
}

const instances = new WeakMap<pg.Pool, ReturnType<typeof createLucia>>();

function lucia(pool: pg.Pool): ReturnType<typeof createLucia> {
  const known = instances.get(pool) ?? createLucia(pool);
  instances.set(pool, known);
  return known;
}

/** Starts a session and returns the secret for the cookie; the table keeps its hash only. */
export async function startSession(pool: pg.Pool, userId: string, address: string): Promise<string> {
  const secret = newSecret();
  const attributes = { started_at: new Date(), address };
  await lucia(pool).createSession(userId, attributes, { sessionId: hashSecret(secret) });
  return secret;
}

/** Who this cookie stands for, or null: unknown, expired, or the person has been disabled. Prolongs the idle time. */
export async function readSession(pool: pg.Pool, secret: string): Promise<SignedIn | null> {
  const { session, user } = await lucia(pool).validateSession(hashSecret(secret));
  if (!session) return null;
  const age = Date.now() - session.startedAt.getTime();
  if (user.disabled || age >= ABSOLUTE.milliseconds()) {
    await lucia(pool).invalidateSession(session.id);
    return null;
  }
  return { id: user.id, email: user.email, name: user.name, admin: user.admin };
}

export async function endSession(pool: pg.Pool, secret: string): Promise<void> {
  await lucia(pool).invalidateSession(hashSecret(secret));
}

/** Ends every session of a person, inside the change that asks for it. */
export async function endSessions(trx: Transaction<Database>, userId: string): Promise<void> {
  await trx.deleteFrom('sessions').where('user_id', '=', userId).execute();
}

export interface CookieOptions {
  readonly httpOnly: true;
  readonly secure: boolean;
  readonly sameSite: 'lax';
  readonly path: '/';
  readonly maxAge: number;
}

/** The cookie of a session: bound to this very host where the connection is encrypted (`__Host-`, Secure). */
export function sessionCookie(appUrl: string): { name: string; options: CookieOptions } {
  const secure = new URL(appUrl).protocol === 'https:';
  return {
    name: secure ? '__Host-polhode' : 'polhode',
    options: { httpOnly: true, secure, sameSite: 'lax', path: '/', maxAge: ABSOLUTE.seconds() },
  };
}
