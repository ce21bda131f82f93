import { type Db } from '@/db/client';
import { findPerson } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { enqueue } from '@/lib/server/jobs/enqueue';

/** Mails a new invitation to someone who has not joined yet; the former link no longer works. Returns their address. */
export async function resendInvitation(
  db: Db,
  { person, userId }: { person: Person; userId: string },
): Promise<string> {
  const invited = await findPerson(db, userId);
  if (!invited) throw new AppError('not-found', 'There is no such person.');
  if (invited.passwordHash !== null) throw new AppError('conflict', `${invited.name} has already joined.`);
  if (invited.disabledAt !== null) throw new AppError('conflict', `${invited.name} has been disabled.`);
  const { email } = invited;
  await db.transaction().execute(async (trx) => {
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: person,
      kind: 'user.invited',
      subject: userId,
      detail: { email },
    });
    await enqueue(trx, 'send-link-mail', { email, purpose: 'invitation' });
  });
  return email;
}
