import { healthEndpoint } from '@/lib/contracts/api/health';
import { requireReady } from '@/lib/server/api/readiness';
import { respond } from '@/lib/server/api/respond';
import { openRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

export const GET = openRoute(async () => {
  await requireReady();
  return respond(healthEndpoint, 200, { live: true, ready: true }, { 'Cache-Control': 'no-store' });
});

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
