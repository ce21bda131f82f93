import { type Db } from '@/db/client';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent, SITE_SCOPE } from '@/lib/server/audit/record-event';

/** Ends a token of one's own at once. Returns its name. Throws `not-found` for one that is not theirs or already revoked. */
export async function revokeToken(db: Db, { person, id }: { person: Person; id: string }): Promise<string> {
  return db.transaction().execute(async (trx) => {
    const revoked = await trx
      .updateTable('api_tokens')
      .set({ revoked_at: new Date() })
      .where('id', '=', id)
      .where('user_id', '=', person.userId)
      .where('revoked_at', 'is', null)
      .returning('name')
      .executeTakeFirst();
    if (!revoked) throw new AppError('not-found', 'There is no such token, or it has been revoked already.');
    await recordEvent(trx, {
      scope: SITE_SCOPE,
      actor: person,
      kind: 'token.revoked',
      subject: id,
      detail: { name: revoked.name },
    });
    return revoked.name;
  });
}
