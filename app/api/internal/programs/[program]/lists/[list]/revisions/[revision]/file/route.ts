import { AppError } from '@/lib/errors';
import { serverDb } from '@/lib/server/database';
import { attachment, streamOf } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';
import { reachList, reachRevision } from '@/lib/server/lists/reach-list';
import { openObject } from '@/lib/server/storage/open-object';

type Params = { program: string; list: string; revision: string };

/** The very bytes that a revision was read from. */
export const GET = programRoute<Params>('lists.read', async ({ params, program }) => {
  const db = serverDb();
  const revision = await reachRevision(db, await reachList(db, program.id, params.list), params.revision);
  if (revision.file_sha256 === null)
    throw new AppError('not-found', `Revision ${revision.number} was made by edits, not from a file.`);
  const bytes: AsyncIterable<Uint8Array> = await openObject(revision.file_sha256);
  return attachment(streamOf(bytes), {
    name: revision.file_name ?? `${params.list}-revision-${revision.number}.csv`,
    type: 'application/octet-stream',
  });
});
