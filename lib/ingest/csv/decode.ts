import { blocks } from '@/lib/ingest/csv/blocks';
import { CsvFault } from '@/lib/ingest/csv/fault';

const CONTEXT = 40;

/** Text with every line end written as \n; `bytes` counts what has been read so far. */
export interface TextPiece {
  readonly text: string;
  readonly bytes: number;
}

/** Where in a file a reading begins that is not its beginning: at this physical line, after so many bytes. */
export interface TextStart {
  readonly line: number;
  readonly bytes: number;
}

/**
 * UTF-8 bytes -> text. A byte order mark is dropped. With `from` the bytes are the rest of a file, from the beginning of a line on.
 * Throws a CsvFault naming the line at a NUL byte, UTF-16 or a byte that is not UTF-8, after all text before it.
 */
export async function* decodeText(
  bytes: AsyncIterable<Uint8Array>,
  blockBytes: number,
  from: TextStart | null = null,
): AsyncGenerator<TextPiece> {
  const lineEnds = new LineEnds();
  lineEnds.line = from?.line ?? 1;
  let tail: Uint8Array = new Uint8Array(0);
  let read = from?.bytes ?? 0;
  // Neither a byte order mark nor the NUL bytes of UTF-16 are looked for within a file.
  let characters = from === null ? 0 : 2;

  for await (const block of blocks(bytes, blockBytes)) {
    read += block.length;
    const joined = tail.length === 0 ? block : concat(tail, block);
    const end = endOfLastWholeCharacter(joined);
    tail = joined.slice(end);
    const { text, bad } = decodeWhole(joined.subarray(0, end));
    const nul = text.indexOf('\0');
    const good = lineEnds.take(nul === -1 ? text : text.slice(0, nul), nul !== -1 || bad !== null);
    yield { text: characters === 0 ? good.replace(/^\uFEFF/u, '') : good, bytes: read };
    if (nul !== -1) throw nulFault(characters + nul, lineEnds);
    if (bad !== null) throw notUtf8(bad, characters + text.length === 0, lineEnds);
    characters += text.length;
  }
  const rest = lineEnds.take('', true);
  if (rest !== '') yield { text: rest, bytes: read };
  const cut = tail[0];
  if (cut !== undefined) throw notUtf8(cut, false, lineEnds);
}

/** Rewrites \r\n and \r as \n over piece boundaries and knows the present line. */
class LineEnds {
  private held = '';
  line = 1;
  context = '';

  take(piece: string, last: boolean): string {
    let text = this.held + piece;
    this.held = '';
    if (!last && text.endsWith('\r')) {
      this.held = '\r';
      text = text.slice(0, -1);
    }
    if (text.includes('\r')) text = text.replace(/\r\n?/gu, '\n');
    this.line += countNewlines(text);
    const newline = text.lastIndexOf('\n');
    this.context = (newline === -1 ? this.context + text : text.slice(newline + 1)).slice(-CONTEXT);
    return text;
  }
}

export function countNewlines(text: string): number {
  let count = 0;
  for (let at = text.indexOf('\n'); at !== -1; at = text.indexOf('\n', at + 1)) count += 1;
  return count;
}

const strict = new TextDecoder('utf-8', { fatal: true, ignoreBOM: true });
const lenient = new TextDecoder('utf-8', { ignoreBOM: true });

/** The text up to the first byte that is not UTF-8, and that byte (null when there is none). */
function decodeWhole(bytes: Uint8Array): { text: string; bad: number | null } {
  try {
    return { text: strict.decode(bytes), bad: null };
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    // Valid sequences survive decoding and encoding unchanged; the first difference is the first bad byte.
    const again = new TextEncoder().encode(lenient.decode(bytes));
    const at = bytes.findIndex((byte, index) => byte !== again[index]);
    return { text: lenient.decode(bytes.subarray(0, at)).replace(/\uFFFD+$/u, ''), bad: bytes[at] ?? 0 };
  }
}

/** The end of the last character that is complete, or the whole length where the last bytes are no beginning of one. */
function endOfLastWholeCharacter(bytes: Uint8Array): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back += 1) {
    const byte = bytes[bytes.length - back] ?? 0;
    if ((byte & 0xc0) === 0x80) continue;
    const length = byte >= 0xf0 ? 4 : byte >= 0xe0 ? 3 : byte >= 0xc0 ? 2 : 1;
    return length > back && byte < 0xf8 ? bytes.length - back : bytes.length;
  }
  return bytes.length;
}

function concat(a: Uint8Array, b: Uint8Array): Uint8Array {
  const joined = new Uint8Array(a.length + b.length);
  joined.set(a);
  joined.set(b, a.length);
  return joined;
}

function nulFault(offset: number, { line, context }: LineEnds): CsvFault {
  if (offset <= 1) return utf16();
  return new CsvFault({
    kind: 'nul-byte',
    line,
    column: null,
    found: context,
    message: 'A NUL byte stands in the text. Export the list again as plain CSV text in UTF-8.',
  });
}

function notUtf8(byte: number, atStart: boolean, { line, context }: LineEnds): CsvFault {
  if (atStart && byte >= 0xfe) return utf16();
  const character = new TextDecoder('windows-1252').decode(new Uint8Array([byte]));
  const hex = byte.toString(16).toUpperCase().padStart(2, '0');
  return new CsvFault({
    kind: 'not-utf8',
    line,
    column: null,
    found: context + character,
    message:
      `Byte ${hex} is not UTF-8; in Latin-1 or Windows-1252 it would be \`${character}\`. ` +
      'Save the file as UTF-8.',
  });
}

function utf16(): CsvFault {
  return new CsvFault({
    kind: 'utf16',
    line: 1,
    column: null,
    found: null,
    message: 'The file is UTF-16 text. Save it as UTF-8.',
  });
}
