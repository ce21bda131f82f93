import { type Db } from '@/db/client';
import { findPerson } from '@/db/queries/people';
import { AppError, fieldError } from '@/lib/errors';
import { verifyPassword } from '@/lib/server/auth/password';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { giveBack, takeOrRefuse } from '@/lib/server/rate-limit/take';
import { type SignSubmission, signSubmission } from './sign-submission';

/**
 * Signs a submission after the signer's password, asked for once more.
 * @throws AppError invalid-input for a wrong password, too-many-requests after too many of them, and what `signSubmission` throws.
 */
export async function signWithPassword(
  db: Db,
  { password, ...input }: SignSubmission & { readonly password: string },
): Promise<{ number: number; digest: string }> {
  const { userId } = input.person;
  const signer = await findPerson(db, userId);
  if (!signer) throw new AppError('not-found', 'There is no such person.');
  await takeOrRefuse(db, RATE_POLICIES.passwordAccount, userId);
  if (!(await verifyPassword(signer.passwordHash, password)))
    throw fieldError('password', 'This is not your password. Nothing was signed.');
  await giveBack(db, RATE_POLICIES.passwordAccount, userId);
  return signSubmission(db, input);
}
