import { type Db } from '@/db/client';
import { requestImport, type RequestImport } from '@/lib/server/lists/request-import';
import { openObject } from '@/lib/server/storage/open-object';
import { keepUpload } from './keep-upload';
import { orRefused } from './reach-upload';
import { wayOf } from './way-of';

/** What became of a file that a person sent: an import under way, or a pending upload that wants a mapping. */
export type Taken = { readonly import: string } | { readonly upload: string };

/**
 * Takes a stored file of a person at a browser: the contract's own is read at once unless `byHand`, any other waits until its columns
 * are mapped, a remembered mapping included, which is offered and not used unasked. @throws AppError invalid-input for a workbook
 * that is not read.
 */
export async function takeFile(db: Db, input: RequestImport, byHand: boolean): Promise<Taken> {
  const { file, list } = input;
  const way = await orRefused(wayOf(db, list.id, { open: () => openObject(file.sha256), bytes: file.bytes }));
  if (way.way === 'contract' && !byHand) return { import: await requestImport(db, input) };
  return { upload: await keepUpload(db, input) };
}
