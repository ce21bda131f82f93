import { draftSchema, patchDraftSchema, patchedDraftSchema } from '@/lib/contracts/list-draft';
import { AppError } from '@/lib/errors';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { loadDraft } from '@/lib/server/lists/draft/load-draft';
import { patchDraft } from '@/lib/server/lists/draft/patch-draft';
import { throwAwayDraft } from '@/lib/server/lists/draft/throw-away-draft';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string };

/** One's own draft of a list; null where there is none. */
export const GET = programRoute<Params>('lists.keep', async ({ params, person, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  return Response.json(draftSchema.nullable().parse(await loadDraft(serverDb(), list, person)));
});

/** A few edits more, or fewer, in the version of the draft that was seen. */
export const PATCH = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const patch = await readJson(request, patchDraftSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  return Response.json(patchedDraftSchema.parse(await patchDraft(serverDb(), { person, list, patch })));
});

/** Throws the draft away in the version that was seen: `?version=`. */
export const DELETE = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const version = new URL(request.url).searchParams.get('version') ?? '';
  if (!/^[1-9]\d{0,8}$/.test(version))
    throw new AppError('invalid-request', 'Say which version of the draft.');
  const list = await reachList(serverDb(), program.id, params.list);
  await throwAwayDraft(serverDb(), { person, list, version: Number(version) });
  return Response.json({});
});
