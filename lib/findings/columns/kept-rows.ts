import { type Vec3 } from '@/lib/numerics/vec3';

import { type Side, namedSide } from '../named-side';
import { type CheckBlock } from './check-block';
import { ASK_THE_TEXT, NAMES_LEFT, NAMES_NO_SIDE } from './side-in-bytes';
import { decoded } from './text-bytes';

const CHUNK = 1 << 18;
const NUMBERS = 15;

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
  readonly #chunks: Uint8Array[] = [];
  #free = CHUNK;
  /** Where the three texts of each row begin: chunk and offset; then their lengths. */
  readonly #starts: number[] = [];
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
    this.#keepTexts(block, row);
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
    const [chunk = 0, start = 0, ...lengths] = this.#starts.slice(5 * id, 5 * id + 5);
    let from = start;
    return lengths.map((length) => {
      const text = this.#chunks[chunk]?.subarray(from, from + length);
      from += length;
      return length === 0 ? null : decoded(text ?? new Uint8Array(0));
    });
  }

  #keepTexts({ rows }: CheckBlock, row: number): void {
    const texts = [
      rows.textBytes('item', row),
      rows.textBytes('description', row),
      rows.textBytes('part_number', row),
    ];
    const length = texts.reduce((sum, text) => sum + text.length, 0);
    let chunk = this.#chunks.at(-1);
    if (chunk === undefined || this.#free + length > chunk.length) {
      chunk = new Uint8Array(Math.max(CHUNK, length));
      this.#chunks.push(chunk);
      this.#free = 0;
    }
    this.#starts.push(this.#chunks.length - 1, this.#free, ...texts.map((text) => text.length));
    for (const text of texts) {
      chunk.set(text, this.#free);
      this.#free += text.length;
    }
  }

  #keepNumbers({ rows, right, place }: CheckBlock, row: number, id: number): void {
    const { mass, ixx, iyy, izz, ixy, ixz, iyz, yaw, pitch, roll } = rows.numbers;
    const columns = [mass, right, ...place, ixx, iyy, izz, ixy, ixz, iyz, yaw, pitch, roll];
    for (const [k, column] of columns.entries()) this.#numbers[id * NUMBERS + k] = column[row] ?? NaN;
  }

  #enlarge(): void {
    const [numbers, codes, groups] = [this.#numbers, this.#codes, this.#groups];
    this.#numbers = new Float64Array(2 * numbers.length);
    this.#numbers.set(numbers);
    this.#codes = new Uint8Array(2 * codes.length);
    this.#codes.set(codes);
    this.#groups = new Int32Array(2 * groups.length);
    this.#groups.set(groups);
  }
}
