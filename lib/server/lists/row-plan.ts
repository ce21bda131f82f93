import { longestIncreasing } from '@/lib/numerics/longest-increasing';
import { type FormerRows } from './former-rows';

/** Between the sort keys of neighbours where nothing presses: room for rows that come between them later. */
export const SPACING = 2 ** 24;
/** Below this many keys a row, what comes between two rows takes the next of them along to a place with more room. */
const TIGHT = 2;

/** What becomes of the rows of a new revision. */
export interface RowFates {
  /** A row that the former revision has not, by the mark it was given in with. */
  fresh(mark: number, sortKey: number): void;
  /** A row of the former revision that stands elsewhere now, by its index there. */
  moved(index: number, sortKey: number): void;
  /** A row of the former revision that stays as and where it is. */
  kept(index: number): void;
}

/**
 * Gives the rows of a new revision their sort keys, given in its order: each either known from the former revision or fresh. As
 * many of the known as can keep their keys (a longest increasing subsequence) stay; the others and the fresh get keys between.
 * `settle` may be called before the last row to bound what waits; then what stays is the most of what has come so far.
 */
export class RowPlan {
  /** An index of the former revision, or ~mark of a fresh row. */
  #waiting = new Int32Array(1024);
  #count = 0;
  #low = 0;

  constructor(
    private readonly former: FormerRows,
    private readonly fates: RowFates,
  ) {}

  known(index: number): void {
    this.#push(index);
  }

  fresh(mark: number): void {
    this.#push(~mark);
  }

  /** Settles all rows that have come. */
  settle(last: boolean): void {
    const stays = this.#staying();
    let begin = 0;
    let next = 0;
    for (;;) {
      while (next < this.#count && stays[next] !== 1) next += 1;
      const stayer = next < this.#count ? this.#token(next) : null;
      const high = stayer === null ? this.#openEnd(last, next > begin) : this.#keyOf(stayer);
      if (stayer !== null && next > begin && high - this.#low < TIGHT * (next - begin + 1)) {
        stays[next] = 0;
        continue;
      }
      this.#between(begin, next, high);
      if (stayer === null) break;
      this.fates.kept(stayer);
      this.#low = high;
      next += 1;
      begin = next;
    }
    this.#count = 0;
  }

  /** Which of those that wait may stay, 1 each. */
  #staying(): Uint8Array {
    const places = new Int32Array(this.#count);
    const keys = new Float64Array(this.#count);
    let known = 0;
    for (let k = 0; k < this.#count; k += 1) {
      const token = this.#token(k);
      if (token < 0 || this.#keyOf(token) <= this.#low) continue;
      places[known] = k;
      keys[known] = this.#keyOf(token);
      known += 1;
    }
    const stays = new Uint8Array(this.#count + 1);
    for (const chosen of longestIncreasing(keys.subarray(0, known))) stays[places[chosen] ?? 0] = 1;
    return stays;
  }

  /** Keys above what is settled, below `high`, in even steps. */
  #between(begin: number, end: number, high: number): void {
    const count = end - begin;
    if (count === 0) return;
    const step = Number.isFinite(high) ? (high - this.#low) / (count + 1) : SPACING;
    const from = this.#low;
    for (let k = begin; k < end; k += 1) {
      const key = from + Math.floor(step * (k - begin + 1));
      const token = this.#token(k);
      if (token < 0) this.fates.fresh(~token, key);
      else this.fates.moved(token, key);
      this.#low = key;
    }
  }

  /**
   * How far rows may reach that no staying row follows yet. At the end of the list there is no limit; before it, half of the gap
   * they are in, so that what follows finds room; from a gap that is full they go to the end, and nothing after them can stay.
   */
  #openEnd(last: boolean, isAny: boolean): number {
    if (last || !isAny) return Infinity;
    const next = this.former.keyAfter(this.#low);
    if (!Number.isFinite(next)) return Infinity;
    const half = this.#low + Math.floor((next - this.#low) / 2);
    if (half - this.#low >= TIGHT * (this.#count + 1)) return half;
    this.#low = Math.max(this.#low, this.former.lastKey);
    return Infinity;
  }

  #token(k: number): number {
    return this.#waiting[k] ?? 0;
  }

  #keyOf(index: number): number {
    return this.former.sortKeys[index] ?? NaN;
  }

  #push(token: number): void {
    if (this.#count === this.#waiting.length) {
      const longer = new Int32Array(2 * this.#count);
      longer.set(this.#waiting);
      this.#waiting = longer;
    }
    this.#waiting[this.#count] = token;
    this.#count += 1;
  }
}
