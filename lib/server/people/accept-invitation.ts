import { type Db } from '@/db/client';
import { consumeMailLink, findMailLink, setName, setPassword } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { hashPassword } from '@/lib/server/auth/password';
import { hashSecret } from '@/lib/server/auth/secret';

const DEAD =
  'This invitation has been used or has run out. Ask an administrator or a chief engineer for a new one.';

/** Consumes an invitation and sets name and password; returns who joined. Throws `gone` when the link no longer works. */
export async function acceptInvitation(
  db: Db,
  { secret, name, password, address }: { secret: string; name: string; password: string; address: string },
): Promise<string> {
  const tokenHash = hashSecret(secret);
  const invited = await findMailLink(db, tokenHash, 'invitation', new Date());
  if (!invited) throw new AppError('gone', DEAD);
  const passwordHash = await hashPassword(password);
  return db.transaction().execute(async (trx) => {
    const userId = await consumeMailLink(trx, tokenHash, 'invitation', new Date());
    if (userId === null) throw new AppError('gone', DEAD);
    await setName(trx, userId, name);
    await setPassword(trx, userId, passwordHash);
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: { userId, address },
      kind: 'user.joined',
      subject: userId,
      detail: { email: invited.email },
    });
    return userId;
  });
}
