import { type Db } from '@/db/client';
import { viewsOf } from '@/db/queries/list-views';
import { type List } from '@/db/queries/lists';
import { type SavedView } from '@/lib/contracts/saved-view';
import { type Person } from '@/lib/server/actor';

/** A person's own saved views of a list. */
export function loadViews(db: Db, list: Pick<List, 'id'>, person: Person): Promise<SavedView[]> {
  return viewsOf(db, list.id, person.userId);
}
