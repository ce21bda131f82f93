import { presenceSchema } from '@/lib/contracts/list-draft';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { loadPresence } from '@/lib/server/lists/draft/load-presence';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string };

/** Who has a draft of a list, and its newest revision. */
export const GET = programRoute<Params>('lists.read', async ({ params, person, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  return Response.json(presenceSchema.parse(await loadPresence(serverDb(), list, person)));
});
