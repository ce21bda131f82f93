import { type Db } from '@/db/client';
import { type List } from '@/db/queries/lists';
import { findPendingUpload, type PendingUpload } from '@/db/queries/mappings';
import { AppError } from '@/lib/errors';
import { WorkbookRefused } from '@/lib/server/sheets/refused';

/** A pending upload of a list. @throws AppError not-found */
export async function reachUpload(db: Db, list: Pick<List, 'id'>, id: string): Promise<PendingUpload> {
  const found = await findPendingUpload(db, id);
  if (found === undefined || found.list_id !== list.id)
    throw new AppError('not-found', 'This list has no such upload.');
  return found;
}

/** A workbook that is not read is a wrong input, in its own words. */
export async function orRefused<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (!(error instanceof WorkbookRefused)) throw error;
    throw new AppError('invalid-input', error.message, { cause: error });
  }
}
