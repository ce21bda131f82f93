import { type Hash } from 'node:crypto';
import { type Db } from '@/db/client';
import { type ContentFormat } from '@/db/schema/lists';
import { contentHead, contentLine } from './content-hash';
import { RowBytes } from './row-bytes';
import { componentOf, type StoredRow } from './row-codec';
import { storedRows } from './stored-rows';

/** The content hash of a stored revision, computed anew from its declarations and rows in the format that it has. */
export async function hashRevision(db: Db, revisionId: string, hash: Hash): Promise<string> {
  const { declarations, content_format: format } = await db
    .selectFrom('list_revisions')
    .select(['declarations', 'content_format'])
    .where('id', '=', revisionId)
    .executeTakeFirstOrThrow();
  hash.update(contentHead(declarations));
  const update = updater(format, hash);
  for await (const row of storedRows(db, revisionId)) update(row);
  return hash.digest('hex');
}

function updater(format: ContentFormat, hash: Hash): (row: StoredRow) => void {
  if (format === 1) return (row) => hash.update(contentLine(componentOf(row)));
  const bytes = new RowBytes(4096);
  return (row) => {
    bytes.clear();
    bytes.add(componentOf(row));
    hash.update(bytes.written);
  };
}
