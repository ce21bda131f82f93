import { type Db } from '../client';

/** Removes what has run out: sessions, mail links, rate limits and answers kept for repeated requests. */
export async function deleteExpired(db: Db, now: Date): Promise<void> {
  const dayAgo = new Date(now.getTime() - 86_400_000);
  await db.deleteFrom('sessions').where('expires_at', '<=', now).execute();
  await db.deleteFrom('mail_links').where('expires_at', '<=', dayAgo).execute();
  await db.deleteFrom('rate_limits').where('window_started_at', '<=', dayAgo).execute();
  await db.deleteFrom('idempotency_keys').where('created_at', '<=', dayAgo).execute();
}

export interface SessionInList {
  readonly startedAt: Date;
  readonly address: string;
}

/** A person's sessions that still hold, newest first. */
export function listSessions(db: Db, userId: string, now: Date): Promise<SessionInList[]> {
  return db
    .selectFrom('sessions')
    .select(['started_at as startedAt', 'address'])
    .where('user_id', '=', userId)
    .where('expires_at', '>', now)
    .orderBy('started_at', 'desc')
    .execute();
}
