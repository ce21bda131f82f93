import { fileTakenSchema, uploadQuerySchema } from '@/lib/contracts/list-imports';
import { LIST_BYTES } from '@/lib/ingest/limits';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { inputErrorOf } from '@/lib/server/http/read-json';
import { reachList } from '@/lib/server/lists/reach-list';
import { receiveFile } from '@/lib/server/lists/receive-file';
import { takeFile } from '@/lib/server/lists/mapping/take-file';
import { assertMayImport } from '@/lib/server/lists/request-import';

type Params = { program: string; list: string };

/** A file becomes the list's next revision: it is stored here and read by a job, or waits for a mapping. The reason stands in the query. */
export const POST = programRoute<Params>(
  'lists.keep',
  async ({ request, params, person, program }) => {
    const query = uploadQuerySchema.safeParse(Object.fromEntries(new URL(request.url).searchParams));
    if (!query.success) throw inputErrorOf(query.error);
    const list = await reachList(serverDb(), program.id, params.list);
    await assertMayImport(serverDb(), person.userId);
    const file = await receiveFile(request, { maxBytes: LIST_BYTES });
    const taken = await takeFile(
      serverDb(),
      {
        person,
        list: { id: list.id, programId: program.id, code: list.code },
        file,
        reason: query.data.reason,
      },
      query.data.by === 'hand',
    );
    return Response.json(fileTakenSchema.parse(taken), { status: 202 });
  },
  { maxBytes: LIST_BYTES },
);
