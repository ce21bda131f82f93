import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { migrateToLatest } from '@/db/migrate';
import { APP, createDatabase, databaseUrl, OWNER, withClient } from '@/lib/server/commands/local/roles.mjs';
import { randomText } from '@/lib/server/commands/local/secrets.mjs';
import { startTestCluster, superuserUrl } from '@/lib/server/commands/local/test-cluster.mjs';
import { startMailFake } from '@/lib/server/fakes/mail/server';
import { startS3Fake } from '@/lib/server/fakes/s3/server';
import { createStore } from '@/lib/server/storage/client';
import { ensureBucket } from '@/lib/server/storage/bucket';
import { TEMPLATE, testCluster } from './cluster';

type Stop = () => void | Promise<void>;

/** A cluster, unless the command that runs the tests, or another project's setup, has given one. */
async function provideCluster(): Promise<Stop> {
  if (process.env['POLHODE_TEST_CLUSTER']) return () => undefined;
  const { settings, stop } = await startTestCluster();
  process.env['POLHODE_TEST_CLUSTER'] = JSON.stringify(settings);
  return stop;
}

async function provideTemplate(): Promise<void> {
  const cluster = testCluster();
  const isNew = await withClient(superuserUrl(cluster), async (client) => {
    const { rowCount } = await client.query('select 1 from pg_database where datname = $1', [TEMPLATE]);
    if (rowCount === 0) await createDatabase(client, TEMPLATE);
    return rowCount === 0;
  });
  // Nobody's database; its name tells whoever connects what to do.
  process.env['DATABASE_URL'] = databaseUrl(APP, cluster.app, cluster.port, 'call_createTestDatabase_first');
  if (isNew) await migrateToLatest(databaseUrl(OWNER, cluster.owner, cluster.port, TEMPLATE), APP);
}

async function provideStoreAndMail(): Promise<Stop> {
  if (process.env['S3_ENDPOINT']) return () => undefined;
  const folder = mkdtempSync(path.join(os.tmpdir(), 'polhode-files-'));
  const credentials = { accessKeyId: randomText(12), secretAccessKey: randomText(30) };
  const s3 = await startS3Fake({ port: 0, folder: path.join(folder, 's3'), credentials });
  const mail = await startMailFake({ smtpPort: 0, webPort: 0, folder: path.join(folder, 'mail') });
  const settings = { endpoint: s3.endpoint, region: 'us-east-1', bucket: 'polhode-test', ...credentials };
  await ensureBucket(createStore(settings));
  Object.assign(process.env, {
    S3_ENDPOINT: settings.endpoint,
    S3_REGION: settings.region,
    S3_BUCKET: settings.bucket,
    S3_ACCESS_KEY_ID: settings.accessKeyId,
    S3_SECRET_ACCESS_KEY: settings.secretAccessKey,
    SMTP_URL: mail.smtpUrl,
    MAIL_FROM: 'Polhode <no-reply@polhode.example>',
    APP_URL: 'http://polhode.example',
    POLHODE_TEST_MAILBOX: mail.webUrl,
    LOG_LEVEL: process.env['LOG_LEVEL'] ?? 'silent',
  });
  return async () => {
    await s3.close();
    await mail.close();
    rmSync(folder, { recursive: true });
  };
}

/** Runs once before a project's tests; what it starts is found by the environment, which the tests' processes inherit. */
export default async function setup(): Promise<Stop> {
  process.env['AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED'] = 'true';
  const stopCluster = await provideCluster();
  await provideTemplate();
  const stopRest = await provideStoreAndMail();
  return async () => {
    await stopRest();
    await stopCluster();
  };
}
