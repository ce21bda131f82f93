import { S3Error } from './errors';

const malformed = () => new S3Error(400, 'IncompleteBody', 'The body is not whole aws-chunked text.');

/**
 * Takes the framing off an `aws-chunked` body (`size[;signature] CRLF bytes CRLF ... 0 CRLF trailers`): yields the bytes
 * and returns the trailers in lower case. The chunks' own signatures are not checked.
 */
export async function* unframe(
  source: AsyncIterable<Buffer>,
): AsyncGenerator<Buffer, Map<string, string>, undefined> {
  const trailers = new Map<string, string>();
  let held = Buffer.alloc(0);
  let left = 0;
  let state = 'size' as 'size' | 'bytes' | 'gap' | 'trailers';
  for await (const piece of source) {
    held = Buffer.concat([held, piece]);
    for (;;) {
      if (state === 'bytes') {
        const bytes = held.subarray(0, left);
        held = held.subarray(bytes.length);
        left -= bytes.length;
        if (bytes.length > 0) yield bytes;
        if (left > 0) break;
        state = 'gap';
      }
      const end = held.indexOf('\r\n');
      if (end < 0) break;
      const line = held.subarray(0, end).toString('latin1');
      held = held.subarray(end + 2);
      if (state === 'gap') {
        if (line !== '') throw malformed();
        state = 'size';
      } else if (state === 'trailers') {
        const colon = line.indexOf(':');
        if (colon > 0) trailers.set(line.slice(0, colon).toLowerCase(), line.slice(colon + 1).trim());
      } else {
        if (!/^[0-9a-fA-F]+(;.*)?$/.test(line)) throw malformed();
        left = parseInt(line, 16);
        state = left === 0 ? 'trailers' : 'bytes';
      }
    }
  }
  if (state !== 'trailers') throw malformed();
  return trailers;
}
