import { constants, createReadStream } from 'node:fs';
import { copyFile } from 'node:fs/promises';
import { pipeline } from 'node:stream/promises';
import { receive } from './body';
import { answer, answerXml, type Call, header, keptHeaders, mustBeNew } from './call';
import { preconditionFailed, S3Error } from './errors';
import { close, type ObjectRecord } from './store';

const CHECKSUMS = ['crc32', 'sha1', 'sha256'] as const;

/** The checksums that the request named, for the answer. */
export function askedChecksums(call: Call, have: Readonly<Record<string, string>>): Record<string, string> {
  const asked: Record<string, string> = {};
  for (const name of CHECKSUMS) {
    const value = have[name];
    if (value !== undefined && header(call, `x-amz-checksum-${name}`))
      asked[`x-amz-checksum-${name}`] = value;
  }
  return asked;
}

/** 412 at once, before a long body is taken in; the commit checks again. */
function checkNew(call: Call): void {
  if (mustBeNew(call) && call.store.has(call.bucket, call.key)) throw preconditionFailed();
}

export async function putObject(call: Call): Promise<void> {
  checkNew(call);
  const file = call.store.freshFile(call.bucket);
  const { size, md5, checksums } = await receive(call.request, file);
  const record = { key: call.key, file, size, etag: `"${md5}"`, headers: keptHeaders(call) };
  call.store.commit(call.bucket, record, mustBeNew(call));
  answer(call, 200, { etag: record.etag, ...askedChecksums(call, checksums) });
}

export async function copyObject(call: Call): Promise<void> {
  const source = decodeURIComponent(header(call, 'x-amz-copy-source') ?? '').replace(/^\//, '');
  const slash = source.indexOf('/');
  const from = call.store.find(source.slice(0, slash), source.slice(slash + 1));
  const file = call.store.freshFile(call.bucket);
  await copyFile(from.file, file, constants.COPYFILE_FICLONE);
  const isNewMeta = header(call, 'x-amz-metadata-directive') === 'REPLACE';
  const headers = isNewMeta ? keptHeaders(call) : from.headers;
  const record = { key: call.key, file, size: from.size, etag: from.etag, headers };
  const { modified } = call.store.commit(call.bucket, record, mustBeNew(call));
  answerXml(call, 'CopyObjectResult', { ETag: from.etag, LastModified: modified });
}

function describe(call: Call, record: ObjectRecord): Record<string, string> {
  const headers: Record<string, string> = {
    'content-type': 'binary/octet-stream',
    ...record.headers,
    etag: record.etag,
    'last-modified': new Date(record.modified).toUTCString(),
    'accept-ranges': 'bytes',
  };
  for (const [name, value] of call.query) {
    if (name.startsWith('response-')) headers[name.slice('response-'.length)] = value;
  }
  return headers;
}

/** First and last byte of the range asked for, null without one (RFC 9110, section 14). */
function rangeOf(call: Call, size: number): readonly [number, number] | null {
  const match = /^bytes=(\d*)-(\d*)$/.exec(header(call, 'range') ?? '');
  if (!match || (match[1] === '' && match[2] === '')) return null;
  const [, first = '', last = ''] = match;
  const start = first === '' ? Math.max(0, size - Number(last)) : Number(first);
  const end = first === '' || last === '' ? size - 1 : Math.min(Number(last), size - 1);
  if (start > end) throw new S3Error(416, 'InvalidRange', 'The range is not in the object.');
  return [start, end];
}

export function headObject(call: Call): void {
  const record = call.store.find(call.bucket, call.key);
  answer(call, 200, { ...describe(call, record), 'content-length': String(record.size) });
}

export async function getObject(call: Call): Promise<void> {
  const { record, fd } = call.store.open(call.bucket, call.key);
  let range: readonly [number, number] | null;
  try {
    range = rangeOf(call, record.size);
  } catch (error) {
    close(fd);
    throw error;
  }
  const [start, end] = range ?? [0, record.size - 1];
  call.response.writeHead(range ? 206 : 200, {
    ...describe(call, record),
    'content-length': String(end - start + 1),
    ...(range ? { 'content-range': `bytes ${start}-${end}/${record.size}` } : {}),
  });
  if (record.size === 0) {
    close(fd);
    call.response.end();
    return;
  }
  await pipeline(createReadStream('', { fd, start, end }), call.response);
}

export function deleteObject(call: Call): void {
  call.store.remove(call.bucket, call.key);
  answer(call, 204);
}

export function listObjects(call: Call): void {
  const prefix = call.query.get('prefix') ?? '';
  const most = Number(call.query.get('max-keys') ?? 1000);
  const token = call.query.get('continuation-token');
  const after = token ? Buffer.from(token, 'base64url').toString() : (call.query.get('start-after') ?? '');
  const all = call.store.list(call.bucket, prefix).filter((record) => record.key > after);
  const page = all.slice(0, most);
  const last = page.at(-1);
  answerXml(call, 'ListBucketResult', {
    Name: call.bucket,
    Prefix: prefix,
    KeyCount: page.length,
    MaxKeys: most,
    IsTruncated: page.length < all.length,
    ...(last && page.length < all.length
      ? { NextContinuationToken: Buffer.from(last.key).toString('base64url') }
      : {}),
    Contents: page.map(({ key, modified, etag, size }) => ({
      Key: key,
      LastModified: modified,
      ETag: etag,
      Size: size,
      StorageClass: 'STANDARD',
    })),
  });
}
