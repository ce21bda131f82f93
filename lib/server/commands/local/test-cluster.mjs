import {
  chmodSync,
  existsSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { anyFreePort } from './ports.mjs';
import {
  clusterAt,
  createCluster,
  isReachable,
  runningPort,
  startCluster,
  stopCluster,
} from './postgres.mjs';
import { databaseUrl, ensureRoles, withClient } from './roles.mjs';
import { randomText } from './secrets.mjs';

const PREFIX = 'polhode-test-';
const KEEPER = 'keeper.pid';

/** @typedef {{ port: number, superuser: string, owner: string, app: string }} TestCluster port and passwords */

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    if (error.code === 'ESRCH') return false;
    if (error.code === 'EPERM') return true;
    throw error;
  }
}

function discard(home) {
  const cluster = clusterAt(path.join(home, 'cluster'));
  if (runningPort(cluster) !== null) stopCluster(cluster, 'immediate');
  rmSync(home, { recursive: true, force: true });
}

/** Removes clusters whose test run was killed before it could. */
function discardForsaken(place) {
  for (const name of readdirSync(place)) {
    const home = path.join(place, name);
    const keeper = path.join(home, KEEPER);
    if (!name.startsWith(PREFIX) || statSync(home).uid !== process.getuid?.() || !existsSync(keeper))
      continue;
    if (!isAlive(Number(readFileSync(keeper, 'utf8')))) discard(home);
  }
}

/**
 * A PostgreSQL cluster for one test run: fast and forgetful, with both roles. It goes when `stop` is called or the
 * process ends.
 * @returns {Promise<{ settings: TestCluster, stop: () => void }>}
 */
export async function startTestCluster() {
  const place = isReachable(os.tmpdir()) ? os.tmpdir() : '/var/tmp';
  discardForsaken(place);
  const home = mkdtempSync(path.join(place, PREFIX));
  chmodSync(home, 0o711);
  writeFileSync(path.join(home, KEEPER), String(process.pid));
  const cluster = clusterAt(path.join(home, 'cluster'));
  const passwords = { superuser: randomText(), owner: randomText(), app: randomText() };
  createCluster(cluster, { password: passwords.superuser, durable: false });
  const port = await anyFreePort();
  startCluster(cluster, port, { durable: false });
  let stopped = false;
  const stop = () => {
    if (stopped) return;
    stopped = true;
    discard(home);
  };
  process.once('exit', stop);
  await withClient(superuserUrl({ port, ...passwords }), (client) => ensureRoles(client, passwords));
  return { settings: { port, ...passwords }, stop };
}

/**
 * @param {TestCluster} cluster
 * @param {string} [database]
 */
export const superuserUrl = (cluster, database = 'postgres') =>
  databaseUrl('postgres', cluster.superuser, cluster.port, database);
