import { mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { S3Client, type S3ClientConfig } from '@aws-sdk/client-s3';
import { type S3Fake, startS3Fake } from '@/lib/server/fakes/s3/server';

export const CREDENTIALS = { accessKeyId: 'a-key', secretAccessKey: 'a-secret' };
export const BUCKET = 'bucket';

export interface Running {
  readonly fake: S3Fake;
  readonly folder: string;
  readonly client: S3Client;
  readonly stop: () => Promise<void>;
}

export function clientOf(fake: S3Fake, config: S3ClientConfig = {}): S3Client {
  return new S3Client({
    endpoint: fake.endpoint,
    region: 'us-east-1',
    forcePathStyle: true,
    credentials: CREDENTIALS,
    maxAttempts: 1,
    ...config,
  });
}

/** A fake of the caller's own with the SDK's client on it, in a folder that goes with it. */
export async function startOwn(config: S3ClientConfig = {}): Promise<Running> {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'polhode-s3-'));
  const fake = await startS3Fake({ port: 0, folder, credentials: CREDENTIALS });
  const client = clientOf(fake, config);
  const stop = async () => {
    client.destroy();
    await fake.close();
    rmSync(folder, { recursive: true });
  };
  return { fake, folder, client, stop };
}
