import { importStartedSchema } from '@/lib/contracts/list-imports';
import { importMappedSchema } from '@/lib/contracts/list-mapping';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { readJson } from '@/lib/server/http/read-json';
import { importMapped } from '@/lib/server/lists/mapping/import-mapped';
import { reachUpload } from '@/lib/server/lists/mapping/reach-upload';
import { reachList } from '@/lib/server/lists/reach-list';

type Params = { program: string; list: string; upload: string };

/** A file that waits for a mapping is given one: a job reads it, and the list remembers the mapping. */
export const POST = programRoute<Params>('lists.keep', async ({ request, params, person, program }) => {
  const { mapping, acceptTotals } = await readJson(request, importMappedSchema);
  const list = await reachList(serverDb(), program.id, params.list);
  const upload = await reachUpload(serverDb(), list, params.upload);
  const id = await importMapped(serverDb(), {
    person,
    list: { id: list.id, programId: program.id, code: list.code },
    upload,
    mapping,
    acceptTotals,
  });
  return Response.json(importStartedSchema.parse({ import: id }), { status: 202 });
});
