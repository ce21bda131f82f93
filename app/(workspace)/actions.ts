'use server';

import { redirect } from 'next/navigation';
import { z } from 'zod';
import { siteAction } from '@/lib/server/http/action';
import { dropSession } from '@/lib/server/http/session-cookie';

export const signOutAction = siteAction('account.keep', z.object({}), async () => {
  await dropSession();
  redirect('/sign-in');
});
