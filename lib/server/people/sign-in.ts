import { type Db } from '@/db/client';
import { findPersonByEmail } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { verifyPassword } from '@/lib/server/auth/password';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { giveBack, takeOrRefuse } from '@/lib/server/rate-limit/take';

/**
 * The id of who signs in. Throws `invalid-input`, in the same words and after the same work, for an unknown address, a wrong
 * password, someone who has not joined and someone disabled. Attempts that fail count against account and address.
 */
export async function signIn(
  db: Db,
  { email, password, address }: { email: string; password: string; address: string },
): Promise<string> {
  await takeOrRefuse(db, RATE_POLICIES.signInAddress, address);
  await takeOrRefuse(db, RATE_POLICIES.signInAccount, email);
  const found = await findPersonByEmail(db, email);
  const matches = await verifyPassword(found?.passwordHash ?? null, password);
  if (!found || !matches || found.disabledAt !== null) {
    throw new AppError(
      'invalid-input',
      'No account has this address with this password. Check both, or set a new password by mail.',
    );
  }
  await giveBack(db, RATE_POLICIES.signInAddress, address);
  await giveBack(db, RATE_POLICIES.signInAccount, email);
  await db.transaction().execute((trx) =>
    recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: { userId: found.id, address },
      kind: 'user.signed-in',
      subject: found.id,
      detail: { email },
    }),
  );
  return found.id;
}
