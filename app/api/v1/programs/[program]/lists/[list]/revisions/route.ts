import { addRevisionEndpoint, revisionQuerySchema } from '@/lib/contracts/api/revisions';
import { addRevision } from '@/lib/server/api/add-revision';
import { idempotencyKey } from '@/lib/server/api/idempotency';
import { readQuery } from '@/lib/server/api/read-query';
import { respond } from '@/lib/server/api/respond';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

interface ListParams extends Record<string, string> {
  program: string;
  list: string;
}

const { scope, body } = addRevisionEndpoint;

export const POST = apiProgramRoute<ListParams>(
  { scope, action: 'lists.keep', maxBytes: body.maxBytes },
  async ({ request, params, caller, program }) => {
    const { reason } = readQuery(request, revisionQuerySchema);
    const id = await addRevision(serverDb(), {
      request,
      person: caller.person,
      program,
      list: params.list,
      reason,
      key: idempotencyKey(request.headers),
    });
    const url = `${env().APP_URL}/api/v1/imports/${id}`;
    return respond(addRevisionEndpoint, 202, { import: id, url }, { Location: url });
  },
);

export const { DELETE, GET, PATCH, PUT } = otherMethods('POST');
