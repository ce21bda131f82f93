import { type Db } from '@/db/client';
import { type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { CHANGED_ELSEWHERE } from './reach-draft';

/** Throws a person's draft away as they saw it. @throws AppError conflict when it has changed since. */
export async function throwAwayDraft(
  db: Db,
  input: { readonly person: Person; readonly list: List; readonly version: number },
): Promise<void> {
  const { numDeletedRows } = await db
    .deleteFrom('list_drafts')
    .where('list_id', '=', input.list.id)
    .where('user_id', '=', input.person.userId)
    .where('version', '=', input.version)
    .executeTakeFirst();
  if (numDeletedRows === 0n) throw new AppError('conflict', CHANGED_ELSEWHERE);
}
