import { type Db } from '@/db/client';
import { viewsOf } from '@/db/queries/list-views';
import { type List } from '@/db/queries/lists';
import { MOST_VIEWS, type SaveView } from '@/lib/contracts/saved-view';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { newId } from '@/lib/server/ids';

/**
 * Keeps a view under a name, in place of the person's view of that name where there is one.
 * @throws AppError invalid-request when they have very many already
 */
export async function saveView(
  db: Db,
  input: { readonly person: Person; readonly list: Pick<List, 'id'>; readonly view: SaveView },
): Promise<void> {
  const { person, list, view } = input;
  const views = await viewsOf(db, list.id, person.userId);
  if (views.length >= MOST_VIEWS && !views.some(({ name }) => name === view.name)) {
    throw new AppError(
      'invalid-request',
      `You keep ${MOST_VIEWS} views of this list. Delete one before you save another.`,
    );
  }
  await db
    .insertInto('list_views')
    .values({ id: newId(), list_id: list.id, user_id: person.userId, ...view })
    .onConflict((conflict) =>
      conflict
        .columns(['list_id', 'user_id', 'name'])
        .doUpdateSet({ query: view.query, changed_at: new Date() }),
    )
    .execute();
}
