import { saveDraftSchema, savedDraftSchema } from '@/lib/contracts/list-draft';
import { serverDb, writerPool } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { saveDraft } from '@/lib/server/lists/draft/save-draft';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string };

/** One's draft becomes the list's next revision, or comes back with what is wrong in it or what both changed. */
export const POST = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const input = await readJson(request, saveDraftSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  const saved = await saveDraft({ pool: writerPool(), db: serverDb() }, { person, list, ...input });
  return Response.json(savedDraftSchema.parse(saved));
});
