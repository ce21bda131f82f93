import { type Db } from '@/db/client';
import { findPerson, setDisabled } from '@/db/queries/people';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { endSessions } from '@/lib/server/auth/session';

/**
 * Shuts a person out (sessions end at once, tokens stop working) or lets them in again; what they made stays. Returns their name.
 * Throws `conflict` when it already stands so, or for oneself.
 */
export async function setPersonDisabled(
  db: Db,
  { person, userId, disabled }: { person: Person; userId: string; disabled: boolean },
): Promise<string> {
  if (userId === person.userId) throw new AppError('conflict', 'You cannot disable your own account.');
  const found = await findPerson(db, userId);
  if (!found) throw new AppError('not-found', 'There is no such person.');
  await db.transaction().execute(async (trx) => {
    if (!(await setDisabled(trx, userId, disabled ? new Date() : null))) {
      throw new AppError('conflict', `${found.name} is already ${disabled ? 'disabled' : 'enabled'}.`);
    }
    if (disabled) await endSessions(trx, userId);
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: person,
      kind: disabled ? 'user.disabled' : 'user.enabled',
      subject: userId,
      detail: { email: found.email },
    });
  });
  return found.name;
}
