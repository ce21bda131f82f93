const CHUNK_BITS = 20;
const CHUNK = 1 << CHUNK_BITS;
const START_BITS = 16;
const STARTS = 1 << START_BITS;
/** A slot holds an ordinal + 1 in its lower bits and some bits of the hash above them. */
const ORDINAL_BITS = 22;
const ORDINALS = 1 << ORDINAL_BITS;
const ORDINAL_MASK = ORDINALS - 1;
const NO_BYTES = new Uint8Array(0);

/** Returned for a text that is one of thousands with neighbouring hashes: no list has such items but one that was made for it. */
export const CROWDED = -2;
const STEPS = 10_000;

/** A hash of some bytes, four at a time and every bit spread over all (after MurmurHash3, public domain). */
export function hashOf(bytes: Uint8Array, start: number, end: number): number {
  let hash = end - start;
  let at = start;
  for (; at + 4 <= end; at += 4) {
    const word =
      (bytes[at] ?? 0) |
      ((bytes[at + 1] ?? 0) << 8) |
      ((bytes[at + 2] ?? 0) << 16) |
      ((bytes[at + 3] ?? 0) << 24);
    hash = Math.imul(hash ^ (hash >>> 15) ^ word, 0x2c1b3c6d);
  }
  for (; at < end; at += 1) hash = Math.imul(hash ^ (hash >>> 15) ^ (bytes[at] ?? 0), 0x2c1b3c6d);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return hash ^ (hash >>> 16);
}

/**
 * A set of texts that numbers them in the order in which they come: their bytes one after another and a table of ordinals, about twelve
 * bytes a text besides the text itself. Texts are compared byte by byte; the hash only says where to look.
 */
export class ItemIndex {
  #table = new Uint32Array(1 << 10);
  readonly #chunks: Uint8Array[] = [];
  readonly #starts: Uint32Array[] = [];
  #free = 0;
  count = 0;

  /** The ordinal of a text that is known; otherwise -1, and the text gets the next ordinal, or `CROWDED`. `hash` is its `hashOf`. */
  add(bytes: Uint8Array, start: number, end: number, hash: number): number {
    const slot = this.#slotOf(bytes, start, end, hash);
    if (slot === CROWDED) return CROWDED;
    const known = ((this.#table[slot] ?? 0) & ORDINAL_MASK) - 1;
    if (known >= 0) return known;
    if (this.count + 1 >= ORDINALS) throw new RangeError(`No more than ${ORDINALS} texts are told apart.`);
    this.#keep(bytes, start, end);
    this.#table[slot] = (hash & ~ORDINAL_MASK) | (this.count + 1);
    this.count += 1;
    if (2 * this.count > this.#table.length) this.#grow();
    return -1;
  }

  /** What the table holds where the search for a text of this hash begins. */
  foresee(hash: number): number {
    return this.#table[hash & (this.#table.length - 1)] ?? 0;
  }

  /** The ordinal of a text, -1 where it is not known. */
  find(bytes: Uint8Array, start: number, end: number, hash: number): number {
    const slot = this.#slotOf(bytes, start, end, hash);
    return slot === CROWDED ? -1 : ((this.#table[slot] ?? 0) & ORDINAL_MASK) - 1;
  }

  bytesOf(ordinal: number): Uint8Array {
    const place = this.#startOf(ordinal);
    const chunk = this.#chunks[place >>> CHUNK_BITS] ?? NO_BYTES;
    const at = (place & (CHUNK - 1)) + 2;
    return chunk.subarray(at, at + lengthAt(chunk, at - 2));
  }

  /** Where the text is, or the empty slot where it would go, or `CROWDED`. */
  #slotOf(bytes: Uint8Array, start: number, end: number, hash: number): number {
    const table = this.#table;
    const mask = table.length - 1;
    const tag = (hash & ~ORDINAL_MASK) >>> 0;
    let slot = hash & mask;
    let steps = 0;
    for (let entry = table[slot] ?? 0; entry !== 0; entry = table[slot] ?? 0) {
      steps += 1;
      if (steps > STEPS) return CROWDED;
      if ((entry & ~ORDINAL_MASK) >>> 0 === tag && this.#isAt((entry & ORDINAL_MASK) - 1, bytes, start, end))
        return slot;
      slot = (slot + 1) & mask;
    }
    return slot;
  }

  #isAt(ordinal: number, bytes: Uint8Array, start: number, end: number): boolean {
    const place = this.#startOf(ordinal);
    const chunk = this.#chunks[place >>> CHUNK_BITS];
    if (chunk === undefined) return false;
    const at = place & (CHUNK - 1);
    const length = end - start;
    if (lengthAt(chunk, at) !== length) return false;
    // From the end: neighbours begin alike.
    for (let k = length - 1; k >= 0; k -= 1) if (chunk[at + 2 + k] !== bytes[start + k]) return false;
    return true;
  }

  #startOf(ordinal: number): number {
    return this.#starts[ordinal >>> START_BITS]?.[ordinal & (STARTS - 1)] ?? 0;
  }

  #keep(bytes: Uint8Array, start: number, end: number): void {
    const length = end - start;
    if (length > 0xffff) throw new RangeError(`A text of ${length} bytes is too long to be told apart.`);
    let chunk = this.#chunks.at(-1);
    if (chunk === undefined || this.#free + 2 + length > chunk.length) {
      chunk = new Uint8Array(CHUNK);
      this.#chunks.push(chunk);
      this.#free = 0;
    }
    const at = this.count & (STARTS - 1);
    if (at === 0) this.#starts.push(new Uint32Array(STARTS));
    const starts = this.#starts[this.count >>> START_BITS];
    if (starts !== undefined) starts[at] = ((this.#chunks.length - 1) << CHUNK_BITS) | this.#free;
    chunk[this.#free] = length & 0xff;
    chunk[this.#free + 1] = length >>> 8;
    for (let k = 0; k < length; k += 1) chunk[this.#free + 2 + k] = bytes[start + k] ?? 0;
    this.#free += 2 + length;
  }

  #grow(): void {
    const table = new Uint32Array(2 * this.#table.length);
    const mask = table.length - 1;
    this.#table = table;
    for (let ordinal = 0; ordinal < this.count; ordinal += 1) {
      const place = this.#startOf(ordinal);
      const chunk = this.#chunks[place >>> CHUNK_BITS] ?? NO_BYTES;
      const at = (place & (CHUNK - 1)) + 2;
      const hash = hashOf(chunk, at, at + lengthAt(chunk, at - 2));
      let slot = hash & mask;
      while (table[slot] !== 0) slot = (slot + 1) & mask;
      table[slot] = (hash & ~ORDINAL_MASK) | (ordinal + 1);
    }
  }
}

function lengthAt(chunk: Uint8Array, at: number): number {
  return (chunk[at] ?? 0) | ((chunk[at + 1] ?? 0) << 8);
}

export function enlarged(array: Uint32Array): Uint32Array<ArrayBuffer> {
  const larger = new Uint32Array(2 * array.length);
  larger.set(array);
  return larger;
}
