import { type RowBlock } from '@/lib/ingest/blocks/row-block';

import { type NameIndex } from './name-index';

const BLANK = 32;
const A = 97;
const Z = 122;

/** The bytes of left, right, lh and rh. */
const WORDS = ['left', 'right', 'lh', 'rh'].map((word) =>
  Uint8Array.from(word, (letter) => letter.charCodeAt(0)),
);

const lower = (byte: number): number => (byte >= 65 && byte <= 90 ? byte + 32 : byte);
const isLetter = (byte: number): boolean => byte >= A && byte <= Z;

/**
 * Adds `withoutSide` of a row's name to a key. False, and nothing is added, where its bytes do not say it: texts beyond ASCII, or
 * with blanks other than the plain one.
 */
export function addNameWithoutSide(key: NameIndex, rows: RowBlock, row: number): boolean {
  const { bytes, texts } = rows;
  const { start, end } =
    texts.description.start[row] === texts.description.end[row] ? texts.item : texts.description;
  const [from, to] = [start[row] ?? 0, end[row] ?? 0];
  if (to < 0) return false;
  for (let at = from; at < to; at += 1) {
    const byte = bytes[at] ?? 0;
    if (byte < BLANK || byte > 126) return false;
  }
  let isPending = false;
  let isBegun = false;
  for (let at = from; at < to; at += 1) {
    const byte = lower(bytes[at] ?? 0);
    const word =
      isLetter(byte) && (at === from || !isLetter(lower(bytes[at - 1] ?? 0))) ? wordAt(bytes, at, to) : 0;
    if (word > 0) {
      at += word - 1;
    } else if (byte === BLANK) isPending = isBegun;
    else {
      if (isPending) key.byte(BLANK);
      isPending = false;
      isBegun = true;
      key.byte(byte);
    }
  }
  return true;
}

/** The length of the side's word that begins here and is a word of its own; 0 where none does. */
function wordAt(bytes: Uint8Array, at: number, to: number): number {
  for (const word of WORDS) {
    const end = at + word.length;
    if (end > to || (end < to && isLetter(lower(bytes[end] ?? 0)))) continue;
    if (word.every((letter, k) => lower(bytes[at + k] ?? 0) === letter)) return word.length;
  }
  return 0;
}
