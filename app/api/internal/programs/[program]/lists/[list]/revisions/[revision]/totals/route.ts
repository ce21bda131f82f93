import { type RowTotals } from '@/lib/contracts/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { geometryOfRevision, reachList, reachRevision } from '@/lib/server/lists/reach-list';
import { totalsOfView } from '@/lib/server/lists/row-totals';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { filterOf } from '@/lib/server/lists/row-view';

type Params = { program: string; list: string; revision: string };

/** Totals over the rows that the query leaves in. */
export const GET = programRoute<Params>('lists.read', async ({ request, params, program }) => {
  const db = serverDb();
  const list = await reachList(db, program.id, params.list);
  const revision = await reachRevision(db, list, params.revision);
  const filter = filterOf(
    listViewOf(new URL(request.url).searchParams),
    revision.findings,
    await revisionGroups(db, revision.id),
  );
  const frame = { declarations: revision.declarations, geometry: await geometryOfRevision(db, revision) };
  const totals: RowTotals = await totalsOfView(db, revision.id, filter, frame);
  return Response.json(totals);
});
