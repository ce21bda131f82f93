import { rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild, webEnvironment } from '@/lib/server/commands/local/build.mjs';
import { answers, Children } from '@/lib/server/commands/local/children.mjs';
import { TEST_DATA } from '@/lib/server/commands/local/places.mjs';
import { anyFreePort } from '@/lib/server/commands/local/ports.mjs';

const DIST_DIR = '.test-data/next';

export interface RunningWeb {
  readonly url: string;
  /** Ends it as a deployment would: SIGTERM, and waits. */
  readonly stop: () => Promise<void>;
  /** Ends it as a power cut would: SIGKILL. */
  readonly kill: () => void;
}

/**
 * Builds the application if its sources have changed since, and starts it as `npm start` would on the given database,
 * with this test run's store and mailbox. `name` names its log in .test-data.
 */
export async function startWeb(
  name: string,
  databaseUrl: string,
  settings: Readonly<Record<string, string>> = {},
): Promise<RunningWeb> {
  const children = new Children();
  await ensureBuild(children, DIST_DIR, path.join(TEST_DATA, 'build.log'));
  const port = await anyFreePort();
  const url = `http://127.0.0.1:${port}`;
  const log = path.join(TEST_DATA, `${name}.log`);
  rmSync(log, { force: true });
  await children.serve(
    {
      name: 'The server under test',
      args: ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', String(port)],
      env: webEnvironment({
        LOG_LEVEL: 'info',
        DATABASE_URL: databaseUrl,
        APP_URL: url,
        NODE_ENV: 'production',
        NEXT_DIST_DIR: DIST_DIR,
        ...settings,
      }),
      log,
    },
    () => answers(`${url}/api/v1/health`),
    (message) => console.error(message),
  );
  return { url, stop: () => children.stop(), kill: () => children.kill() };
}
