import { AppError } from '@/lib/errors';
import { requireCsv } from '@/lib/server/http/csv-body';

/**
 * The CSV body of a request, piece by piece, never held whole. Throws AppError `unsupported-media-type`, `length-required` or
 * `too-large` at once; the stream ends with `invalid-request` when the body is not as long as declared.
 */
export function csvBytes(request: Request, maxBytes: number): AsyncIterable<Uint8Array> {
  const declared = requireCsv(request.headers, maxBytes);
  const body: AsyncIterable<Uint8Array> | null = request.body;
  return exactly(body ?? nothing(), declared);
}

async function* exactly(pieces: AsyncIterable<Uint8Array>, declared: number): AsyncGenerator<Uint8Array> {
  let bytes = 0;
  try {
    for await (const piece of pieces) {
      bytes += piece.byteLength;
      if (bytes > declared) break;
      yield piece;
    }
  } catch (cause) {
    throw new AppError('invalid-request', 'The body broke off before its end.', { cause });
  }
  if (bytes === declared) return;
  const brought = bytes > declared ? 'more' : String(bytes);
  throw new AppError('invalid-request', `The request declares ${declared} bytes and brings ${brought}.`);
}

async function* nothing(): AsyncGenerator<Uint8Array> {}
