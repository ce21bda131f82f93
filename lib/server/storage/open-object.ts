import { Readable } from 'node:stream';
import { GetObjectCommand, HeadObjectCommand } from '@aws-sdk/client-s3';
import { AppError } from '@/lib/errors';
import { type ObjectStore, objectStore } from './client';
import { isMissing, storeFailed } from './failure';
import { keyOf } from './keys';
import { Measure } from './measure';

/** Whether the bytes with this SHA-256 are kept. */
export async function objectExists(sha256: string, store: ObjectStore = objectStore()): Promise<boolean> {
  const Key = keyOf(sha256);
  try {
    await store.client.send(new HeadObjectCommand({ Bucket: store.bucket, Key }));
    return true;
  } catch (error) {
    if (isMissing(error)) return false;
    throw storeFailed('The file could not be looked up', error);
  }
}

/**
 * The bytes with this SHA-256 as a stream, hashed again on the way: it ends with an error if they are not those that
 * were stored, so read to the end before trusting them. Throws AppError `not-found`, or `unavailable` if the store fails.
 */
export async function openObject(sha256: string, store: ObjectStore = objectStore()): Promise<Readable> {
  const body = await bodyOf(keyOf(sha256), store);
  const check = new Measure(
    () => undefined,
    (found) => {
      if (found !== sha256) throw new Error(`The store's bytes for ${sha256} hash to ${found}.`);
    },
  );
  body.once('error', (error) => check.destroy(error));
  check.once('close', () => body.destroy());
  return body.pipe(check);
}

async function bodyOf(Key: string, store: ObjectStore): Promise<Readable> {
  try {
    const { Body } = await store.client.send(new GetObjectCommand({ Bucket: store.bucket, Key }));
    if (Body instanceof Readable) return Body;
    throw new Error('The store gave no stream.');
  } catch (error) {
    if (isMissing(error)) throw new AppError('not-found', 'The stored file is not there.', { cause: error });
    throw storeFailed('The stored file could not be read', error);
  }
}
