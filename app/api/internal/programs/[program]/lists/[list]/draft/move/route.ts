import { moveDraftSchema, movedDraftSchema } from '@/lib/contracts/list-draft';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { moveDraft } from '@/lib/server/lists/draft/move-draft';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string };

/** Carries one's draft over to a newer revision, or comes back with the rows that both changed. */
export const POST = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const input = await readJson(request, moveDraftSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  return Response.json(movedDraftSchema.parse(await moveDraft(serverDb(), { person, list, ...input })));
});
