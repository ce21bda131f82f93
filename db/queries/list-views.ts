import { type Db } from '@/db/client';

/** A person's saved views of a list, by name. */
export function viewsOf(db: Db, listId: string, userId: string) {
  return db
    .selectFrom('list_views')
    .select(['id', 'name', 'query'])
    .where('list_id', '=', listId)
    .where('user_id', '=', userId)
    .orderBy('name')
    .execute();
}
