import { type Selectable } from 'kysely';
import { type Db } from '@/db/client';
import { type PendingUploadsTable } from '@/db/schema/mappings';

export type PendingUpload = Selectable<PendingUploadsTable>;

/** The mapping that a list remembers for these headings, with who made it; undefined before the first. */
export function rememberedMapping(db: Db, listId: string, headingsSha256: string) {
  return db
    .selectFrom('list_mappings')
    .innerJoin('users', 'users.id', 'list_mappings.created_by')
    .select(['list_mappings.id', 'mapping', 'list_mappings.created_at', 'users.name as author'])
    .where('list_id', '=', listId)
    .where('headings_sha256', '=', headingsSha256)
    .orderBy('list_mappings.created_at', 'desc')
    .limit(1)
    .executeTakeFirst();
}

/** How the file of an import was read: its mapping with who made it, and what was left out once it is done; undefined without one. */
export function mappingOfImport(db: Db, importId: string) {
  return db
    .selectFrom('import_mappings')
    .innerJoin('list_mappings', 'list_mappings.id', 'import_mappings.mapping_id')
    .innerJoin('users', 'users.id', 'list_mappings.created_by')
    .leftJoin('import_readings', 'import_readings.import_id', 'import_mappings.import_id')
    .select([
      'import_mappings.mapping',
      'import_mappings.accept_totals',
      'list_mappings.created_at',
      'users.name as author',
      'import_readings.left_out',
      'import_readings.totals',
    ])
    .where('import_mappings.import_id', '=', importId)
    .executeTakeFirst();
}

/** The import that a revision was made by, if it was read by a mapping. */
export async function mappedImportOf(db: Db, revisionId: string): Promise<string | null> {
  const found = await db
    .selectFrom('imports')
    .innerJoin('import_mappings', 'import_mappings.import_id', 'imports.id')
    .select('imports.id')
    .where('revision_id', '=', revisionId)
    .executeTakeFirst();
  return found?.id ?? null;
}

/** Of a list's revisions that were read by a mapping: the import of each, by the revision's id. */
export async function mappedImportsOf(db: Db, listId: string): Promise<Map<string, string>> {
  const found = await db
    .selectFrom('imports')
    .innerJoin('import_mappings', 'import_mappings.import_id', 'imports.id')
    .select(['imports.id', 'revision_id'])
    .where('list_id', '=', listId)
    .where('revision_id', 'is not', null)
    .execute();
  return new Map(found.map(({ id, revision_id: revision }) => [revision ?? '', id]));
}

export function findPendingUpload(db: Db, id: string): Promise<PendingUpload | undefined> {
  return db.selectFrom('pending_uploads').selectAll().where('id', '=', id).executeTakeFirst();
}

/** The files of a list that wait for a mapping, newest first, with who sent them. */
export function openUploadsOf(db: Db, listId: string) {
  return db
    .selectFrom('pending_uploads')
    .innerJoin('users', 'users.id', 'pending_uploads.created_by')
    .select(['pending_uploads.id', 'file_name', 'pending_uploads.created_at', 'users.name as author'])
    .where('list_id', '=', listId)
    .where('import_id', 'is', null)
    .where('dropped_at', 'is', null)
    .orderBy('pending_uploads.created_at', 'desc')
    .execute();
}
