import { type Db } from '@/db/client';
import { viewsOf } from '@/db/queries/list-views';
import { type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';

/** Gives one's own view another name. @throws AppError not-found; conflict when another view has that name */
export async function renameView(
  db: Db,
  input: {
    readonly person: Person;
    readonly list: Pick<List, 'id'>;
    readonly view: string;
    readonly name: string;
  },
): Promise<void> {
  const { person, list, view, name } = input;
  await db.transaction().execute(async (trx) => {
    const views = await viewsOf(trx, list.id, person.userId);
    if (views.some((one) => one.name === name && one.id !== view))
      throw new AppError('conflict', `You have a view called ${name} already. Choose another name.`);
    const { numUpdatedRows } = await trx
      .updateTable('list_views')
      .set({ name, changed_at: new Date() })
      .where('id', '=', view)
      .where('list_id', '=', list.id)
      .where('user_id', '=', person.userId)
      .executeTakeFirst();
    if (numUpdatedRows === 0n) throw new AppError('not-found', 'You have no such view of this list.');
  });
}
