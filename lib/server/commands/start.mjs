import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild, webEnvironment } from './local/build.mjs';
import { DEMO_PEOPLE } from './local/demo-people.mjs';
import { externalSettings } from './local/external.mjs';
import { Failure } from './local/failure.mjs';
import { claimData, releaseData } from './local/only-one.mjs';
import { ensurePackages } from './local/packages.mjs';
import { DATA, LOCAL_ENV } from './local/places.mjs';
import { isFree, nextFreePort } from './local/ports.mjs';
import { stopCluster } from './local/postgres.mjs';
import { localSecrets } from './local/secrets.mjs';

const dev = process.argv.includes('--dev');
// Whoever names a build of their own has made it, and it is served as it is.
const isBuilt = Boolean(process.env.NEXT_DIST_DIR);
const log = (name) => path.join(DATA, 'log', `${name}.log`);

let stopping = false;
let children = null;
let cluster = null;
let claimed = false;

/** Stops what this command has started, in the reverse order, and ends. */
async function shutDown(exitCode, message) {
  if (stopping) return;
  stopping = true;
  if (message) console.error(`\n${message}`);
  await children?.stop();
  if (cluster) stopCluster(cluster);
  if (claimed) releaseData();
  process.exit(exitCode);
}

let firstSignal = 0;
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    // npm passes on what the terminal has already sent, so only a later second one is impatience.
    if (firstSignal > 0 && Date.now() - firstSignal > 1500) children?.kill();
    firstSignal ||= Date.now();
    void shutDown(0, 'Stopping ...');
  });
}

const died = (message) => void shutDown(1, message);

async function prepare(env) {
  await children.finish({
    name: 'Preparing the database and the store',
    args: ['lib/server/commands/prepare.ts'],
    env,
    typescript: true,
  });
}

async function serve(settings, host, port) {
  const { answers } = await import('./local/children.mjs');
  const next = ['node_modules/next/dist/bin/next', dev ? 'dev' : 'start', '-H', host, '-p', String(port)];
  await children.serve(
    {
      name: 'The server',
      args: next,
      env: webEnvironment({ ...settings, NODE_ENV: dev ? 'development' : 'production' }),
    },
    () => answers(`http://${host === '0.0.0.0' ? '127.0.0.1' : host}:${port}/api/v1/health`),
    died,
  );
}

/** With services of the user's own: nothing local, no demo, the port exactly as asked. */
async function startWith(settings) {
  const host = process.env.HOST || '127.0.0.1';
  const port = Number(process.env.PORT || 3000);
  if (!(await isFree(port, host)))
    throw new Failure(`Port ${port} on ${host} is taken; set PORT to another.`);
  await prepare({ ...process.env, ...settings });
  if (!dev && !isBuilt) await ensureBuild(children, '.next', log('build'));
  await serve(settings, host, port);
  console.log(`\nPolhode serves ${settings.APP_URL} on ${host}:${port}.`);
  console.log('The first administrator is made by: npm run admin -- --email ...');
}

/** With local services: PostgreSQL, the S3 store and the mailbox of this clone, and the demo program. */
async function startLocal() {
  const { loadDemoOnce, prepareDatabase, startFakes, startPostgres } = await import('./local/services.mjs');
  mkdirSync(DATA, { recursive: true, mode: 0o711 });
  claimData();
  claimed = true;
  const secrets = localSecrets();
  const taken = new Set();
  const postgres = await startPostgres(secrets, taken);
  cluster = postgres.cluster;
  const databases = await prepareDatabase(cluster, postgres.port, secrets);
  const { settings, mailbox } = await startFakes(children, secrets, taken, died);
  const port = await nextFreePort(Number(process.env.PORT || 3000), taken);
  const all = { ...settings, ...databases, APP_URL: `http://127.0.0.1:${port}` };
  const lines = Object.entries(all).map(([name, value]) => `${name}=${value}\n`);
  writeFileSync(LOCAL_ENV, lines.join(''), { mode: 0o600 });

  await prepare({ ...process.env, ...all });
  await loadDemoOnce(children, cluster, { ...process.env, ...all, DEMO_PASSWORD: secrets.demo });
  if (!dev && !isBuilt) await ensureBuild(children, '.next', log('build'));
  await serve(all, '127.0.0.1', port);

  const people = DEMO_PEOPLE.map(({ email, role }) => `  ${email.padEnd(28)} ${role}`);
  // In one piece, so that the server's own lines do not fall between.
  console.log(
    [
      `\nPolhode is at       ${all.APP_URL}`,
      `Mail it sends is at ${mailbox}`,
      `Demo sign-ins, all with the password ${secrets.demo} :`,
      ...people,
      `The data stay in ${path.relative('', DATA)}. Ctrl-C stops everything.`,
    ].join('\n'),
  );
}

try {
  ensurePackages();
  const settings = externalSettings(process.env);
  const { Children } = await import('./local/children.mjs');
  children = new Children();
  if (settings) await startWith(settings);
  else await startLocal();
} catch (error) {
  // A signal in the middle of starting ends a child, which is then no failure of its own.
  if (!stopping) await shutDown(1, error instanceof Failure ? error.message : error.stack);
}
