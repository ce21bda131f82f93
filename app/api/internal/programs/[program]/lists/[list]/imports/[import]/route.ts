import { importSchema } from '@/lib/contracts/list-imports';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { cancelImport } from '@/lib/server/lists/cancel-import';
import { importOf } from '@/lib/server/lists/import-view';
import { reachImport, reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; import: string };

/** How far an import has come, and what came of it. */
export const GET = programRoute<Params>('lists.read', async ({ params, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  const found = await reachImport(serverDb(), list, params.import);
  return Response.json(importSchema.parse(importOf(found, list, new Date())));
});

/** Calls it off. */
export const DELETE = programRoute<Params>('lists.keep', async ({ params, person, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  const found = await reachImport(serverDb(), list, params.import);
  await cancelImport(serverDb(), { person, list, found });
  const now = await reachImport(serverDb(), list, params.import);
  return Response.json(importSchema.parse(importOf(now, list, new Date())));
});
