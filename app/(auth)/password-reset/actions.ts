'use server';

import { passwordResetRequestSchema } from '@/lib/contracts/people';
import { serverDb } from '@/lib/server/database';
import { publicAction } from '@/lib/server/http/action';
import { requestPasswordReset } from '@/lib/server/people/request-password-reset';

export const requestPasswordResetAction = publicAction(
  passwordResetRequestSchema,
  async ({ input: { email }, address }) => {
    await requestPasswordReset(serverDb(), { email, address });
    return {
      message: `If ${email} has an account, a link is on its way there. It works once, within an hour.`,
    };
  },
);
