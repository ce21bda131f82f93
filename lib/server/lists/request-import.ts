import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { openImportsOf } from '@/db/queries/lists';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { enqueue } from '@/lib/server/jobs/enqueue';

/** So many imports of one person may wait or run at a time. */
export const OPEN_IMPORTS = 4;

/** Refuses a person who already has `OPEN_IMPORTS` imports under way; asked before a body is read, and again in the transaction. */
export async function assertMayImport(db: Db, userId: string): Promise<void> {
  if ((await openImportsOf(db, userId)) < OPEN_IMPORTS) return;
  throw new AppError(
    'too-many-requests',
    `${OPEN_IMPORTS} of your files are still being read. Wait until one is done, then upload again.`,
    { retryAfter: 10 },
  );
}

export interface RequestImport {
  readonly person: Person;
  readonly list: { readonly id: string; readonly programId: string; readonly code: string };
  readonly file: {
    readonly sha256: string;
    readonly bytes: number;
    readonly name: string;
    readonly lines: number;
  };
  readonly reason: string;
  /** How its columns are read, where not as the contract says. */
  readonly read?: { readonly mappingId: string; readonly mapping: Mapping; readonly acceptTotals: boolean };
}

/** Records a stored file as waiting to be read into a list, and queues the job that reads it. Returns the import's id. */
export async function requestImport(db: Db, input: RequestImport): Promise<string> {
  return db.transaction().execute((trx) => queueImport(trx, input));
}

/** `requestImport` in the caller's transaction. */
export async function queueImport(trx: Transaction<Database>, input: RequestImport): Promise<string> {
  const { person, list, file } = input;
  await assertMayImport(trx, person.userId);
  const id = newId();
  await trx
    .insertInto('stored_files')
    .values({ sha256: file.sha256, bytes: file.bytes })
    .onConflict((conflict) => conflict.column('sha256').doNothing())
    .execute();
  await trx
    .insertInto('imports')
    .values({
      id,
      list_id: list.id,
      file_sha256: file.sha256,
      file_name: file.name,
      reason: input.reason,
      // The header is no row; an estimate until the file has been read.
      of_rows: Math.max(0, file.lines - 1),
      created_by: person.userId,
    })
    .execute();
  if (input.read !== undefined) {
    const { mappingId, mapping, acceptTotals } = input.read;
    await trx
      .insertInto('import_mappings')
      .values({
        import_id: id,
        mapping_id: mappingId,
        mapping: JSON.stringify(mapping),
        accept_totals: acceptTotals,
      })
      .execute();
  }
  await recordEvent(trx, {
    scope: list.programId,
    actor: person,
    kind: 'import.requested',
    subject: list.code,
    detail: { list: list.code, file: file.name, sha256: file.sha256 },
  });
  await enqueue(trx, 'import-list', { importId: id }, { maxAttempts: 8, queue: `list:${list.id}` });
  return id;
}
