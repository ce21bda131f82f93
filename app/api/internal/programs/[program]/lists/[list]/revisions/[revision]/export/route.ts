import { isFiltered, listViewOf } from '@/lib/contracts/list-view';
import { listFileName } from '@/lib/export/list-file-name';
import { serverDb } from '@/lib/server/database';
import { attachment, CSV_TYPE, streamOf } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';
import { exportColumnsOf, exportRows } from '@/lib/server/lists/export-rows';
import { markingOf, reachList, reachRevision } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; revision: string };

/** The rows of a view as a file: all rows and columns of the revision unless the query leaves some out. */
export const GET = programRoute<Params>('lists.read', async ({ request, params, program }) => {
  const db = serverDb();
  const list = await reachList(db, program.id, params.list);
  const revision = await reachRevision(db, list, params.revision);
  const query = new URL(request.url).searchParams;
  const view = listViewOf(query);
  const columns = exportColumnsOf(query);
  return attachment(streamOf(exportRows(db, revision, view, markingOf(list, revision), columns)), {
    name: listFileName({
      program: program.code,
      list: list.code,
      revision: revision.number,
      isPart: isFiltered(view) || columns.length > 0,
      declarations: revision.declarations,
    }),
    type: CSV_TYPE,
  });
});
