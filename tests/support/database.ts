import { randomBytes } from 'node:crypto';
import { APP, createDatabase, databaseUrl, OWNER, withClient } from '@/lib/server/commands/local/roles.mjs';
import { superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { TEMPLATE, testCluster } from './cluster';

export interface TestDatabase {
  /** The application role's connection. */
  readonly appUrl: string;
  /** The owner's connection. */
  readonly ownerUrl: string;
  readonly drop: () => Promise<void>;
}

/**
 * A migrated, empty database of the caller's own. It also becomes this process's DATABASE_URL, so that code which asks
 * `env()` gets it; make one per test file, before anything else touches the database.
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const cluster = testCluster();
  const name = `test_${randomBytes(6).toString('hex')}`;
  await withClient(superuserUrl(cluster), (client) => createDatabase(client, name, TEMPLATE));
  const appUrl = databaseUrl(APP, cluster.app, cluster.port, name);
  process.env['DATABASE_URL'] = appUrl;
  return {
    appUrl,
    ownerUrl: databaseUrl(OWNER, cluster.owner, cluster.port, name),
    drop: () =>
      withClient(superuserUrl(cluster), async (client) => {
        await client.query(`drop database ${client.escapeIdentifier(name)} with (force)`);
      }),
  };
}
