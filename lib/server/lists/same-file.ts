import canonicalize from 'canonicalize';
import { type Db } from '@/db/client';
import { type Import, type List } from '@/db/queries/lists';
import { mappedImportOf, mappingOfImport } from '@/db/queries/mappings';

/**
 * The list's newest revision, if it was made of these very bytes, read in the same way and stated in the same frame issue: then the
 * file brings nothing new. Null otherwise.
 */
export async function revisionOfSameFile(
  db: Db,
  list: Pick<List, 'id' | 'declarations' | 'frame_issue_id'>,
  found: Pick<Import, 'id' | 'file_sha256'>,
): Promise<string | null> {
  const newest = await db
    .selectFrom('list_revisions')
    .select(['id', 'file_sha256', 'declarations', 'frame_issue_id'])
    .where('list_id', '=', list.id)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirst();
  if (newest === undefined || newest.file_sha256 !== found.file_sha256) return null;
  if (newest.frame_issue_id !== list.frame_issue_id) return null;
  if (canonicalize(newest.declarations) !== canonicalize(list.declarations)) return null;
  const former = await mappedImportOf(db, newest.id);
  const [before, now] = [former === null ? null : await wayOf(db, former), await wayOf(db, found.id)];
  return before === now ? newest.id : null;
}

async function wayOf(db: Db, importId: string): Promise<string | null> {
  const mapped = await mappingOfImport(db, importId);
  return mapped === undefined ? null : (canonicalize([mapped.mapping, mapped.accept_totals]) ?? null);
}
