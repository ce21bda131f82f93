import {
  declarationsOfQuery,
  rollUpAnswer,
  rollUpEndpoint,
  rollUpQuerySchema,
} from '@/lib/contracts/api/roll-ups';
import { rollUpList } from '@/lib/ingest/roll-up-list';
import { csvBytes } from '@/lib/server/api/csv-bytes';
import { readQuery } from '@/lib/server/api/read-query';
import { respond } from '@/lib/server/api/respond';
import { wrongFile } from '@/lib/server/api/wrong-file';
import { apiRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';

const { scope, body } = rollUpEndpoint;

export const POST = apiRoute(
  { scope, limit: RATE_POLICIES.rollUps, maxBytes: body.maxBytes },
  async ({ request }) => {
    const query = readQuery(request, rollUpQuerySchema);
    const declarations = declarationsOfQuery(query);
    const rolled = await rollUpList(csvBytes(request, body.maxBytes), declarations);
    if ('problems' in rolled) throw wrongFile(rolled);
    return respond(rollUpEndpoint, 200, rollUpAnswer(rolled, declarations, query.units));
  },
);

export const { DELETE, GET, PATCH, PUT } = otherMethods('POST');
