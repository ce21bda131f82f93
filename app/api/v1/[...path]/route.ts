import { AppError } from '@/lib/errors';
import { openRoute } from '@/lib/server/http/api-route';

/** Whatever has no route of its own: a problem, where the framework would answer with a page. */
const nothingHere = openRoute(async ({ request }) => {
  const { pathname } = new URL(request.url);
  throw new AppError('not-found', `There is no ${pathname}. What there is stands in /api/v1/openapi.json.`);
});

export {
  nothingHere as DELETE,
  nothingHere as GET,
  nothingHere as PATCH,
  nothingHere as POST,
  nothingHere as PUT,
};
