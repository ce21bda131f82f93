import { cache } from 'react';
import { cookies, headers } from 'next/headers';
import { forbidden, notFound, redirect } from 'next/navigation';
import { type ProgramAction, type SiteAction } from '@/lib/permissions';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { readSession, sessionCookie, type SignedIn } from '@/lib/server/auth/session';
import { serverDb, serverPool } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { type ProgramAccess, requireProgramAction, requireSiteAction } from './access';
import { clientAddress } from './client-address';
import { PATH_HEADER } from './path-header';

/** Whose session the request carries; asked once per request. */
export const currentUser = cache(async (): Promise<SignedIn | null> => {
  const secret = (await cookies()).get(sessionCookie(env().APP_URL).name)?.value;
  return secret === undefined ? null : readSession(serverPool(), secret);
});

export async function currentAddress(): Promise<string> {
  return clientAddress(await headers(), env().TRUSTED_PROXIES);
}

export interface PageAccess {
  readonly user: SignedIn;
  readonly person: Person;
}

/** First line of a page that concerns no program: who asks. Leads to sign-in, or shows the refusal. */
export async function requireUser(action: SiteAction): Promise<PageAccess> {
  const access = await signedIn();
  await orShow(async () => requireSiteAction(access.user, action));
  return access;
}

/** First line of a page of a program. Outsiders see "not found", members without the right the refusal. */
export async function requireProgram(
  code: string,
  action: ProgramAction,
): Promise<PageAccess & ProgramAccess> {
  const access = await signedIn();
  const program = await orShow(() => requireProgramAction(serverDb(), access.user, { code }, action));
  return { ...access, ...program };
}

async function signedIn(): Promise<PageAccess> {
  const user = await currentUser();
  if (!user) {
    const path = (await headers()).get(PATH_HEADER);
    redirect(path === null || path === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(path)}`);
  }
  return { user, person: { userId: user.id, address: await currentAddress() } };
}

/** What was asked for; `not-found` and `forbidden` become the pages that say so. */
export async function orShow<T>(ask: () => Promise<T>): Promise<T> {
  try {
    return await ask();
  } catch (error) {
    if (error instanceof AppError && error.code === 'not-found') notFound();
    if (error instanceof AppError && error.code === 'forbidden') forbidden();
    throw error;
  }
}
