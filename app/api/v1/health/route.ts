import { healthEndpoint } from '@/lib/contracts/api/health';
import { requireReady } from '@/lib/server/api/readiness';
import { respond } from '@/lib/server/api/respond';
import { openRoute } from '@/lib/server/http/api-route';

export const GET = openRoute(async () => {
  await requireReady();
  return respond(healthEndpoint, 200, { live: true, ready: true }, { 'Cache-Control': 'no-store' });
});
