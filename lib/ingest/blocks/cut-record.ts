import { fieldText } from './row-block';

const QUOTE = 34;
const NEWLINE = 10;
const RETURN = 13;

/** One record cut out of bytes: its texts, where the next begins, how many line ends its texts hold. */
export interface CutRecord {
  readonly fields: readonly string[];
  readonly next: number;
  readonly lineEnds: number;
}

/**
 * Cuts the record that begins at `at` out of UTF-8 bytes that end, at `limit`, with a line end. `incomplete` where a quoted text goes on
 * beyond that; `irregular` where RFC 4180 does not say how to read on: a closing quote that is followed by anything but a
 * delimiter or a line end, a carriage return alone.
 */
export function cutRecord(
  bytes: Uint8Array,
  at: number,
  limit: number,
  delimiter: number,
): CutRecord | 'incomplete' | 'irregular' {
  const fields: string[] = [];
  let lineEnds = 0;
  for (let start = at; ;) {
    let end = start;
    if (bytes[start] === QUOTE) {
      end = closingQuote(bytes, start + 1, limit);
      if (end === limit) return 'incomplete';
      const text = fieldText(bytes, start, end + 1);
      for (let k = text.indexOf('\n'); k !== -1; k = text.indexOf('\n', k + 1)) lineEnds += 1;
      fields.push(text);
      end += 1;
    } else {
      for (let byte = bytes[end]; byte !== delimiter && byte !== NEWLINE && byte !== RETURN;) {
        end += 1;
        byte = bytes[end];
      }
      fields.push(fieldText(bytes, start, end));
    }
    if (bytes[end] === delimiter) {
      start = end + 1;
      continue;
    }
    if (bytes[end] === RETURN) end += 1;
    if (bytes[end] !== NEWLINE) return 'irregular';
    return { fields, next: end + 1, lineEnds };
  }
}

/** The quote that closes the text which begins at `at`; `limit` where there is none. */
export function closingQuote(bytes: Uint8Array, at: number, limit: number): number {
  let end = at;
  for (; end < limit; end += 1) {
    if (bytes[end] !== QUOTE) continue;
    if (bytes[end + 1] !== QUOTE) return end;
    end += 1;
  }
  return limit;
}
