import { randomUUID } from 'node:crypto';
import { type Readable } from 'node:stream';
import { CopyObjectCommand, DeleteObjectCommand, HeadObjectCommand } from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { AppError } from '@/lib/errors';
import { log } from '@/lib/server/log';
import { type ObjectStore, objectStore } from './client';
import { isMissing, isTaken, storeFailed } from './failure';
import { INCOMING, keyOf } from './keys';
import { Measure } from './measure';

export interface StoreStreamOptions {
  /** What the sender declared; a stream of another length is refused. */
  readonly contentLength: number;
  /** Aborted when the sender goes away. */
  readonly signal?: AbortSignal;
  readonly store?: ObjectStore;
}

export interface StoredObject {
  /** Hex; the object's name. */
  readonly sha256: string;
  readonly bytes: number;
}

/**
 * Keeps a stream under its own SHA-256, never held in memory whole, never overwritten: first under a passing name while
 * it is hashed, then by a conditional copy. Throws AppError `invalid-request` if the stream is not as long as declared
 * or the sender goes away, `unavailable` if the store fails; then nothing is kept.
 */
export async function storeStream(source: Readable, options: StoreStreamOptions): Promise<StoredObject> {
  const { contentLength, signal, store = objectStore() } = options;
  const incoming = `${INCOMING}${randomUUID()}`;
  const measure = measureOf(contentLength);
  const upload = new Upload({
    client: store.client,
    params: { Bucket: store.bucket, Key: incoming, Body: measure, ChecksumAlgorithm: 'SHA256' },
    queueSize: 2,
  });
  const fail = (error: Error) => measure.destroy(error);
  const abort = () =>
    fail(new AppError('invalid-request', 'The sender went away before the end. Nothing was kept.'));
  measure.once('error', () => source.unpipe(measure));
  source.once('error', fail);
  signal?.addEventListener('abort', abort, { once: true });
  if (signal?.aborted) abort();
  source.pipe(measure);
  try {
    await upload.done();
    const { sha256, bytes } = measure;
    if (sha256 === null) throw new Error('The upload ended before its stream.');
    await checkKept(store, incoming, bytes);
    await copyToName(store, incoming, sha256);
    return { sha256, bytes };
  } catch (error) {
    measure.destroy();
    throw storeFailed('The file was not stored and nothing of it was kept', measure.errored ?? error);
  } finally {
    source.off('error', fail);
    signal?.removeEventListener('abort', abort);
    await removeIncoming(store, incoming);
  }
}

function measureOf(contentLength: number): Measure {
  const wrong = (bytes: string) =>
    new AppError(
      'invalid-request',
      `The request declares ${contentLength} bytes and brings ${bytes}. Nothing was kept.`,
    );
  return new Measure(
    (bytes) => {
      if (bytes > contentLength) throw wrong('more');
    },
    (_, bytes) => {
      if (bytes !== contentLength) throw wrong(String(bytes));
    },
  );
}

/** The store must hold as many bytes as were sent before they get their lasting name. */
async function checkKept(store: ObjectStore, key: string, bytes: number): Promise<void> {
  const kept = await store.client.send(new HeadObjectCommand({ Bucket: store.bucket, Key: key }));
  if (kept.ContentLength !== bytes) throw new Error(`The store has ${kept.ContentLength} bytes of ${bytes}.`);
}

async function copyToName(store: ObjectStore, incoming: string, sha256: string): Promise<void> {
  const Key = keyOf(sha256);
  try {
    await store.client.send(
      new CopyObjectCommand({
        Bucket: store.bucket,
        Key,
        CopySource: `${store.bucket}/${incoming}`,
        IfNoneMatch: '*',
      }),
    );
  } catch (error) {
    // Bytes of that name are there already: the same bytes.
    if (!isTaken(error)) throw error;
  }
}

/** A stray that cannot be removed now is removed by the sweep; the answer to the sender does not hang on it. */
async function removeIncoming(store: ObjectStore, key: string): Promise<void> {
  try {
    await store.client.send(new DeleteObjectCommand({ Bucket: store.bucket, Key: key }));
  } catch (error) {
    if (!isMissing(error)) log.warn({ key, err: error }, 'an incoming object is left to the sweep');
  }
}
