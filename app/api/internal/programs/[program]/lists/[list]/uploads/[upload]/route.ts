import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { dropUpload } from '@/lib/server/lists/mapping/keep-upload';
import { reachUpload } from '@/lib/server/lists/mapping/reach-upload';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; upload: string };

/** A file that waits for a mapping is dropped. */
export const DELETE = programRoute<Params>('lists.keep', async ({ params, person, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  const upload = await reachUpload(serverDb(), list, params.upload);
  await dropUpload(serverDb(), { person, list: { programId: program.id, code: list.code }, upload });
  return Response.json({ dropped: true });
});
