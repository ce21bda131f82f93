'use server';

import { redirect } from 'next/navigation';
import { z } from 'zod';
import { mailWishSchema, passwordChangeSchema } from '@/lib/contracts/people';
import { newTokenSchema, tokenChoiceSchema } from '@/lib/contracts/token';
import { serverDb } from '@/lib/server/database';
import { siteAction } from '@/lib/server/http/action';
import { beginSession, dropSession } from '@/lib/server/http/session-cookie';
import { changePassword } from '@/lib/server/people/change-password';
import { endAllSessions } from '@/lib/server/people/end-all-sessions';
import { setMailWish } from '@/lib/server/people/set-mail-wish';
import { makeToken } from '@/lib/server/tokens/make-token';
import { revokeToken } from '@/lib/server/tokens/revoke-token';

export const changePasswordAction = siteAction(
  'account.keep',
  passwordChangeSchema,
  async ({ input, person, address }) => {
    await changePassword(serverDb(), { person, current: input.currentPassword, next: input.newPassword });
    await beginSession(person.userId, address);
    return { message: 'The password is changed. Every other session has ended.' };
  },
);

export const signOutEverywhereAction = siteAction('account.keep', z.object({}), async ({ person, user }) => {
  await endAllSessions(serverDb(), { person, email: user.email });
  await dropSession();
  redirect('/sign-in');
});

export const setMailWishAction = siteAction('account.keep', mailWishSchema, async ({ input, person }) => {
  await setMailWish(serverDb(), { person, wish: input.wish });
  return { message: 'The mail wishes are saved.' };
});

export const makeTokenAction = siteAction('tokens.keep', newTokenSchema, async ({ input, person }) => {
  const { name, scopes, programs, days } = input;
  const limited = programs.length === 0 ? null : programs;
  const token = await makeToken(serverDb(), { person, name, scopes, programs: limited, days });
  return { message: `The token ${name} is made.`, result: { token } };
});

export const revokeTokenAction = siteAction('tokens.keep', tokenChoiceSchema, async ({ input, person }) => {
  const name = await revokeToken(serverDb(), { person, id: input.id });
  return { message: `The token ${name} is revoked.` };
});
