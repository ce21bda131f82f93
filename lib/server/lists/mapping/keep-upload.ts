import { type Db } from '@/db/client';
import { type PendingUpload } from '@/db/queries/mappings';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { type RequestImport } from '@/lib/server/lists/request-import';

/** Keeps a stored file until someone says how it is read. Returns the id of the pending upload. */
export async function keepUpload(db: Db, { person, list, file, reason }: RequestImport): Promise<string> {
  const id = newId();
  await db.transaction().execute(async (trx) => {
    await trx
      .insertInto('stored_files')
      .values({ sha256: file.sha256, bytes: file.bytes })
      .onConflict((conflict) => conflict.column('sha256').doNothing())
      .execute();
    await trx
      .insertInto('pending_uploads')
      .values({
        id,
        list_id: list.id,
        file_sha256: file.sha256,
        file_name: file.name,
        bytes: file.bytes,
        lines: file.lines,
        reason,
        created_by: person.userId,
        import_id: null,
        dropped_at: null,
      })
      .execute();
    const detail = { list: list.code, file: file.name, sha256: file.sha256 };
    await recordEvent(trx, {
      scope: list.programId,
      actor: person,
      kind: 'upload.kept',
      subject: list.code,
      detail,
    });
  });
  return id;
}

export interface DropUpload {
  readonly person: Person;
  readonly list: { readonly programId: string; readonly code: string };
  readonly upload: PendingUpload;
}

/** Takes a pending upload off the list's page. @throws AppError conflict when it is imported or dropped already. */
export async function dropUpload(db: Db, { person, list, upload }: DropUpload): Promise<void> {
  await db.transaction().execute(async (trx) => {
    const { numUpdatedRows } = await trx
      .updateTable('pending_uploads')
      .set({ dropped_at: new Date() })
      .where('id', '=', upload.id)
      .where('import_id', 'is', null)
      .where('dropped_at', 'is', null)
      .executeTakeFirst();
    if (numUpdatedRows !== 1n) throw settledAlready();
    const detail = { list: list.code, file: upload.file_name };
    await recordEvent(trx, {
      scope: list.programId,
      actor: person,
      kind: 'upload.dropped',
      subject: list.code,
      detail,
    });
  });
}

export function settledAlready(): AppError {
  return new AppError(
    'conflict',
    'This file is imported or dropped already. Go to the list to see what became of it.',
  );
}
