'use server';

import { redirect } from 'next/navigation';
import { passwordResetSchema } from '@/lib/contracts/people';
import { serverDb } from '@/lib/server/database';
import { publicAction } from '@/lib/server/http/action';
import { dropSession } from '@/lib/server/http/session-cookie';
import { resetPassword } from '@/lib/server/people/reset-password';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { takeOrRefuse } from '@/lib/server/rate-limit/take';

export const resetPasswordAction = publicAction(passwordResetSchema, async ({ input, address }) => {
  await takeOrRefuse(serverDb(), RATE_POLICIES.linkAddress, address);
  const { linkSecret, newPassword } = input;
  await resetPassword(serverDb(), { secret: linkSecret, password: newPassword, address });
  await dropSession();
  redirect('/sign-in?after=password');
});
