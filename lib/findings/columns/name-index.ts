import { ItemIndex, hashOf } from '@/lib/ingest/blocks/item-index';

import { KEPT } from '../bounded-map';

/** Texts put together from pieces, the first so many of which are kept: `BoundedMap` for keys in bytes. */
export class NameIndex {
  readonly #index = new ItemIndex();
  readonly #ids = new Int32Array(KEPT);
  #scratch = new Uint8Array(256);
  #length = 0;

  /** Begins a key. */
  begin(): this {
    this.#length = 0;
    return this;
  }

  byte(byte: number): this {
    if (this.#length === this.#scratch.length) this.#enlarge();
    this.#scratch[this.#length] = byte;
    this.#length += 1;
    return this;
  }

  number(value: number): this {
    return this.byte(value & 0xff)
      .byte((value >>> 8) & 0xff)
      .byte((value >>> 16) & 0xff);
  }

  bytes(bytes: Uint8Array, start: number, end: number): this {
    while (this.#length + end - start > this.#scratch.length) this.#enlarge();
    const to = this.#length - start;
    for (let at = start; at < end; at += 1) this.#scratch[to + at] = bytes[at] ?? 0;
    this.#length += end - start;
    return this;
  }

  /** What is kept under the key; -1 where there is nothing, and then `id` is kept under it unless too many are. */
  known(id: () => number): number {
    const index = this.#index;
    const hash = hashOf(this.#scratch, 0, this.#length);
    if (index.count >= KEPT) {
      const found = index.find(this.#scratch, 0, this.#length, hash);
      return found === -1 ? -1 : (this.#ids[found] ?? -1);
    }
    const found = index.add(this.#scratch, 0, this.#length, hash);
    if (found !== -1) return this.#ids[found] ?? -1;
    this.#ids[index.count - 1] = id();
    return -1;
  }

  #enlarge(): void {
    const larger = new Uint8Array(2 * this.#scratch.length);
    larger.set(this.#scratch);
    this.#scratch = larger;
  }
}
