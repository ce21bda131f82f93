import { type Db } from '@/db/client';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { endSessions } from '@/lib/server/auth/session';

/** Signs a person out everywhere, here too. */
export async function endAllSessions(
  db: Db,
  { person, email }: { person: Person; email: string },
): Promise<void> {
  await db.transaction().execute(async (trx) => {
    await endSessions(trx, person.userId);
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: person,
      kind: 'user.sessions-ended',
      subject: person.userId,
      detail: { email },
    });
  });
}
