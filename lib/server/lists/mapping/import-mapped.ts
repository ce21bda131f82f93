import { isDeepStrictEqual } from 'node:util';
import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { type PendingUpload, rememberedMapping } from '@/db/queries/mappings';
import { type Database } from '@/db/schema/database';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { newId } from '@/lib/server/ids';
import { queueImport } from '@/lib/server/lists/request-import';
import { settledAlready } from './keep-upload';
import { headingsSha256 } from './remembered';

export interface ImportMapped {
  readonly person: Person;
  readonly list: { readonly id: string; readonly programId: string; readonly code: string };
  readonly upload: PendingUpload;
  readonly mapping: Mapping;
  readonly acceptTotals: boolean;
}

/**
 * Has a pending upload read by a mapping, which the list remembers for these headings from now on. Returns the import's id.
 * @throws AppError conflict when the upload is imported or dropped already.
 */
export async function importMapped(db: Db, input: ImportMapped): Promise<string> {
  const { person, list, upload, mapping, acceptTotals } = input;
  return db.transaction().execute(async (trx) => {
    const mappingId = await remember(trx, input);
    const importId = await queueImport(trx, {
      person,
      list,
      file: { sha256: upload.file_sha256, bytes: upload.bytes, name: upload.file_name, lines: upload.lines },
      reason: upload.reason,
      read: { mappingId, mapping, acceptTotals },
    });
    const { numUpdatedRows } = await trx
      .updateTable('pending_uploads')
      .set({ import_id: importId })
      .where('id', '=', upload.id)
      .where('import_id', 'is', null)
      .where('dropped_at', 'is', null)
      .executeTakeFirst();
    if (numUpdatedRows !== 1n) throw settledAlready();
    return importId;
  });
}

/** The id of the remembered mapping when it says the same, else of a new one. */
async function remember(
  trx: Transaction<Database>,
  { person, list, upload, mapping }: ImportMapped,
): Promise<string> {
  const key = headingsSha256(mapping.columns.map(({ heading }) => heading));
  const kept = await rememberedMapping(trx, list.id, key);
  if (kept !== undefined && isDeepStrictEqual(rules(kept.mapping), rules(mapping))) return kept.id;
  const id = newId();
  await trx
    .insertInto('list_mappings')
    .values({
      id,
      list_id: list.id,
      headings_sha256: key,
      mapping: JSON.stringify(mapping),
      created_by: person.userId,
    })
    .execute();
  await recordEvent(trx, {
    scope: list.programId,
    actor: person,
    kind: 'list.mapped',
    subject: list.code,
    detail: { list: list.code, file: upload.file_name, mapping: id, headingsSha256: key },
  });
  return id;
}

/** What a mapping says whatever file it is for. */
function rules({ columns, numbers, per, leaveOut }: Mapping) {
  return { to: columns.map(({ to }) => to), numbers, per, leaveOut };
}
