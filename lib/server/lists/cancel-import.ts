import { type Db } from '@/db/client';
import { type Import, type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

export interface CancelImport {
  readonly person: Person;
  readonly list: Pick<List, 'program_id' | 'code'>;
  readonly found: Pick<Import, 'id' | 'file_name'>;
}

/**
 * Calls an import off that waits or runs; nothing of it is stored, and whoever is at it stops at its next telling of progress.
 * @throws AppError conflict when it has ended already.
 */
export async function cancelImport(db: Db, { person, list, found }: CancelImport): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const ended = await trx
      .updateTable('imports')
      .set({ state: 'cancelled', finished_at: new Date(), touched_at: new Date() })
      .where('id', '=', found.id)
      .where('state', 'in', ['waiting', 'running'])
      .executeTakeFirst();
    if (ended.numUpdatedRows !== 1n)
      throw new AppError('conflict', 'This import has ended already, so there is nothing to cancel.');
    await recordEvent(trx, {
      scope: list.program_id,
      actor: person,
      kind: 'import.cancelled',
      subject: list.code,
      detail: { list: list.code, file: found.file_name },
    });
  });
}
