import { countChanges } from '@/db/queries/list-changes';
import { findRevision } from '@/db/queries/lists';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { reachList, reachRevision } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; revision: string };

/** How many rows a revision adds, removes and changes against the one before it. */
export const GET = programRoute<Params>('lists.read', async ({ params, program }) => {
  const db = serverDb();
  const list = await reachList(db, program.id, params.list);
  const revision = await reachRevision(db, list, params.revision);
  const before = await findRevision(db, list.id, revision.number - 1);
  const counts =
    before === undefined
      ? { added: revision.rows, removed: 0, changed: 0 }
      : await countChanges(db, before.id, revision.id);
  // Both revisions stay as they are for good.
  return Response.json(counts, { headers: { 'Cache-Control': 'private, max-age=86400' } });
});
