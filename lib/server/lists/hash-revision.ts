import { type Hash } from 'node:crypto';
import { type Db } from '@/db/client';
import { contentHead, contentLine } from './revision-writer';
import { componentOf } from './row-codec';
import { storedRows } from './stored-rows';

/** The content hash of a stored revision, computed anew from its declarations and rows. */
export async function hashRevision(db: Db, revisionId: string, hash: Hash): Promise<string> {
  const { declarations } = await db
    .selectFrom('list_revisions')
    .select('declarations')
    .where('id', '=', revisionId)
    .executeTakeFirstOrThrow();
  hash.update(contentHead(declarations));
  for await (const row of storedRows(db, revisionId)) hash.update(contentLine(componentOf(row)));
  return hash.digest('hex');
}
