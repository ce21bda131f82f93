import { type Db } from '@/db/client';
import { type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';

/** Deletes one's own view. @throws AppError not-found */
export async function deleteView(
  db: Db,
  input: { readonly person: Person; readonly list: Pick<List, 'id'>; readonly view: string },
): Promise<void> {
  const { numDeletedRows } = await db
    .deleteFrom('list_views')
    .where('id', '=', input.view)
    .where('list_id', '=', input.list.id)
    .where('user_id', '=', input.person.userId)
    .executeTakeFirst();
  if (numDeletedRows === 0n) throw new AppError('not-found', 'You have no such view of this list.');
}
