import { createHash } from 'node:crypto';
import { existsSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { saysReady } from './children.mjs';
import { Failure } from './failure.mjs';
import { DATA } from './places.mjs';
import { nextFreePort } from './ports.mjs';
import { clusterAt, createCluster, isReachable, runningPort, startCluster } from './postgres.mjs';
import { APP, createDatabase, databaseUrl, ensureRoles, OWNER, withClient } from './roles.mjs';

const DATABASE = 'polhode';
const INVALID_PASSWORD = '28P01';

/** The folder of the cluster: in the clone, or where PostgreSQL's user can get to. */
function clusterHome() {
  if (isReachable(DATA)) return path.join(DATA, 'postgres');
  const clone = createHash('sha256').update(DATA).digest('hex').slice(0, 12);
  const home = path.join('/var/tmp', `polhode-${clone}`);
  console.log(`PostgreSQL's user cannot reach ${DATA}; the database is kept in ${home}.`);
  return home;
}

/**
 * Starts PostgreSQL, or takes over the one that a killed run left.
 * @param {ReturnType<typeof import('./secrets.mjs').localSecrets>} secrets
 * @param {Set<number>} taken
 */
export async function startPostgres(secrets, taken) {
  const cluster = clusterAt(clusterHome());
  createCluster(cluster, { password: secrets.superuser, durable: true });
  let port = runningPort(cluster);
  if (port === null) {
    port = await nextFreePort(54320, taken);
    startCluster(cluster, port, { durable: true });
  }
  return { cluster, port };
}

/**
 * Makes both roles and the database if they are not there, and returns the two addresses.
 * @param {import('./postgres.mjs').Cluster} cluster
 * @param {number} port
 * @param {ReturnType<typeof import('./secrets.mjs').localSecrets>} secrets
 */
export async function prepareDatabase(cluster, port, secrets) {
  const superuser = databaseUrl('postgres', secrets.superuser, port, 'postgres');
  try {
    await withClient(superuser, async (client) => {
      await ensureRoles(client, secrets);
      const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [DATABASE]);
      if (rowCount === 0) await createDatabase(client, DATABASE);
    });
  } catch (error) {
    if (error.code !== INVALID_PASSWORD) throw error;
    throw new Failure(
      `The database in ${cluster.home} does not take the password in .data/secrets.json: it is another clone's, or ` +
        `that file was lost. Remove ${cluster.home} to begin with an empty one.`,
    );
  }
  return {
    DATABASE_URL: databaseUrl(APP, secrets.app, port, DATABASE),
    MIGRATION_DATABASE_URL: databaseUrl(OWNER, secrets.owner, port, DATABASE),
  };
}

/**
 * Starts the local S3 and mail services as processes of their own and returns the settings that lead to them.
 * @param {import('./children.mjs').Children} children
 * @param {ReturnType<typeof import('./secrets.mjs').localSecrets>} secrets
 * @param {Set<number>} taken
 * @param {(message: string) => void} onDeath
 */
export async function startFakes(children, secrets, taken, onDeath) {
  const s3Port = await nextFreePort(9000, taken);
  const smtpPort = await nextFreePort(1025, taken);
  const mailboxPort = await nextFreePort(8025, taken);
  const s3 = {
    S3_ENDPOINT: `http://127.0.0.1:${s3Port}`,
    S3_REGION: 'us-east-1',
    S3_BUCKET: 'polhode',
    S3_ACCESS_KEY_ID: secrets.s3AccessKeyId,
    S3_SECRET_ACCESS_KEY: secrets.s3SecretAccessKey,
  };
  await Promise.all([
    children.serve(
      {
        name: 'The local S3 store',
        args: ['lib/server/fakes/s3/main.ts', String(s3Port), path.join(DATA, 's3')],
        env: { ...process.env, ...s3 },
        log: path.join(DATA, 'log', 's3.log'),
        typescript: true,
      },
      saysReady,
      onDeath,
    ),
    children.serve(
      {
        name: 'The local mailbox',
        args: [
          'lib/server/fakes/mail/main.ts',
          String(smtpPort),
          String(mailboxPort),
          path.join(DATA, 'mail'),
        ],
        env: process.env,
        log: path.join(DATA, 'log', 'mail.log'),
        typescript: true,
      },
      saysReady,
      onDeath,
    ),
  ]);
  const mailbox = `http://127.0.0.1:${mailboxPort}`;
  const mail = { SMTP_URL: `smtp://127.0.0.1:${smtpPort}`, MAIL_FROM: 'Polhode <no-reply@skerry.example>' };
  return { settings: { ...s3, ...mail }, mailbox };
}

/**
 * Loads the demo into a database that has not had it; what says so lies beside the cluster and goes with it.
 * @param {import('./children.mjs').Children} children
 * @param {import('./postgres.mjs').Cluster} cluster
 * @param {NodeJS.Dict<string>} env
 */
export async function loadDemoOnce(children, cluster, env) {
  const stamp = path.join(cluster.home, 'demo-loaded');
  if (existsSync(stamp)) return;
  console.log('Loading the demo program ...');
  await children.finish({
    name: 'Loading the demo',
    args: ['lib/server/commands/seed-demo.ts'],
    env,
    typescript: true,
  });
  writeFileSync(stamp, `${new Date().toISOString()}\n`);
}
