import { pageOfView } from '@/db/queries/list-rows';
import { offsetOf, type RowPage, ROWS_PER_PAGE } from '@/lib/contracts/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { reachList, reachRevision } from '@/lib/server/lists/reach-list';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { filterOf, orderOf, rowReader } from '@/lib/server/lists/row-view';

type Params = { program: string; list: string; revision: string };

/** One page of the rows of a revision, filtered and in order as the query says. */
export const GET = programRoute<Params>('lists.read', async ({ request, params, program }) => {
  const db = serverDb();
  const query = new URL(request.url).searchParams;
  const revision = await reachRevision(db, await reachList(db, program.id, params.list), params.revision);
  const view = listViewOf(query);
  const groups = await revisionGroups(db, revision.id);
  const filter = filterOf(view, revision.findings, groups);
  const offset = offsetOf(query.get('offset'));
  const { total, rows } = await pageOfView(db, revision.id, filter, orderOf(view, revision.declarations), {
    offset,
    limit: ROWS_PER_PAGE,
  });
  const page: RowPage = { offset, total, rows: rows.map(rowReader(revision.declarations, groups)) };
  return Response.json(page);
});
