import { sampleSchema } from '@/lib/contracts/list-mapping';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { sampleOf } from '@/lib/server/lists/mapping/file-rows';
import { orRefused, reachUpload } from '@/lib/server/lists/mapping/reach-upload';
import { reachList } from '@/lib/server/lists/reach-list';
import { openObject } from '@/lib/server/storage/open-object';

type Params = { program: string; list: string; upload: string };

/** The first and last rows of a file that waits for a mapping; of a workbook those of the sheet that `sheet` names. */
export const GET = programRoute<Params>('lists.keep', async ({ request, params, program }) => {
  const list = await reachList(serverDb(), program.id, params.list);
  const upload = await reachUpload(serverDb(), list, params.upload);
  const sheet = new URL(request.url).searchParams.get('sheet');
  const sample = await orRefused(sampleOf(await openObject(upload.file_sha256), sheet));
  return Response.json(sampleSchema.parse(sample));
});
