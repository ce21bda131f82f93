import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { cutRecord } from '@/lib/ingest/blocks/cut-record';
import { isText } from '@/lib/ingest/blocks/valid-text';
import { randomNumbers } from '@/tests/support/random';

/*
 * The records that are cut out of bytes against those of papaparse. Where papaparse reads what RFC 4180 does not allow, the cut must say
 * `irregular` or `incomplete` and leave the file to the reader that rests on papaparse:
 *   - it accepts blanks between a closing quote and the delimiter, and takes a closing quote that anything else follows as text;
 *   - it closes a quote that is left open at the end of the file;
 *   - told that lines end in \n it keeps a \r as text, so it is given the text with every line end as \n, as our reader gives it.
 */

const FILES = 100_000;
const PIECES = [
  'a',
  'b7',
  '',
  ' ',
  '"',
  '""',
  ',',
  ';',
  '\t',
  '\n',
  '\r\n',
  '\r',
  'é',
  '€',
  '😀',
  '\u00A0',
  '\uFEFF',
  '1.5',
];
const encoder = new TextEncoder();

/** A small file: mostly right, with whatever CSV can hold; a third of them with quotes and line ends anywhere. */
function anyFile(random: () => number, delimiter: string): string {
  const pick = (): string => PIECES[Math.floor(random() * PIECES.length)] ?? '';
  const isWild = random() < 0.33;
  const end = random() < 0.5 ? '\n' : '\r\n';
  let text = random() < 0.1 ? '\uFEFF' : '';
  for (let rows = Math.floor(5 * random()); rows >= 0; rows -= 1) {
    const fields: string[] = [];
    for (let k = Math.floor(4 * random()); k >= 0; k -= 1) {
      let field = '';
      for (let n = Math.floor(4 * random()); n > 0; n -= 1) field += pick();
      const isPlain = !isWild && random() < 0.6;
      if (isPlain) field = field.replace(/[",;\t\r\n]/gu, '');
      else if (!isWild) field = `"${field.replaceAll('"', '""')}"`;
      fields.push(field);
    }
    text += fields.join(delimiter) + (rows === 0 && random() < 0.5 ? '' : end);
  }
  return text;
}

/** The records of a file by bytes; null where it is left to others. */
function cutAll(text: string, delimiter: string): string[][] | null {
  const bytes = encoder.encode(text.endsWith('\n') ? text : `${text}\n`);
  const records: string[][] = [];
  for (let at = 0; at < bytes.length;) {
    const cut = cutRecord(bytes, at, bytes.length, delimiter.charCodeAt(0));
    if (typeof cut === 'string') return null;
    records.push([...cut.fields]);
    at = cut.next;
  }
  return records;
}

describe('records cut out of bytes', () => {
  it('are those of papaparse in 100,000 files of quotes, line ends, byte order marks, empty and missing fields and Unicode', () => {
    const random = randomNumbers(20261201);
    let [left, quoted, ragged] = [0, 0, 0];
    for (let k = 0; k < FILES; k += 1) {
      const delimiter = [',', ';', '\t'][k % 3] ?? ',';
      const text = anyFile(random, delimiter);
      const records = cutAll(text, delimiter);
      if (records === null) {
        left += 1;
        continue;
      }
      const unix = text.replace(/\r\n?/gu, '\n');
      // papaparse gives a file that ends with a line end one more record, an empty one.
      const whole = new Papa.Parser({ delimiter, newline: '\n' }).parse(
        unix.endsWith('\n') ? unix : `${unix}\n`,
        0,
        false,
      );
      const wanted = (whole as Papa.ParseResult<string[]>).data.slice(0, -1);
      if (JSON.stringify(records) !== JSON.stringify(wanted)) expect([text, records]).toEqual([text, wanted]);
      if (text.includes('"')) quoted += 1;
      if (new Set(records.map((fields) => fields.length)).size > 1) ragged += 1;
    }
    // The files are what they are meant to be.
    expect(left).toBeLessThan(0.35 * FILES);
    expect(quoted).toBeGreaterThan(0.3 * FILES);
    expect(ragged).toBeGreaterThan(0.3 * FILES);
  }, 60_000);

  it.each([
    ['a blank after a closing quote', '"a" ,b\n', 'irregular'],
    ['text after a closing quote', '"a"b,c\n', 'irregular'],
    ['a carriage return alone', 'a,b\rc\n', 'irregular'],
    ['a quote left open', 'a,"b\n', 'incomplete'],
  ])('are left to others at %s', (_, text, why) => {
    const bytes = encoder.encode(text);
    expect(cutRecord(bytes, 0, bytes.length, 44)).toBe(why);
  });
});

describe('text', () => {
  it('is what a strict decoder takes and what holds no NUL, wherever it begins in memory', () => {
    const random = randomNumbers(77);
    const strict = new TextDecoder('utf-8', { fatal: true });
    for (let k = 0; k < 20_000; k += 1) {
      const odd = [0, 0x7f, 0x80, 0xc3, 0xa9, 0xed, 0xa0, 0xf0, 0xff];
      const buffer = Uint8Array.from({ length: 24 }, () =>
        random() < 0.04 ? (odd[Math.floor(random() * odd.length)] ?? 0) : 32 + Math.floor(90 * random()),
      );
      const [start, end] = [Math.floor(6 * random()), 16 + Math.floor(8 * random())];
      const part = buffer.subarray(start, end);
      let isRight = !part.includes(0);
      try {
        strict.decode(part);
      } catch (error) {
        expect(error).toBeInstanceOf(TypeError);
        isRight = false;
      }
      expect(isText(buffer, start, end)).toBe(isRight);
    }
  });
});
