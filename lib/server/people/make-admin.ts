import { type Db } from '@/db/client';
import { insertPersonOnce } from '@/db/queries/people';
import { type Actor } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { makeMailLink } from './mail-links';

const COMMAND_LINE: Actor = { userId: null, address: 'command line' };

/**
 * Makes an administrator from the command line, or makes one of someone who has an account. Returns the path of an
 * invitation for who has no password yet, null otherwise.
 */
export async function makeAdmin(
  db: Db,
  { email, name }: { email: string; name: string },
): Promise<string | null> {
  return db.transaction().execute(async (trx) => {
    const made = await insertPersonOnce(trx, { id: newId(), email, name, admin: true });
    const row = await trx
      .updateTable('users')
      .set({ is_admin: true, disabled_at: null })
      .where('id', '=', made.id)
      .returning('password_hash')
      .executeTakeFirstOrThrow();
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: COMMAND_LINE,
      kind: 'user.made-admin',
      subject: made.id,
      detail: { email },
    });
    if (row.password_hash !== null) return null;
    return makeMailLink(trx, { userId: made.id, purpose: 'invitation' });
  });
}
