import { createHash, randomBytes } from 'node:crypto';
import { rmSync } from 'node:fs';
import { Readable } from 'node:stream';
import {
  CopyObjectCommand,
  CreateBucketCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListMultipartUploadsCommand,
  ListObjectsV2Command,
  paginateListObjectsV2,
  PutObjectCommand,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { getSignedUrl } from '@aws-sdk/s3-request-presigner';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startS3Fake } from '@/lib/server/fakes/s3/server';
import { BUCKET, clientOf, CREDENTIALS, type Running, startOwn } from './s3-setup';

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const failure = (status: number, name?: string) =>
  expect.objectContaining({
    ...(name ? { name } : {}),
    $metadata: expect.objectContaining({ httpStatusCode: status }),
  });

/** What the current SDK does by default (framed bodies with trailing checksums), and with checksums off. */
describe.each(['WHEN_SUPPORTED', 'WHEN_REQUIRED'] as const)('the S3 fake, checksums %s', (mode) => {
  let running: Running;

  beforeAll(async () => {
    running = await startOwn({ requestChecksumCalculation: mode, responseChecksumValidation: mode });
    await running.client.send(new CreateBucketCommand({ Bucket: BUCKET }));
  });
  afterAll(() => running.stop());

  const put = (Key: string, Body: string | Uint8Array, more = {}) =>
    running.client.send(new PutObjectCommand({ Bucket: BUCKET, Key, Body, ...more }));
  const get = async (Key: string, more = {}) => {
    const answer = await running.client.send(new GetObjectCommand({ Bucket: BUCKET, Key, ...more }));
    return { answer, text: (await answer.Body?.transformToString()) ?? '' };
  };

  it('gives back what was put, with its metadata', async () => {
    await put('a folder/ö+ä &.csv', 'hello', {
      ContentType: 'text/csv',
      ContentDisposition: 'attachment; filename="a.csv"',
      Metadata: { list: 'wing' },
    });
    const { answer, text } = await get('a folder/ö+ä &.csv');
    expect(text).toBe('hello');
    expect(answer.ContentType).toBe('text/csv');
    expect(answer.ContentDisposition).toBe('attachment; filename="a.csv"');
    expect(answer.Metadata).toEqual({ list: 'wing' });
    expect(answer.ETag).toBe(`"${createHash('md5').update('hello').digest('hex')}"`);
  });

  it('takes a stream of declared length byte for byte', async () => {
    const bytes = randomBytes(300_000);
    const pieces = [bytes.subarray(0, 1), bytes.subarray(1, 70_000), bytes.subarray(70_000)];
    const Body = Readable.from(pieces);
    await running.client.send(
      new PutObjectCommand({ Bucket: BUCKET, Key: 'streamed', Body, ContentLength: bytes.length }),
    );
    const { answer } = await get('streamed');
    expect(answer.ContentLength).toBe(bytes.length);
    const back = await running.client.send(new GetObjectCommand({ Bucket: BUCKET, Key: 'streamed' }));
    expect(sha256((await back.Body?.transformToByteArray()) ?? new Uint8Array())).toBe(sha256(bytes));
  });

  it('keeps an empty object', async () => {
    await put('empty', new Uint8Array());
    expect((await get('empty')).text).toBe('');
  });

  it('answers a range, a suffix, and a range outside', async () => {
    await put('range', '0123456789');
    expect((await get('range', { Range: 'bytes=2-4' })).text).toBe('234');
    expect((await get('range', { Range: 'bytes=-3' })).text).toBe('789');
    const { answer, text } = await get('range', { Range: 'bytes=8-99' });
    expect(text).toBe('89');
    expect(answer.ContentRange).toBe('bytes 8-9/10');
    await expect(get('range', { Range: 'bytes=10-' })).rejects.toEqual(failure(416, 'InvalidRange'));
  });

  it('tells of an object without its bytes, and forgets a deleted one', async () => {
    await put('head', 'x');
    const head = () => running.client.send(new HeadObjectCommand({ Bucket: BUCKET, Key: 'head' }));
    expect((await head()).ContentLength).toBe(1);
    await running.client.send(new DeleteObjectCommand({ Bucket: BUCKET, Key: 'head' }));
    await expect(head()).rejects.toEqual(failure(404));
    await expect(get('head')).rejects.toEqual(failure(404, 'NoSuchKey'));
  });

  it('knows no bucket that was not made', async () => {
    const other = new PutObjectCommand({ Bucket: 'another', Key: 'k', Body: 'x' });
    await expect(running.client.send(other)).rejects.toEqual(failure(404, 'NoSuchBucket'));
    const again = new CreateBucketCommand({ Bucket: BUCKET });
    await expect(running.client.send(again)).rejects.toEqual(failure(409, 'BucketAlreadyOwnedByYou'));
  });

  it('copies an object with its metadata or with new ones', async () => {
    await put('copy/from', 'copied', { Metadata: { n: '1' } });
    const copy = (Key: string, more = {}) =>
      running.client.send(
        new CopyObjectCommand({ Bucket: BUCKET, Key, CopySource: `${BUCKET}/copy/from`, ...more }),
      );
    await copy('copy/same');
    await copy('copy/new', { MetadataDirective: 'REPLACE', Metadata: { n: '2' } });
    expect((await get('copy/same')).answer.Metadata).toEqual({ n: '1' });
    expect((await get('copy/new')).answer.Metadata).toEqual({ n: '2' });
    expect((await get('copy/new')).text).toBe('copied');
  });

  it('lists by prefix, page by page, in the order of the keys', async () => {
    for (const name of ['c', 'a', 'b']) await put(`list/${name}`, name);
    const keys: (string | undefined)[] = [];
    const pages = paginateListObjectsV2(
      { client: running.client, pageSize: 2 },
      { Bucket: BUCKET, Prefix: 'list/' },
    );
    for await (const page of pages) keys.push(...(page.Contents ?? []).map(({ Key }) => Key));
    expect(keys).toEqual(['list/a', 'list/b', 'list/c']);
    const after = await running.client.send(
      new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'list/', StartAfter: 'list/b' }),
    );
    expect(after.Contents).toHaveLength(1);
  });

  it('keeps a multipart upload byte for byte, and nothing of one that was given up', async () => {
    const bytes = randomBytes(17 * 1024 * 1024);
    const upload = (Key: string, Body: Readable, more = {}) =>
      new Upload({ client: running.client, params: { Bucket: BUCKET, Key, Body, ...more } });
    await upload('large', Readable.from([bytes.subarray(0, 999), bytes.subarray(999)])).done();
    const { Body, ETag } = await running.client.send(new GetObjectCommand({ Bucket: BUCKET, Key: 'large' }));
    expect(ETag).toMatch(/-4"$/);
    expect(sha256((await Body?.transformToByteArray()) ?? new Uint8Array())).toBe(sha256(bytes));

    const broken = Readable.from(
      (function* () {
        yield bytes.subarray(0, 12 * 1024 * 1024);
        throw new Error('the sender is gone');
      })(),
    );
    await expect(upload('given-up', broken).done()).rejects.toThrow('the sender is gone');
    await expect(get('given-up')).rejects.toEqual(failure(404));
    const open = await running.client.send(new ListMultipartUploadsCommand({ Bucket: BUCKET }));
    expect(open.Uploads ?? []).toEqual([]);
  });

  it('puts, copies and completes only what is new when told If-None-Match', async () => {
    await put('once', 'first', { IfNoneMatch: '*' });
    await expect(put('once', 'second', { IfNoneMatch: '*' })).rejects.toEqual(failure(412));
    const copy = new CopyObjectCommand({
      Bucket: BUCKET,
      Key: 'once',
      CopySource: `${BUCKET}/range`,
      IfNoneMatch: '*',
    });
    await expect(running.client.send(copy)).rejects.toEqual(failure(412));
    const upload = new Upload({
      client: running.client,
      params: { Bucket: BUCKET, Key: 'once', Body: Readable.from([randomBytes(6 << 20)]), IfNoneMatch: '*' },
    });
    await expect(upload.done()).rejects.toEqual(failure(412));
    expect((await get('once')).text).toBe('first');
  });

  it('lets one of two racing conditional puts win', async () => {
    const race = ['one', 'two'].map((text) => put('race', text, { IfNoneMatch: '*' }));
    const outcomes = await Promise.allSettled(race);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });

  it('refuses a body that is not the one its checksum was made of', async () => {
    const wrong = createHash('sha256').update('something else').digest('base64');
    await expect(put('bad', 'body', { ChecksumSHA256: wrong })).rejects.toEqual(failure(400, 'BadDigest'));
    await expect(put('bad', 'body', { ContentMD5: 'AAAAAAAAAAAAAAAAAAAAAA==' })).rejects.toEqual(
      failure(400, 'BadDigest'),
    );
    await expect(get('bad')).rejects.toEqual(failure(404));
  });

  it('answers a presigned address, and none that was tampered with or has run out', async () => {
    await put('signed', 'for your eyes');
    const command = new GetObjectCommand({
      Bucket: BUCKET,
      Key: 'signed',
      ResponseContentDisposition: 'attachment; filename="x y.csv"',
    });
    const url = await getSignedUrl(running.client, command, { expiresIn: 60 });
    const good = await fetch(url);
    expect(await good.text()).toBe('for your eyes');
    expect(good.headers.get('content-disposition')).toBe('attachment; filename="x y.csv"');
    expect((await fetch(url.replace('/signed', '/once'))).status).toBe(403);
    expect((await fetch(url.replace('Expires=60', 'Expires=6000'))).status).toBe(403);
    expect((await fetch(url, { method: 'DELETE' })).status).toBe(403);
    const past = await getSignedUrl(running.client, command, {
      expiresIn: 60,
      signingDate: new Date(Date.now() - 120_000),
    });
    expect((await fetch(past)).status).toBe(403);
  });

  it('refuses a wrong secret, an unknown key and anyone unsigned', async () => {
    await put('private', 'x');
    const request = () => new GetObjectCommand({ Bucket: BUCKET, Key: 'private' });
    const wrongSecret = clientOf(running.fake, { credentials: { ...CREDENTIALS, secretAccessKey: 'wrong' } });
    await expect(wrongSecret.send(request())).rejects.toEqual(failure(403, 'SignatureDoesNotMatch'));
    const wrongKey = clientOf(running.fake, { credentials: { ...CREDENTIALS, accessKeyId: 'wrong' } });
    await expect(wrongKey.send(request())).rejects.toEqual(failure(403, 'InvalidAccessKeyId'));
    expect((await fetch(`${running.fake.endpoint}/${BUCKET}/private`)).status).toBe(403);
    expect((await fetch(`${running.fake.endpoint}/${BUCKET}/new`, { method: 'PUT', body: 'x' })).status).toBe(
      403,
    );
  });
});

describe('the S3 fake', () => {
  it('has after a restart what it had before', async () => {
    const running = await startOwn();
    await running.client.send(new CreateBucketCommand({ Bucket: BUCKET }));
    await running.client.send(new PutObjectCommand({ Bucket: BUCKET, Key: 'k', Body: 'kept' }));
    await running.fake.close();
    const second = await startS3Fake({ port: 0, folder: running.folder, credentials: CREDENTIALS });
    const client = clientOf(second);
    const { Body } = await client.send(new GetObjectCommand({ Bucket: BUCKET, Key: 'k' }));
    expect(await Body?.transformToString()).toBe('kept');
    client.destroy();
    await second.close();
    running.client.destroy();
    rmSync(running.folder, { recursive: true });
  });

  it('listens on the loopback address only', async () => {
    const running = await startOwn();
    expect(running.fake.endpoint).toMatch(/^http:\/\/127\.0\.0\.1:\d+$/);
    await running.stop();
  });
});
