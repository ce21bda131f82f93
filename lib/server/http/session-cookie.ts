import { cookies } from 'next/headers';
import { endSession, sessionCookie, startSession } from '@/lib/server/auth/session';
import { serverPool } from '@/lib/server/database';
import { env } from '@/lib/server/env';

/** A new session in this browser, under a new id; the one that it had ends. For server actions. */
export async function beginSession(userId: string, address: string): Promise<void> {
  await dropSession();
  const { name, options } = sessionCookie(env().APP_URL);
  (await cookies()).set(name, await startSession(serverPool(), userId, address), options);
}

/** Ends this browser's session, if it has one. */
export async function dropSession(): Promise<void> {
  const { name, options } = sessionCookie(env().APP_URL);
  const jar = await cookies();
  const secret = jar.get(name)?.value;
  if (secret === undefined) return;
  await endSession(serverPool(), secret);
  jar.set(name, '', { ...options, maxAge: 0 });
}
