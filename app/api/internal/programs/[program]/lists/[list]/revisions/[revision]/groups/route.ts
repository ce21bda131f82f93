import { groupingAsked, rowGroupsSchema } from '@/lib/contracts/list-groups';
import { listViewOf } from '@/lib/contracts/list-view';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { loadGroups } from '@/lib/server/lists/load-groups';
import { reachList, reachRevision } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; revision: string };

/** The rows of a view by the values of a column, `by`. */
export const GET = programRoute<Params>('lists.read', async ({ request, params, program }) => {
  const db = serverDb();
  const query = new URL(request.url).searchParams;
  const revision = await reachRevision(db, await reachList(db, program.id, params.list), params.revision);
  return Response.json(
    rowGroupsSchema.parse(await loadGroups(db, revision, listViewOf(query), groupingAsked(query))),
  );
});
