import { type Db } from '@/db/client';
import { type MailWish } from '@/db/schema/people';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';

/** Sets which mails a person wants of the programs they belong to. Links for passwords and invitations come in any case. */
export async function setMailWish(
  db: Db,
  { person, wish }: { person: Person; wish: MailWish },
): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const { email, mail_wish: before } = await trx
      .selectFrom('users')
      .select(['email', 'mail_wish'])
      .where('id', '=', person.userId)
      .forUpdate()
      .executeTakeFirstOrThrow();
    if (before === wish) return;
    await trx.updateTable('users').set({ mail_wish: wish }).where('id', '=', person.userId).execute();
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: person,
      kind: 'user.mail-wish-set',
      subject: email,
      detail: { from: before, to: wish },
    });
  });
}
