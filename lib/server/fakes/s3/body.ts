import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import { type IncomingHttpHeaders, type IncomingMessage } from 'node:http';
import { pipeline } from 'node:stream/promises';
import { crc32 } from 'node:zlib';
import { unframe } from './chunked';
import { S3Error } from './errors';

export interface Received {
  readonly size: number;
  readonly md5: string;
  /** Base64 by algorithm, as the protocol's `x-amz-checksum-*` headers carry them. */
  readonly checksums: Readonly<Record<'crc32' | 'sha1' | 'sha256', string>>;
}

/** Takes a request's body into `file` and checks every length and checksum that came with it; a bad one leaves no file. */
export async function receive(request: IncomingMessage, file: string): Promise<Received> {
  const declared = String(request.headers['x-amz-content-sha256'] ?? '');
  const isFramed = declared.startsWith('STREAMING-');
  const digests = { md5: createHash('md5'), sha1: createHash('sha1'), sha256: createHash('sha256') };
  let size = 0;
  let crc = 0;
  let trailers = new Map<string, string>();

  async function* measured() {
    const source = request as AsyncIterable<Buffer>;
    const pieces = isFramed ? unframe(source) : source[Symbol.asyncIterator]();
    for (;;) {
      const { done, value } = await pieces.next();
      if (done) {
        if (isFramed) trailers = value as Map<string, string>;
        return;
      }
      size += value.length;
      crc = crc32(value, crc);
      for (const digest of Object.values(digests)) digest.update(value);
      yield value;
    }
  }

  try {
    await pipeline(measured, createWriteStream(file));
    const md5 = digests.md5.digest();
    const sha256 = digests.sha256.digest();
    const crcBytes = Buffer.alloc(4);
    crcBytes.writeUInt32BE(crc);
    const checksums = {
      crc32: crcBytes.toString('base64'),
      sha1: digests.sha1.digest('base64'),
      sha256: sha256.toString('base64'),
    };
    checkPayload(declared, sha256);
    checkDigests({ ...request.headers, ...Object.fromEntries(trailers) }, md5, checksums);
    const length = Number(
      request.headers['x-amz-decoded-content-length'] ?? request.headers['content-length'] ?? size,
    );
    if (length !== size) throw new S3Error(400, 'IncompleteBody', 'The body is not as long as declared.');
    return { size, md5: md5.toString('hex'), checksums };
  } catch (error) {
    await rm(file, { force: true });
    throw error;
  }
}

function checkPayload(declared: string, sha256: Buffer): void {
  if (/^[0-9a-f]{64}$/.test(declared) && declared !== sha256.toString('hex')) {
    throw new S3Error(400, 'XAmzContentSHA256Mismatch', 'The body is not the one that was signed.');
  }
}

function checkDigests(headers: IncomingHttpHeaders, md5: Buffer, checksums: Received['checksums']): void {
  const expected = { 'content-md5': md5.toString('base64') } as Record<string, string>;
  for (const [name, value] of Object.entries(checksums)) expected[`x-amz-checksum-${name}`] = value;
  for (const [name, value] of Object.entries(expected)) {
    const given = headers[name];
    if (given !== undefined && given !== value) {
      throw new S3Error(400, 'BadDigest', `The ${name} that came with the body is not the body's.`);
    }
  }
}
