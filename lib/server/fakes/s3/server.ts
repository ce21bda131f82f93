import { randomUUID } from 'node:crypto';
import { mkdirSync } from 'node:fs';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { type AddressInfo } from 'node:net';
import { answer, answerXml, type Call, header } from './call';
import { S3Error } from './errors';
import { abortUpload, completeUpload, createUpload, listUploads, uploadPart } from './multipart';
import { copyObject, deleteObject, getObject, headObject, listObjects, putObject } from './objects';
import { checkSignature, type Credentials } from './signature';
import { DiskStore } from './store';
import { xml } from './xml';

export interface S3FakeOptions {
  /** 0: a port that the system picks. */
  readonly port: number;
  /** Where the buckets are kept. */
  readonly folder: string;
  readonly credentials: Credentials;
}

export interface S3Fake {
  readonly endpoint: string;
  readonly close: () => Promise<void>;
}

/**
 * A store that speaks the S3 protocol on 127.0.0.1, for local use and tests: path style, signatures and checksums
 * checked, conditional writes, multipart. Not there: delimiters, versions, rights, checksums other than MD5, CRC-32,
 * SHA-1 and SHA-256.
 */
export async function startS3Fake({ port, folder, credentials }: S3FakeOptions): Promise<S3Fake> {
  mkdirSync(folder, { recursive: true });
  const store = new DiskStore(folder);
  const server = createServer((request, response) => void handle(request, response, store, credentials));
  await listen(server, port);
  const address = server.address() as AddressInfo;
  return {
    endpoint: `http://127.0.0.1:${address.port}`,
    close: () =>
      new Promise((resolve, reject) => {
        server.close((error) => (error ? reject(error) : resolve()));
        server.closeAllConnections();
      }),
  };
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
}

async function handle(
  request: IncomingMessage,
  response: ServerResponse,
  store: DiskStore,
  credentials: Credentials,
): Promise<void> {
  response.setHeader('x-amz-request-id', randomUUID());
  try {
    const url = new URL(request.url ?? '/', 'http://127.0.0.1');
    checkSignature(request, url, credentials);
    const [bucket = '', ...rest] = url.pathname.slice(1).split('/');
    const key = decodeURIComponent(rest.join('/'));
    await route({ request, response, store, query: url.searchParams, bucket, key });
  } catch (error) {
    refuse(request, response, error);
  }
}

function refuse(request: IncomingMessage, response: ServerResponse, error: unknown): void {
  const known = error instanceof S3Error ? error : new S3Error(500, 'InternalError', String(error));
  const isGone = request.socket.destroyed;
  if (!(error instanceof S3Error) && !isGone) console.error(error);
  if (response.headersSent || isGone) {
    response.destroy();
    return;
  }
  // The rest of a body that nobody wants is read away, so that the client gets to the answer.
  request.resume();
  const text = xml('Error', { Code: known.code, Message: known.message });
  const isHead = request.method === 'HEAD';
  response.writeHead(known.status, { 'content-type': 'application/xml' }).end(isHead ? undefined : text);
}

async function route(call: Call): Promise<void> {
  const { request, query, key } = call;
  const method = request.method ?? '';
  if (key === '') return routeBucket(call, method);
  call.store.checkBucket(call.bucket);
  if (method === 'PUT' && query.has('partNumber')) return uploadPart(call);
  if (method === 'PUT' && header(call, 'x-amz-copy-source')) return copyObject(call);
  if (method === 'PUT') return putObject(call);
  if (method === 'POST' && query.has('uploads')) return createUpload(call);
  if (method === 'POST' && query.has('uploadId')) return completeUpload(call);
  if (method === 'DELETE' && query.has('uploadId')) return abortUpload(call);
  if (method === 'GET') return getObject(call);
  if (method === 'HEAD') return headObject(call);
  if (method === 'DELETE') return deleteObject(call);
  throw new S3Error(501, 'NotImplemented', `${method} is not known here.`);
}

async function routeBucket(call: Call, method: string): Promise<void> {
  const { bucket, query, store } = call;
  if (method === 'PUT') {
    await store.createBucket(bucket);
    return answer(call, 200, { location: `/${bucket}` });
  }
  store.checkBucket(bucket);
  if (method === 'HEAD') return answer(call, 200);
  if (method === 'GET' && query.has('uploads')) return listUploads(call);
  if (method === 'GET' && query.has('location')) return answerXml(call, 'LocationConstraint', '');
  if (method === 'GET' && query.get('list-type') === '2') return listObjects(call);
  throw new S3Error(501, 'NotImplemented', `${method} is not known here.`);
}
