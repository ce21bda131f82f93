import { type Db } from '@/db/client';
import { findImport } from '@/db/queries/lists';
import { recordEvent } from '@/lib/server/audit/record-event';

/** What the person reads when the queue has tried an import for the last time; the cause is in the log. */
const WORDS =
  'The file is kept, but it could not be read into the list: a service behind Polhode failed again and again. ' +
  'Nothing of it was stored. Upload the file again, or ask whoever runs this server.';

/** Ends an import that the queue will not try again, so that it neither waits for ever nor counts against its owner. */
export async function giveUpImport(db: Db, importId: string): Promise<void> {
  const found = await findImport(db, importId);
  if (found === undefined) return;
  await db.transaction().execute(async (trx) => {
    const ended = await trx
      .updateTable('imports')
      .set({ state: 'failed', failure: WORDS, finished_at: new Date(), touched_at: new Date() })
      .where('id', '=', importId)
      .where('state', 'in', ['waiting', 'running'])
      .executeTakeFirst();
    if (ended.numUpdatedRows !== 1n) return;
    await recordEvent(trx, {
      scope: found.program_id,
      actor: { userId: found.created_by, address: 'job' },
      kind: 'import.failed',
      subject: found.list_code,
      detail: { list: found.list_code, file: found.file_name, problems: 0 },
    });
  });
}
