import { hashOf } from '@/lib/ingest/blocks/item-index';

import { KEPT } from '../bounded-map';

const SLOTS = 1 << 16;

/**
 * Names in bytes, each within a class, numbered in the order in which they are kept: the keys of a `BoundedMap` without making texts of
 * them.
 */
export class NameIndex {
  /** Ordinal of a name + 1. */
  readonly #table = new Uint16Array(SLOTS);
  readonly #hashes = new Int32Array(KEPT);
  readonly #classes = new Int32Array(KEPT);
  readonly #starts = new Int32Array(KEPT + 1);
  #bytes = new Uint8Array(1 << 16);
  #count = 0;
  #slot = 0;
  #hash = 0;

  get isFull(): boolean {
    return this.#count === KEPT;
  }

  /** The number of a name; -1 for one that is not kept, and then `keep` may follow. */
  find(bytes: Uint8Array, start: number, end: number, ofClass: number): number {
    const hash = hashOf(bytes, start, end) ^ Math.imul(ofClass, 0x9e3779b1);
    const table = this.#table;
    let slot = (hash ^ (hash >>> 16)) & (SLOTS - 1);
    for (let entry = table[slot] ?? 0; entry !== 0; entry = table[slot] ?? 0) {
      if (this.#hashes[entry - 1] === hash && this.#isAt(entry - 1, bytes, start, end, ofClass))
        return entry - 1;
      slot = (slot + 1) & (SLOTS - 1);
    }
    this.#slot = slot;
    this.#hash = hash;
    return -1;
  }

  /** Keeps the name that was not found last; returns its number. */
  keep(bytes: Uint8Array, start: number, end: number, ofClass: number): number {
    const at = this.#starts[this.#count] ?? 0;
    const length = end - start;
    if (at + length > this.#bytes.length) {
      const larger = new Uint8Array(2 * (at + length));
      larger.set(this.#bytes);
      this.#bytes = larger;
    }
    for (let k = 0; k < length; k += 1) this.#bytes[at + k] = bytes[start + k] ?? 0;
    this.#hashes[this.#count] = this.#hash;
    this.#classes[this.#count] = ofClass;
    this.#count += 1;
    this.#starts[this.#count] = at + length;
    this.#table[this.#slot] = this.#count;
    return this.#count - 1;
  }

  #isAt(ordinal: number, bytes: Uint8Array, start: number, end: number, ofClass: number): boolean {
    const at = this.#starts[ordinal] ?? 0;
    const length = end - start;
    if (this.#classes[ordinal] !== ofClass || this.#starts[ordinal + 1] !== at + length) return false;
    for (let k = 0; k < length; k += 1) if (this.#bytes[at + k] !== bytes[start + k]) return false;
    return true;
  }
}
