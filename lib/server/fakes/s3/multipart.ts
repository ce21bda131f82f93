import { createHash } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import { randomUUID } from 'node:crypto';
import { receive } from './body';
import { answer, answerXml, type Call, keptHeaders, mustBeNew, smallBody } from './call';
import { S3Error } from './errors';
import { askedChecksums } from './objects';
import { type Part } from './store';
import { contents, textOf } from './xml';

const SMALLEST_PART = 5 << 20;

export async function createUpload(call: Call): Promise<void> {
  const upload = await call.store.createUpload(call.bucket, call.key, keptHeaders(call));
  answerXml(call, 'InitiateMultipartUploadResult', {
    Bucket: call.bucket,
    Key: call.key,
    UploadId: upload.id,
  });
}

const folderOf = (call: Call) =>
  call.store.uploadFolder(call.bucket, call.key, call.query.get('uploadId') ?? '');

export async function uploadPart(call: Call): Promise<void> {
  const folder = folderOf(call);
  const number = Number(call.query.get('partNumber'));
  if (!(number >= 1 && number <= 10_000))
    throw new S3Error(400, 'InvalidArgument', 'Part numbers are 1 to 10000.');
  const file = path.join(folder, `${number}.${randomUUID()}`);
  const { size, md5, checksums } = await receive(call.request, file);
  call.store.savePart(folder, { number, file, size, md5, sha256: checksums.sha256 });
  answer(call, 200, { etag: `"${md5}"`, ...askedChecksums(call, checksums) });
}

/** The parts that the request names, each as it was taken in. */
function namedParts(call: Call, folder: string, text: string): Part[] {
  const parts = contents(text, 'Part').map((entry) => {
    const part = call.store.part(folder, Number(textOf(entry, 'PartNumber')));
    const etag = textOf(entry, 'ETag')?.replaceAll('"', '');
    const sha256 = textOf(entry, 'ChecksumSHA256');
    if (!part || part.md5 !== etag || (sha256 !== null && sha256 !== part.sha256)) {
      throw new S3Error(400, 'InvalidPart', 'A part is missing or is not the one named.');
    }
    return part;
  });
  if (parts.length === 0) throw new S3Error(400, 'MalformedXML', 'No part is named.');
  parts.forEach((part, i) => {
    if (i > 0 && part.number <= (parts[i - 1]?.number ?? 0)) {
      throw new S3Error(400, 'InvalidPartOrder', 'The parts are not in ascending order.');
    }
    if (i < parts.length - 1 && part.size < SMALLEST_PART) {
      throw new S3Error(400, 'EntityTooSmall', 'A part other than the last is below 5 MiB.');
    }
  });
  return parts;
}

export async function completeUpload(call: Call): Promise<void> {
  const folder = folderOf(call);
  const parts = namedParts(call, folder, await smallBody(call));
  const file = call.store.freshFile(call.bucket);
  try {
    await pipeline(async function* () {
      for (const part of parts) yield* createReadStream(part.file) as AsyncIterable<Buffer>;
    }, createWriteStream(file));
  } catch (error) {
    await rm(file, { force: true });
    throw error;
  }
  const md5 = createHash('md5')
    .update(Buffer.from(parts.map((part) => part.md5).join(''), 'hex'))
    .digest('hex');
  const size = parts.reduce((sum, part) => sum + part.size, 0);
  const etag = `"${md5}-${parts.length}"`;
  const { headers } = call.store.upload(folder);
  call.store.commit(call.bucket, { key: call.key, file, size, etag, headers }, mustBeNew(call));
  call.store.removeUpload(folder);
  answerXml(call, 'CompleteMultipartUploadResult', { Bucket: call.bucket, Key: call.key, ETag: etag });
}

export function abortUpload(call: Call): void {
  call.store.removeUpload(folderOf(call));
  answer(call, 204);
}

export function listUploads(call: Call): void {
  const prefix = call.query.get('prefix') ?? '';
  const uploads = call.store.uploads(call.bucket).filter(({ key }) => key.startsWith(prefix));
  answerXml(call, 'ListMultipartUploadsResult', {
    Bucket: call.bucket,
    IsTruncated: false,
    Upload: uploads.map(({ id, key, started }) => ({ Key: key, UploadId: id, Initiated: started })),
  });
}
