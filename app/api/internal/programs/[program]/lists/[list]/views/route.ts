import { savedViewsSchema, saveViewSchema } from '@/lib/contracts/saved-view';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { reachList } from '@/lib/server/lists/reach-list';
import { loadViews } from '@/lib/server/lists/views/load-views';
import { saveView } from '@/lib/server/lists/views/save-view';

type Params = { program: string; list: string };

/** Keeps a view of a list for oneself; answers with all that one has. */
export const POST = programRoute<Params>('lists.read', async ({ request, params, person, program }) => {
  const view = await readJson(request, saveViewSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  await saveView(serverDb(), { person, list, view });
  return Response.json(savedViewsSchema.parse(await loadViews(serverDb(), list, person)));
});
