import { type IncomingMessage, type ServerResponse } from 'node:http';
import { S3Error } from './errors';
import { type DiskStore } from './store';
import { xml } from './xml';

/** One request, taken apart. */
export interface Call {
  readonly request: IncomingMessage;
  readonly response: ServerResponse;
  readonly store: DiskStore;
  readonly query: URLSearchParams;
  readonly bucket: string;
  readonly key: string;
}

export const header = (call: Call, name: string): string | null => {
  const value = call.request.headers[name];
  return value === undefined ? null : String(value);
};

/** Whether the request asks that nothing be there yet (`If-None-Match: *`). */
export const mustBeNew = (call: Call): boolean => header(call, 'if-none-match') === '*';

export function answer(call: Call, status: number, headers: Record<string, string> = {}, text = ''): void {
  call.response.writeHead(status, { 'content-length': Buffer.byteLength(text), ...headers }).end(text);
}

export function answerXml(call: Call, tag: string, node: Parameters<typeof xml>[1]): void {
  answer(call, 200, { 'content-type': 'application/xml' }, xml(tag, node));
}

const KEPT = ['content-type', 'content-disposition', 'content-language', 'cache-control', 'expires'];

/** The request's headers that an object keeps and gives back. */
export function keptHeaders(call: Call): Record<string, string> {
  const kept: Record<string, string> = {};
  for (const [name, value] of Object.entries(call.request.headers)) {
    if (KEPT.includes(name) || name.startsWith('x-amz-meta-')) kept[name] = String(value);
  }
  const encodings = (header(call, 'content-encoding') ?? '').split(',').map((name) => name.trim());
  const encoding = encodings.filter((name) => name !== '' && name !== 'aws-chunked').join(',');
  if (encoding !== '') kept['content-encoding'] = encoding;
  return kept;
}

/** The whole of a small body as text. */
export async function smallBody(call: Call): Promise<string> {
  const pieces: Buffer[] = [];
  let size = 0;
  for await (const piece of call.request as AsyncIterable<Buffer>) {
    size += piece.length;
    if (size > 1 << 20) throw new S3Error(400, 'MalformedXML', 'The request is too long.');
    pieces.push(piece);
  }
  return Buffer.concat(pieces).toString('utf8');
}
