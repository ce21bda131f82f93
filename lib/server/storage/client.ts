import { S3Client } from '@aws-sdk/client-s3';
import { env } from '@/lib/server/env';

/** The bucket that everything is kept in, and the way to it. */
export interface ObjectStore {
  readonly client: S3Client;
  readonly bucket: string;
}

export interface StoreSettings {
  readonly endpoint: string;
  readonly region: string;
  readonly bucket: string;
  readonly accessKeyId: string;
  readonly secretAccessKey: string;
  /** How long the store may stay silent, ms. */
  readonly patience?: number;
  /** How often a request is made before it has failed. */
  readonly attempts?: number;
}

export function createStore(settings: StoreSettings): ObjectStore {
  const patience = settings.patience ?? 30_000;
  const client = new S3Client({
    endpoint: settings.endpoint,
    region: settings.region,
    credentials: { accessKeyId: settings.accessKeyId, secretAccessKey: settings.secretAccessKey },
    forcePathStyle: true,
    // Checksums of our own choice are asked for by name; the default's framed bodies are not understood everywhere.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    expectContinueHeader: false,
    maxAttempts: settings.attempts ?? 3,
    requestHandler: { connectionTimeout: 5000, socketTimeout: patience },
  });
  return { client, bucket: settings.bucket };
}

let store: ObjectStore | null = null;

/** The store of the environment's settings, made at the first call. */
export function objectStore(): ObjectStore {
  if (store) return store;
  const settings = env();
  store = createStore({
    endpoint: settings.S3_ENDPOINT,
    region: settings.S3_REGION,
    bucket: settings.S3_BUCKET,
    accessKeyId: settings.S3_ACCESS_KEY_ID,
    secretAccessKey: settings.S3_SECRET_ACCESS_KEY,
  });
  return store;
}
