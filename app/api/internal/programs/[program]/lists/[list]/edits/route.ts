import { saveEditsSchema, savedEditsSchema } from '@/lib/contracts/list-edits';
import { serverDb, writerPool } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { editRows } from '@/lib/server/lists/edit-rows';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string };

/** A set of edits becomes the list's next revision, or comes back with what is wrong in it. */
export const POST = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const input = await readJson(request, saveEditsSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  const saved = await editRows({ pool: writerPool(), db: serverDb() }, { person, list, ...input });
  return Response.json(savedEditsSchema.parse(saved));
});
