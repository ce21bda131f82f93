import { type Db } from '@/db/client';
import { findImport } from '@/db/queries/lists';
import { recordEvent } from '@/lib/server/audit/record-event';

/** Ends an import that the queue will not try again: its file was not at fault, so uploading it once more may do. */
export async function giveUpImport(db: Db, importId: string): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const found = await findImport(trx, importId);
    if (found === undefined) return;
    const { numUpdatedRows } = await trx
      .updateTable('imports')
      .set({
        state: 'failed',
        failure:
          'The server could not read the file to its end, in several tries. Nothing is known to be wrong with it.',
        finished_at: new Date(),
        touched_at: new Date(),
      })
      .where('id', '=', importId)
      .where('state', 'in', ['waiting', 'running'])
      .executeTakeFirstOrThrow();
    if (numUpdatedRows === 0n) return;
    await recordEvent(trx, {
      scope: found.program_id,
      actor: { userId: found.created_by, address: 'job' },
      kind: 'import.failed',
      subject: found.list_code,
      detail: { list: found.list_code, file: found.file_name, problems: 0 },
    });
  });
}
