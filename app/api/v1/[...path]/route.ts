import { AppError } from '@/lib/errors';
import { openRoute } from '@/lib/server/http/api-route';

const refuse = openRoute(async ({ request }) => {
  const { pathname } = new URL(request.url);
  throw new AppError('not-found', `There is no ${pathname}. What there is stands in /api/v1/openapi.json.`);
});

/** Whatever has no route of its own: a problem, where the framework would answer with a page. */
const nothingHere = (request: Request): Promise<Response> => refuse(request, { params: Promise.resolve({}) });

export {
  nothingHere as DELETE,
  nothingHere as GET,
  nothingHere as PATCH,
  nothingHere as POST,
  nothingHere as PUT,
};
