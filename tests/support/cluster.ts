import { type TestCluster } from '@/lib/server/commands/local/test-cluster.mjs';

export const TEMPLATE = 'polhode_template';

/** The PostgreSQL cluster of this test run, as `services.setup.ts` has left it in the environment. */
export function testCluster(): TestCluster {
  const text = process.env['POLHODE_TEST_CLUSTER'];
  if (!text) throw new Error('No test cluster: only tests in tests/server, db, api and browser have one.');
  return JSON.parse(text) as TestCluster;
}
