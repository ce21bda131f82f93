import { type Db } from '../client';

/** Removes what has run out: sessions, mail links, rate limits and answers kept for repeated requests. */
export async function deleteExpired(db: Db, now: Date): Promise<void> {
  const dayAgo = new Date(now.getTime() - 86_400_000);
  await db.deleteFrom('sessions').where('expires_at', '<=', now).execute();
  await db.deleteFrom('mail_links').where('expires_at', '<=', dayAgo).execute();
  await db.deleteFrom('rate_limits').where('window_started_at', '<=', dayAgo).execute();
  await db.deleteFrom('idempotency_keys').where('created_at', '<=', dayAgo).execute();
}
