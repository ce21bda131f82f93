import { type Vec3 } from '@/lib/numerics/vec3';

import { type RowBlock, type TextColumn, type TextRanges } from '@/lib/ingest/blocks/row-block';

import { type Side, namedSide } from '../named-side';
import { type CheckBlock } from './check-block';
import { ASK_THE_TEXT, NAMES_LEFT, NAMES_NO_SIDE } from './side-in-bytes';
import { decoded } from './text-bytes';

const NUMBERS = 14;

/** A row as several books keep it: what they may have to say of it later. SI; place in airframe components. */
export interface KeptRow {
  readonly item: string;
  readonly description: string | null;
  readonly partNumber: string | null;
  readonly group: string;
  readonly side: Side | null;
  readonly isMirrored: boolean;
  readonly mass: number;
  readonly right: number;
  readonly place: Vec3;
  readonly moments: readonly [number, number, number, number, number, number];
  readonly turn: Vec3;
}

/** Rows that books of a list keep, as bytes and numbers: some 200 bytes a row, and one entry for all books. */
export class KeptRows {
  #bytes = new Uint8Array(1 << 12);
  /** Where the item, the description and the part number of each row end, and the ones before the first row: at 0. */
  #ends = new Int32Array(3 * 64 + 1);
  #numbers = new Float64Array(64 * NUMBERS);
  #codes = new Uint8Array(64);
  #groups = new Int32Array(64);
  #count = 0;
  #serial = 0;
  #kept = new Int32Array(0);
  #paths: readonly string[] = [];

  /** Keeps a row, once however often it is asked for; returns its number. */
  keep(block: CheckBlock, row: number): number {
    const { rows } = block;
    if (block.serial !== this.#serial) {
      this.#serial = block.serial;
      if (this.#kept.length === 0) this.#kept = new Int32Array(rows.lines.length);
      this.#kept.fill(-1);
      this.#paths = rows.groups;
    }
    const known = this.#kept[row] ?? -1;
    if (known !== -1) return known;
    const id = this.#count;
    this.#count += 1;
    this.#kept[row] = id;
    if (id === this.#codes.length) this.#enlarge();
    this.#keepTexts(block, row, id);
    this.#keepNumbers(block, row, id);
    this.#groups[id] = rows.group[row] ?? 0;
    this.#codes[id] = (block.side[row] ?? 0) | ((block.isMirrored[row] ?? 0) << 2);
    return id;
  }

  right(id: number): number {
    return this.#numbers[id * NUMBERS + 1] ?? NaN;
  }

  /** Coordinate k of the place. */
  place(id: number, k: number): number {
    return this.#numbers[id * NUMBERS + 2 + k] ?? NaN;
  }

  side(id: number): number {
    return (this.#codes[id] ?? 0) & 3;
  }

  row(id: number): KeptRow {
    const at = (k: number): number => this.#numbers[id * NUMBERS + k] ?? NaN;
    const [item, description, partNumber] = this.#texts(id);
    const side = this.side(id);
    return {
      item: item ?? '',
      description: description ?? null,
      partNumber: partNumber ?? null,
      group: this.#paths[this.#groups[id] ?? 0] ?? '',
      side:
        side === ASK_THE_TEXT
          ? (namedSide(description ?? '') ?? namedSide(item ?? ''))
          : side === NAMES_NO_SIDE
            ? null
            : side === NAMES_LEFT
              ? 'left'
              : 'right',
      isMirrored: (this.#codes[id] ?? 0) >= 4,
      mass: at(0),
      right: at(1),
      place: [at(2), at(3), at(4)],
      moments: [at(5), at(6), at(7), at(8), at(9), at(10)],
      turn: [at(11), at(12), at(13)],
    };
  }

  #texts(id: number): (string | null)[] {
    const [from = 0, afterItem = 0, afterDescription = 0, to = 0] = this.#ends.subarray(3 * id, 3 * id + 4);
    const text = (start: number, end: number): string | null =>
      start === end ? null : decoded(this.#bytes.subarray(start, end));
    return [text(from, afterItem), text(afterItem, afterDescription), text(afterDescription, to)];
  }

  #keepTexts({ rows }: CheckBlock, row: number, id: number): void {
    const { item, description, part_number: number } = rows.texts;
    const start = this.#ends[3 * id] ?? 0;
    const afterItem = this.#keepText(rows, 'item', item, row, start);
    const afterDescription = this.#keepText(rows, 'description', description, row, afterItem);
    this.#ends[3 * id + 1] = afterItem;
    this.#ends[3 * id + 2] = afterDescription;
    this.#ends[3 * id + 3] = this.#keepText(rows, 'part_number', number, row, afterDescription);
  }

  /** Returns where the text ends. */
  #keepText(rows: RowBlock, column: TextColumn, { start, end }: TextRanges, row: number, at: number): number {
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    if (to < 0) return this.#keepBytes(rows.textBytes(column, row), 0, null, at);
    return this.#keepBytes(rows.bytes, from, to, at);
  }

  #keepBytes(bytes: Uint8Array, from: number, to: number | null, at: number): number {
    const end = at + (to ?? bytes.length) - from;
    if (end > this.#bytes.length) {
      const larger = new Uint8Array(2 * end);
      larger.set(this.#bytes);
      this.#bytes = larger;
    }
    for (let k = 0; k < end - at; k += 1) this.#bytes[at + k] = bytes[from + k] ?? 0;
    return end;
  }

  #keepNumbers({ rows, right, place }: CheckBlock, row: number, id: number): void {
    const { mass, ixx, iyy, izz, ixy, ixz, iyz, yaw, pitch, roll } = rows.numbers;
    const numbers = this.#numbers;
    const at = id * NUMBERS;
    numbers[at] = mass[row] ?? NaN;
    numbers[at + 1] = right[row] ?? NaN;
    numbers[at + 2] = place[0][row] ?? NaN;
    numbers[at + 3] = place[1][row] ?? NaN;
    numbers[at + 4] = place[2][row] ?? NaN;
    numbers[at + 5] = ixx[row] ?? NaN;
    numbers[at + 6] = iyy[row] ?? NaN;
    numbers[at + 7] = izz[row] ?? NaN;
    numbers[at + 8] = ixy[row] ?? NaN;
    numbers[at + 9] = ixz[row] ?? NaN;
    numbers[at + 10] = iyz[row] ?? NaN;
    numbers[at + 11] = yaw[row] ?? NaN;
    numbers[at + 12] = pitch[row] ?? NaN;
    numbers[at + 13] = roll[row] ?? NaN;
  }

  #enlarge(): void {
    const [numbers, codes, groups, ends] = [this.#numbers, this.#codes, this.#groups, this.#ends];
    this.#ends = new Int32Array(2 * ends.length - 1);
    this.#ends.set(ends);
    this.#numbers = new Float64Array(2 * numbers.length);
    this.#numbers.set(numbers);
    this.#codes = new Uint8Array(2 * codes.length);
    this.#codes.set(codes);
    this.#groups = new Int32Array(2 * groups.length);
    this.#groups.set(groups);
  }
}
