import { type Instrumentation } from 'next';

// The framework loads this file more than once in a process; there must be one runner.
const holder = globalThis as typeof globalThis & { polhodeRunner?: Promise<unknown> };

/** Once per server process, before the first request. */
export async function register(): Promise<void> {
  if (process.env['NEXT_RUNTIME'] !== 'nodejs' || holder.polhodeRunner !== undefined) return;
  const [{ markPeerAddresses }, { startRunner }, { CRON, TASKS }, { serverDb, serverPool }, { env }] =
    await Promise.all([
      import('@/lib/server/http/client-address'),
      import('@/lib/server/jobs/runner'),
      import('@/lib/server/jobs/task-list'),
      import('@/lib/server/database'),
      import('@/lib/server/env'),
    ]);
  markPeerAddresses();
  holder.polhodeRunner = startRunner({
    databaseUrl: env().DATABASE_URL,
    pool: serverPool(),
    db: serverDb(),
    tasks: TASKS,
    cron: CRON,
  });
  await holder.polhodeRunner;
}

/** The route is named, not the address asked for: that may hold the secret of a mail link. */
export const onRequestError: Instrumentation.onRequestError = async (error, request, context) => {
  const { log } = await import('@/lib/server/log');
  const digest = error instanceof Error && 'digest' in error ? error.digest : undefined;
  log.error({ err: error, digest, method: request.method, route: context.routePath }, 'request failed');
};
