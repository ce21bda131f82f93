import { createHash, randomBytes } from 'node:crypto';
import { writeFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import { text } from 'node:stream/consumers';
import { GetObjectCommand, ListMultipartUploadsCommand, ListObjectsV2Command } from '@aws-sdk/client-s3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { ensureBucket } from '@/lib/server/storage/bucket';
import { createStore, type ObjectStore } from '@/lib/server/storage/client';
import { objectExists, openObject } from '@/lib/server/storage/open-object';
import { storeStream } from '@/lib/server/storage/store-stream';
import { sweepIncoming } from '@/lib/server/storage/sweep';
import { DiskStore } from '@/lib/server/fakes/s3/store';
import { BUCKET, CREDENTIALS, type Running, startOwn } from '../fakes/s3-setup';

let running: Running;
let store: ObjectStore;

beforeEach(async () => {
  running = await startOwn();
  store = createStore({
    endpoint: running.fake.endpoint,
    region: 'us-east-1',
    bucket: BUCKET,
    ...CREDENTIALS,
  });
  await ensureBucket(store);
});
afterEach(async () => {
  store.client.destroy();
  await running.stop();
});

const sha256 = (bytes: string | Uint8Array) => createHash('sha256').update(bytes).digest('hex');

async function keys(): Promise<(string | undefined)[]> {
  const { Contents } = await running.client.send(new ListObjectsV2Command({ Bucket: BUCKET }));
  return (Contents ?? []).map(({ Key }) => Key);
}
async function openUploads(): Promise<number> {
  const { Uploads } = await running.client.send(new ListMultipartUploadsCommand({ Bucket: BUCKET }));
  return (Uploads ?? []).length;
}
const keep = (content: string, contentLength = Buffer.byteLength(content)) =>
  storeStream(Readable.from([Buffer.from(content)]), { contentLength, store });

describe('storing a stream', () => {
  it('keeps it under its own SHA-256 and leaves nothing else', async () => {
    // SHA-256 of "abc": FIPS 180-4, example of the NIST cryptographic toolkit.
    const hash = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
    expect(await keep('abc')).toEqual({ sha256: hash, bytes: 3 });
    expect(await keys()).toEqual([`sha256/${hash}`]);
    expect(await objectExists(hash, store)).toBe(true);
    expect(await text(await openObject(hash, store))).toBe('abc');
  });

  it('keeps one of several megabytes byte for byte', async () => {
    const bytes = randomBytes(23 << 20);
    const pieces = [bytes.subarray(0, 7), bytes.subarray(7, 9 << 20), bytes.subarray(9 << 20)];
    const stored = await storeStream(Readable.from(pieces), { contentLength: bytes.length, store });
    expect(stored).toEqual({ sha256: sha256(bytes), bytes: bytes.length });
    const hash = createHash('sha256');
    for await (const piece of await openObject(stored.sha256, store)) hash.update(piece as Buffer);
    expect(hash.digest('hex')).toBe(stored.sha256);
    expect(await openUploads()).toBe(0);
  });

  it('keeps the same bytes once and does not write them again', async () => {
    const { sha256: hash } = await keep('same');
    const written = async () =>
      (await running.client.send(new GetObjectCommand({ Bucket: BUCKET, Key: `sha256/${hash}` })))
        .LastModified;
    const before = await written();
    await new Promise((resolve) => setTimeout(resolve, 1100));
    await Promise.all([keep('same'), keep('same')]);
    expect(await written()).toEqual(before);
    expect(await keys()).toEqual([`sha256/${hash}`]);
  });

  it('keeps an empty stream', async () => {
    expect(await keep('')).toEqual({ sha256: sha256(''), bytes: 0 });
  });

  it.each([
    ['shorter', 5],
    ['longer', 2],
  ])('refuses one that is %s than declared and keeps nothing', async (_, difference) => {
    const content = 'twelve bytes';
    const declared = difference > 2 ? content.length + difference : content.length - difference;
    await expect(keep(content, declared)).rejects.toMatchObject({
      code: 'invalid-request',
      message: expect.stringContaining(`declares ${declared} bytes`) as string,
    });
    expect(await keys()).toEqual([]);
  });

  it('stops reading as soon as there is more than was declared', async () => {
    let given = 0;
    const endless = Readable.from(
      (function* () {
        for (;;) {
          given += 1 << 20;
          yield Buffer.alloc(1 << 20);
        }
      })(),
    );
    await expect(storeStream(endless, { contentLength: 3 << 20, store })).rejects.toMatchObject({
      code: 'invalid-request',
    });
    endless.destroy();
    expect(given).toBeLessThan(8 << 20);
  });

  it('keeps nothing when the sender goes away in the middle', async () => {
    const gone = new AbortController();
    const half = new Readable({ read: () => undefined });
    half.push(randomBytes(12 << 20));
    const storing = storeStream(half, { contentLength: 24 << 20, store, signal: gone.signal });
    setTimeout(() => gone.abort(), 300);
    await expect(storing).rejects.toMatchObject({ code: 'invalid-request' });
    expect(await keys()).toEqual([]);
    expect(await openUploads()).toBe(0);
  });

  it('keeps nothing when the stream breaks', async () => {
    const breaking = new Readable({ read: () => undefined });
    breaking.push(Buffer.from('half of it'));
    setTimeout(() => breaking.destroy(new Error('connection reset')), 50);
    await expect(storeStream(breaking, { contentLength: 100, store })).rejects.toThrow(
      'nothing of it was kept',
    );
    expect(await keys()).toEqual([]);
  });
});

describe('reading what is stored', () => {
  it('says when it is not there', async () => {
    expect(await objectExists(sha256('never stored'), store)).toBe(false);
    await expect(openObject(sha256('never stored'), store)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('ends with an error if the bytes are not the ones that were stored', async () => {
    const { sha256: hash } = await keep('as it was');
    writeFileSync(new DiskStore(running.folder).find(BUCKET, `sha256/${hash}`).file, 'as it is!');
    await expect(text(await openObject(hash, store))).rejects.toThrow(
      `The store's bytes for ${hash} hash to`,
    );
  });

  it('takes nothing but a SHA-256 for a name', async () => {
    await expect(openObject('../incoming/x', store)).rejects.toThrow('hex of its SHA-256');
  });
});

describe('the sweep', () => {
  it('removes what is older than the time given under incoming, and nothing stored', async () => {
    const disk = new DiskStore(running.folder);
    const stray = disk.freshFile(BUCKET);
    writeFileSync(stray, 'stray');
    disk.commit(BUCKET, { key: 'incoming/1', file: stray, size: 5, etag: '"x"', headers: {} }, false);
    await disk.createUpload(BUCKET, 'incoming/2', {});
    const { sha256: hash } = await keep('kept');
    expect(await sweepIncoming(new Date(Date.now() - 60_000), store)).toBe(0);
    expect(await sweepIncoming(new Date(Date.now() + 60_000), store)).toBe(2);
    expect(await keys()).toEqual([`sha256/${hash}`]);
    expect(await openUploads()).toBe(0);
  });
});
