import { type Db } from '@/db/client';
import { findPerson } from '@/db/queries/people';
import { AppError, fieldError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { hashPassword, verifyPassword } from '@/lib/server/auth/password';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { giveBack, takeOrRefuse } from '@/lib/server/rate-limit/take';
import { replacePassword } from './replace-password';

/** Sets a new password after the present one, and ends every session, this one too. Throws `invalid-input` for a wrong one. */
export async function changePassword(
  db: Db,
  { person, current, next }: { person: Person; current: string; next: string },
): Promise<void> {
  const owner = await findPerson(db, person.userId);
  if (!owner) throw new AppError('not-found', 'There is no such person.');
  await takeOrRefuse(db, RATE_POLICIES.passwordAccount, person.userId);
  if (!(await verifyPassword(owner.passwordHash, current))) {
    throw fieldError('currentPassword', 'This is not your present password.');
  }
  await giveBack(db, RATE_POLICIES.passwordAccount, person.userId);
  const passwordHash = await hashPassword(next);
  await db
    .transaction()
    .execute((trx) =>
      replacePassword(trx, { actor: person, userId: owner.id, email: owner.email, passwordHash }),
    );
}
