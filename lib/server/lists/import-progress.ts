import { type Db } from '@/db/client';
import { log } from '@/lib/server/log';

/** Progress is told at most this often. */
const EVERY_MS = 400;

/** Somebody has called the import off: nothing of it is stored. */
export class ImportCancelled extends Error {}

/**
 * Tells the rows done on another connection than the import's own, a few times a second, and hears by it whether the import still is
 * to go on: the next telling after one that found it called off throws ImportCancelled. A telling that fails is only logged.
 */
export function progressTeller(db: Db, importId: string): (rows: number) => void {
  let next = 0;
  let telling = false;
  let cancelled = false;
  return (rows) => {
    if (cancelled) throw new ImportCancelled();
    if (rows === 0 || telling || Date.now() < next) return;
    telling = true;
    next = Date.now() + EVERY_MS;
    db.updateTable('imports')
      .set({ rows_done: rows, touched_at: new Date() })
      .where('id', '=', importId)
      .where('state', '=', 'running')
      .executeTakeFirst()
      .then(({ numUpdatedRows }) => {
        cancelled = numUpdatedRows === 0n;
      })
      .catch((error: unknown) => log.warn({ err: error }, 'could not tell the progress of an import'))
      .finally(() => {
        telling = false;
      });
  };
}
