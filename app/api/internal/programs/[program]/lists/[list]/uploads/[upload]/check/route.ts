import { checkMappingSchema, mappingCheckSchema } from '@/lib/contracts/list-mapping';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { checkMapping } from '@/lib/server/lists/mapping/check-mapping';
import { orRefused, reachUpload } from '@/lib/server/lists/mapping/reach-upload';
import { reachList } from '@/lib/server/lists/reach-list';
import { openObject } from '@/lib/server/storage/open-object';

type Params = { program: string; list: string; upload: string };

/** Reads the whole file by a mapping and tells what an import would find. */
export const POST = programRoute<Params>('lists.keep', async ({ request, params, program }) => {
  const { mapping } = await readJson(request, checkMappingSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  const upload = await reachUpload(serverDb(), list, params.upload);
  const bytes = await openObject(upload.file_sha256);
  const check = await orRefused(checkMapping(bytes, mapping, list.declarations));
  return Response.json(mappingCheckSchema.parse(check));
});
