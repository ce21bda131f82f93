import { openapiEndpoint } from '@/lib/contracts/api/openapi';
import { openApiDocument } from '@/lib/server/api/openapi/document';
import { respond } from '@/lib/server/api/respond';
import { openRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

export const GET = openRoute(async () =>
  respond(openapiEndpoint, 200, openApiDocument(), { 'Cache-Control': 'public, max-age=300' }),
);

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
