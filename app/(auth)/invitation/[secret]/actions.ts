'use server';

import { redirect } from 'next/navigation';
import { invitationSchema } from '@/lib/contracts/people';
import { serverDb } from '@/lib/server/database';
import { publicAction } from '@/lib/server/http/action';
import { beginSession } from '@/lib/server/http/session-cookie';
import { acceptInvitation } from '@/lib/server/people/accept-invitation';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { takeOrRefuse } from '@/lib/server/rate-limit/take';

export const acceptInvitationAction = publicAction(invitationSchema, async ({ input, address }) => {
  await takeOrRefuse(serverDb(), RATE_POLICIES.linkAddress, address);
  const { linkSecret, name, newPassword } = input;
  const joined = { secret: linkSecret, name, password: newPassword, address };
  await beginSession(await acceptInvitation(serverDb(), joined), address);
  redirect('/');
});
