import { KEPT } from '../bounded-map';

const SLOTS = 1 << 16;

/** Rows by mass to six digits and three whole numbers, the first so many of them. */
export class PlaceIndex {
  readonly #table = new Uint16Array(SLOTS);
  readonly #numbers = new Float64Array(4 * KEPT);
  readonly #ids = new Int32Array(KEPT);
  #count = 0;
  #slot = 0;

  /** What is kept under the key; -1 where nothing is, and then `keep` may follow. */
  find(a: number, b: number, c: number, mass: number): number {
    const numbers = this.#numbers;
    let hash = Math.imul(Math.imul(Math.imul(a | 0, 0x85ebca6b) ^ (b | 0), 0xc2b2ae35) ^ (c | 0), 0x2c1b3c6d);
    hash ^= hash >>> 15;
    let slot = hash & (SLOTS - 1);
    for (let entry = this.#table[slot] ?? 0; entry !== 0; entry = this.#table[slot] ?? 0) {
      const at = 4 * (entry - 1);
      const isSame = numbers[at] === a && numbers[at + 1] === b && numbers[at + 2] === c;
      if (isSame && isSameMass(numbers[at + 3] ?? NaN, mass)) return this.#ids[entry - 1] ?? -1;
      slot = (slot + 1) & (SLOTS - 1);
    }
    this.#slot = slot;
    return -1;
  }

  get isFull(): boolean {
    return this.#count === KEPT;
  }

  /** Keeps a number under the key that was not found last. */
  keep(id: number, a: number, b: number, c: number, mass: number): void {
    this.#numbers.set([a, b, c, mass], 4 * this.#count);
    this.#ids[this.#count] = id;
    this.#count += 1;
    this.#table[this.#slot] = this.#count;
  }
}

function isSameMass(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-4 * Math.abs(a) && a.toPrecision(6) === b.toPrecision(6);
}
