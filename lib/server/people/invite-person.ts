import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { insertPersonOnce } from '@/db/queries/people';
import { type Database } from '@/db/schema/database';
import { fieldError } from '@/lib/errors';
import { type Actor, type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { enqueue } from '@/lib/server/jobs/enqueue';

interface Invited {
  readonly id: string;
  readonly email: string;
  readonly name: string;
  readonly added: boolean;
}

/** The person with this address, made and invited by mail if there is none. Throws `invalid-input` for one who is disabled. */
export async function findOrInvite(
  trx: Transaction<Database>,
  invitation: { actor: Actor; email: string; name: string | undefined; admin: boolean },
): Promise<Invited> {
  const { actor, email, admin } = invitation;
  const name = invitation.name ?? email.slice(0, email.indexOf('@'));
  const { disabledAt, ...invited } = await insertPersonOnce(trx, { id: newId(), email, name, admin });
  if (disabledAt !== null) {
    throw fieldError('email', `${email} has been disabled. An administrator can enable the account again.`);
  }
  if (invited.added) {
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor,
      kind: 'user.invited',
      subject: invited.id,
      detail: { email },
    });
    if (admin) {
      await recordEvent(trx, {
        scope: SITE_SCOPE,
        actor,
        kind: 'user.made-admin',
        subject: invited.id,
        detail: { email },
      });
    }
    await enqueue(trx, 'send-link-mail', { email, purpose: 'invitation' });
  }
  return invited;
}

/** Makes a person and mails them an invitation. Throws `invalid-input` when the address is taken. */
export async function invitePerson(
  db: Db,
  { person, email, name, admin }: { person: Person; email: string; name: string; admin: boolean },
): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const invited = await findOrInvite(trx, { actor: person, email, name, admin });
    if (!invited.added)
      throw fieldError('email', `${email} already has an account, under the name ${invited.name}.`);
  });
}
