import { renameViewSchema, savedViewsSchema } from '@/lib/contracts/saved-view';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { reachList } from '@/lib/server/lists/reach-list';
import { deleteView } from '@/lib/server/lists/views/delete-view';
import { loadViews } from '@/lib/server/lists/views/load-views';
import { renameView } from '@/lib/server/lists/views/rename-view';

type Params = { program: string; list: string; view: string };

/** Another name for one's own view; answers with all that one has. */
export const PATCH = programRoute<Params>('lists.read', async ({ request, params, person, program }) => {
  const { name } = await readJson(request, renameViewSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  await renameView(serverDb(), { person, list, view: params.view, name });
  return Response.json(savedViewsSchema.parse(await loadViews(serverDb(), list, person)));
});

/** Deletes one's own view; answers with those that are left. */
export const DELETE = programRoute<Params>('lists.read', async ({ params, person, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  await deleteView(serverDb(), { person, list, view: params.view });
  return Response.json(savedViewsSchema.parse(await loadViews(serverDb(), list, person)));
});
