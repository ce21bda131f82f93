import { Readable, Transform, type TransformCallback } from 'node:stream';
import { type ReadableStream } from 'node:stream/web';
import { AppError } from '@/lib/errors';
import { requireCsv } from '@/lib/server/http/csv-body';
import { type ObjectStore, objectStore } from '@/lib/server/storage/client';
import { storeStream } from '@/lib/server/storage/store-stream';
import { sentFileName } from './file-name';

export interface ReceiveOptions {
  readonly maxBytes: number;
  readonly store?: ObjectStore;
}

export interface ReceivedFile {
  /** Hex; the name it is stored under. */
  readonly sha256: string;
  readonly bytes: number;
  /** Physical lines, the last one with or without its line break. */
  readonly lines: number;
  readonly name: string;
}

/**
 * Stores the body of a request without holding it in memory; whoever calls has checked who may. Throws AppError
 * `unsupported-media-type`, `length-required` or `too-large` before the first byte, `invalid-request` when the body is empty, not
 * as long as declared or breaks off, `unavailable` when the store fails. Then nothing is kept.
 */
export async function receiveFile(request: Request, options: ReceiveOptions): Promise<ReceivedFile> {
  const { maxBytes, store = objectStore() } = options;
  const contentLength = requireCsv(request.headers, maxBytes);
  const source = Readable.fromWeb(bodyOf(request));
  const counter = new LineCounter();
  const brokenOff = (cause: Error) => counter.destroy(new AppError('invalid-request', BROKEN_OFF, { cause }));
  source.once('error', brokenOff);
  counter.once('error', () => source.unpipe(counter));
  source.pipe(counter);
  try {
    const stored = await storeStream(counter, { contentLength, signal: request.signal, store });
    return { ...stored, lines: counter.lines, name: sentFileName(request.headers) };
  } finally {
    counter.destroy();
    source.destroy();
  }
}

const BROKEN_OFF = 'The body broke off before its end. Nothing was kept.';

/** The two declarations of a web stream, the browser's and Node's, describe one and the same object. */
function bodyOf(request: Request): ReadableStream<Uint8Array> {
  if (request.body === null) throw new AppError('invalid-request', 'The file is empty.');
  return request.body as ReadableStream<Uint8Array>;
}

const LINE_FEED = 0x0a;

/** Passes bytes on and counts their lines. */
class LineCounter extends Transform {
  #breaks = 0;
  #last = LINE_FEED;

  get lines(): number {
    return this.#breaks + (this.#last === LINE_FEED ? 0 : 1);
  }

  override _transform(piece: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    for (let at = piece.indexOf(LINE_FEED); at !== -1; at = piece.indexOf(LINE_FEED, at + 1))
      this.#breaks += 1;
    this.#last = piece.at(-1) ?? this.#last;
    done(null, piece);
  }
}
