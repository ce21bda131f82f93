import { type Transaction } from 'kysely';
import { setPassword } from '@/db/queries/people';
import { type Database } from '@/db/schema/database';
import { type Actor } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { endSessions } from '@/lib/server/auth/session';
import { queueMail } from '@/lib/server/mail-queue';

/** The password with all that follows from it: every session ends, links to set one die, the owner is told by mail. */
export async function replacePassword(
  trx: Transaction<Database>,
  change: { actor: Actor; userId: string; email: string; passwordHash: string },
): Promise<void> {
  const { actor, userId, email } = change;
  await setPassword(trx, userId, change.passwordHash);
  await endSessions(trx, userId);
  await trx.deleteFrom('mail_links').where('user_id', '=', userId).execute();
  await recordEvent(trx, {
    scope: SITE_SCOPE,
    actor,
    kind: 'user.password-changed',
    subject: userId,
    detail: { email },
  });
  await queueMail(trx, {
    to: email,
    subject: 'Your Polhode password was changed',
    blocks: [
      { kind: 'paragraph', text: 'The password of your account was changed, and every session was ended.' },
      {
        kind: 'paragraph',
        text: 'If this was not you, set a new password from the sign-in page and tell an administrator.',
      },
    ],
  });
}
