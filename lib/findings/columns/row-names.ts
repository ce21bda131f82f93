import { type RowBlock } from '@/lib/ingest/blocks/row-block';

import { encoded } from './text-bytes';

const BLANK = 32;
const A = 97;
const Z = 122;

/** The bytes of left, right, lh and rh. */
const WORDS = ['left', 'right', 'lh', 'rh'].map((word) =>
  Uint8Array.from(word, (letter) => letter.charCodeAt(0)),
);

const lower = (byte: number): number => (byte >= 65 && byte <= 90 ? byte + 32 : byte);
const isLetter = (byte: number): boolean => byte >= A && byte <= Z;

/** A range of bytes that a row goes by; set by one call and good until the next. */
export class RowName {
  bytes: Uint8Array = new Uint8Array(0);
  start = 0;
  end = 0;
  #scratch = new Uint8Array(256);

  /** What people call a row: its description, or its item where it has none. */
  take(rows: RowBlock, row: number): void {
    const { description } = rows.texts;
    const [from, to] = [description.start[row] ?? 0, description.end[row] ?? 0];
    if (to > from) this.#set(rows.bytes, from, to);
    else this.takeText((to < 0 ? rows.text('description', row) : null) ?? rows.text('item', row) ?? '');
  }

  /** The part number and, where there is one, its revision. */
  takeNumber(rows: RowBlock, row: number): void {
    const { part_number: number, part_revision: revision } = rows.texts;
    const [from, to] = [number.start[row] ?? 0, number.end[row] ?? 0];
    const hasRevision = revision.start[row] !== revision.end[row];
    if (to > from && !hasRevision) this.#set(rows.bytes, from, to);
    // A NUL stands in no text.
    else
      this.takeText(
        `${rows.text('part_number', row) ?? ''}${hasRevision ? `\0${rows.text('part_revision', row) ?? ''}` : ''}`,
      );
  }

  takeText(text: string): void {
    const bytes = encoded(text);
    this.#set(bytes, 0, bytes.length);
  }

  /**
   * `withoutSide` of what `take` would take. False where bytes do not say it: texts beyond ASCII, or with blanks other than the plain
   * one.
   */
  takeWithoutSide({ bytes, texts }: RowBlock, row: number): boolean {
    const { description, item } = texts;
    const { start, end } = description.start[row] === description.end[row] ? item : description;
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    if (to < 0) return false;
    if (to - from > this.#scratch.length) this.#scratch = new Uint8Array(2 * (to - from));
    const scratch = this.#scratch;
    let length = 0;
    let isPending = false;
    let before = 0;
    for (let at = from; at < to; at += 1) {
      const plain = bytes[at] ?? 0;
      if (plain < BLANK || plain > 126) return false;
      const byte = lower(plain);
      const word = isLetter(byte) && !isLetter(before) ? wordAt(bytes, at, to) : 0;
      before = byte;
      if (word > 0) {
        at += word - 1;
        continue;
      }
      if (byte === BLANK) {
        isPending = length > 0;
        continue;
      }
      if (isPending) {
        scratch[length] = BLANK;
        length += 1;
        isPending = false;
      }
      scratch[length] = byte;
      length += 1;
    }
    this.#set(scratch, 0, length);
    return true;
  }

  #set(bytes: Uint8Array, start: number, end: number): void {
    this.bytes = bytes;
    this.start = start;
    this.end = end;
  }
}

/** The length of the side's word that begins here and is a word of its own; 0 where none does. */
function wordAt(bytes: Uint8Array, at: number, to: number): number {
  for (const word of WORDS) {
    const end = at + word.length;
    if (end > to || (end < to && isLetter(lower(bytes[end] ?? 0)))) continue;
    let k = 0;
    while (k < word.length && lower(bytes[at + k] ?? 0) === word[k]) k += 1;
    if (k === word.length) return word.length;
  }
  return 0;
}
