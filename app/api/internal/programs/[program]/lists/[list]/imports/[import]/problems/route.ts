import { serverDb } from '@/lib/server/database';
import { attachment, CSV_TYPE } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';
import { problemsCsv } from '@/lib/server/lists/problems-csv';
import { reachImport, reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; import: string };

/** The problems of a refused file as a file of their own. */
export const GET = programRoute<Params>('lists.read', async ({ params, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  const found = await reachImport(serverDb(), list, params.import);
  const name = found.file_name.replace(/\.[^.]*$/, '');
  return attachment(problemsCsv(found.problems ?? [], list.marking), {
    name: `${name}-problems.csv`,
    type: CSV_TYPE,
  });
});
