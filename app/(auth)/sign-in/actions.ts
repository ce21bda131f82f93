'use server';

import { redirect } from 'next/navigation';
import { signInSchema } from '@/lib/contracts/people';
import { serverDb } from '@/lib/server/database';
import { publicAction } from '@/lib/server/http/action';
import { ownPath } from '@/lib/server/http/own-path';
import { beginSession } from '@/lib/server/http/session-cookie';
import { signIn } from '@/lib/server/people/sign-in';

export const signInAction = publicAction(signInSchema, async ({ input, address }) => {
  const { email, password, next } = input;
  await beginSession(await signIn(serverDb(), { email, password, address }), address);
  redirect(ownPath(next));
});
