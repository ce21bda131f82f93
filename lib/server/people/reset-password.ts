import { type Db } from '@/db/client';
import { consumeMailLink, findMailLink } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { hashPassword } from '@/lib/server/auth/password';
import { hashSecret } from '@/lib/server/auth/secret';
import { replacePassword } from './replace-password';

const DEAD = 'This link has been used or has run out. Ask for a new one on the sign-in page.';

/** Consumes a reset link, sets the password and ends every session. Throws `gone` when the link no longer works. */
export async function resetPassword(
  db: Db,
  { secret, password, address }: { secret: string; password: string; address: string },
): Promise<void> {
  const tokenHash = hashSecret(secret);
  const owner = await findMailLink(db, tokenHash, 'password-reset', new Date());
  if (!owner) throw new AppError('gone', DEAD);
  const passwordHash = await hashPassword(password);
  await db.transaction().execute(async (trx) => {
    const userId = await consumeMailLink(trx, tokenHash, 'password-reset', new Date());
    if (userId === null) throw new AppError('gone', DEAD);
    await replacePassword(trx, { actor: { userId, address }, userId, email: owner.email, passwordHash });
  });
}
