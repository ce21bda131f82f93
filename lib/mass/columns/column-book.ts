import { fromNumbers } from '@/lib/mass/account';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type Placement } from '@/lib/mass/place';
import { type Subtotal, type SubtotalKey } from '@/lib/mass/subtotals';
import { type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';
import { type AccountUncertainty, CERTAIN } from '@/lib/mass/uncertainty/sums';
import { sumError } from '@/lib/numerics/sums';

import { RowAccounts } from './row-accounts';
import { type RowColumns } from './row-columns';
import { RowCovariances, TRIANGLE } from './row-covariances';
import { addAll, addAllTimes, addOne, addOneTimes, doubled } from './running-sums';

const TEN = 10;
/** An account's ten sums and what was lost of them; the same of the mass, and of the mass with a σ. */
const PART = 2 * TEN + 4;
const MASS = 2 * TEN;
const MASS_WITH_SIGMA = MASS + 2;
/** The parts of an entry. */
const BASIC = 0;
const STATED = 1;
const UNSTATED = 2;
const PARTS = 3;
/** Counts of an entry: rows, pieces, memo rows. */
const COUNTS = 3;

const KEYS = CATEGORIES.length * (MATURITIES.length + 1) * CHANGE_STATUSES.length;

/**
 * `SubtotalBook` and `UncertaintyBook` in one for rows that come by column: the same sums in the same order, so the same bits. Like
 * theirs, what it keeps grows with the number of keys.
 */
export class ColumnBook {
  readonly #accounts: RowAccounts;
  readonly #covariances: RowCovariances;
  readonly #keys: SubtotalKey[] = [];
  /** By group, then by the other parts of the key: number of the entry + 1. */
  readonly #entries: Uint32Array[] = [];
  #sums = new Float64Array(16 * PARTS * PART);
  #counts = new Float64Array(16 * COUNTS);
  /** Covariances by part, their sums and what was lost of them, where some row states a σ. */
  readonly #triangles: (Float64Array | undefined)[] = [];
  /** Whether a row of the entry stated growth. Until one does, basic is unstated, and only that is kept. */
  readonly #isSplit: boolean[] = [];

  constructor(readonly placement: Placement) {
    this.#accounts = new RowAccounts(placement);
    this.#covariances = new RowCovariances(this.#accounts);
  }

  add(rows: RowColumns): void {
    const accounts = this.#accounts;
    const { growth, quantity } = rows.numbers;
    for (let row = 0; row < rows.rows; row += 1) {
      const entry = this.#entryOf(rows, row);
      const counts = this.#counts;
      const count = entry * COUNTS;
      if (rows.memo[row] === 1) {
        counts[count + 2] = (counts[count + 2] ?? NaN) + 1;
        continue;
      }
      const pieces = (quantity[row] ?? NaN) * (accounts.isMirrored(rows, row) ? 2 : 1);
      counts[count] = (counts[count] ?? NaN) + 1;
      counts[count + 1] = (counts[count + 1] ?? NaN) + pieces;
      accounts.take(rows, row);
      const stated = growth[row] ?? NaN;
      const factor = 1 + stated;
      const isStated = !Number.isNaN(stated);
      if (isStated && this.#isSplit[entry] === false) this.#split(entry);
      if (isStated) this.#addTo(entry, STATED, factor, rows, row, pieces);
      else this.#addTo(entry, UNSTATED, 1, rows, row, pieces);
      if (this.#isSplit[entry] === true) this.#addTo(entry, BASIC, 1, rows, row, pieces);
      if (rows.hasSigma[row] === 1) this.#addTriangle(entry, isStated ? factor : null, rows, row);
    }
  }

  /** One per key, in the order in which the keys first came. */
  subtotals(): Subtotal[] {
    return this.#keys.map((key, entry) => ({
      ...key,
      rows: this.#counts[entry * COUNTS] ?? NaN,
      pieces: this.#counts[entry * COUNTS + 1] ?? NaN,
      memoRows: this.#counts[entry * COUNTS + 2] ?? NaN,
      basic: this.#account(entry, this.#basicOf(entry)),
      statedPredicted: this.#account(entry, STATED),
      unstatedBasic: this.#account(entry, UNSTATED),
    }));
  }

  /** In the order of `subtotals`. */
  uncertainties(): UncertaintySubtotal[] {
    return this.#keys.map((key, entry) => ({
      ...key,
      basic: this.#uncertainty(entry, this.#basicOf(entry)),
      statedPredicted: this.#uncertainty(entry, STATED),
      unstatedBasic: this.#uncertainty(entry, UNSTATED),
    }));
  }

  #basicOf(entry: number): number {
    return this.#isSplit[entry] === true ? BASIC : UNSTATED;
  }

  #account(entry: number, part: number): Subtotal['basic'] {
    const from = (entry * PARTS + part) * PART;
    const sums = this.#sums.subarray(from, from + TEN);
    const lost = this.#sums.subarray(from + TEN, from + 2 * TEN);
    const values = valuesOf(sums, lost);
    const rests = Array.from(sums, (sum, i) => sumError(sum, lost[i] ?? NaN, values[i] ?? NaN));
    return fromNumbers([...values, ...rests]);
  }

  #uncertainty(entry: number, part: number): AccountUncertainty {
    const from = (entry * PARTS + part) * PART;
    const at = (k: number): number => this.#sums[from + k] ?? NaN;
    const triangle = this.#triangles[entry * PARTS + part];
    return {
      mass: at(MASS) + at(MASS + 1),
      massWithSigma: at(MASS_WITH_SIGMA) + at(MASS_WITH_SIGMA + 1),
      covariance:
        triangle === undefined
          ? CERTAIN.covariance
          : valuesOf(triangle.subarray(0, TRIANGLE), triangle.subarray(TRIANGLE)),
    };
  }

  /** Adds k times the row at hand to a part, but for its covariance. */
  #addTo(entry: number, part: number, k: number, rows: RowColumns, row: number, pieces: number): void {
    const sums = this.#sums;
    const at = (entry * PARTS + part) * PART;
    const { numbers, rest } = this.#accounts;
    if (k === 1) addAll(sums, at, TEN, numbers, rest);
    else addAllTimes(sums, at, TEN, k, numbers, rest);
    const mass = Math.abs(rows.numbers.mass[row] ?? NaN) * pieces;
    if (rows.hasSigma[row] === 0) {
      addOne(sums, at + MASS, Math.abs(k * mass));
      return;
    }
    addOneTimes(sums, at + MASS, Math.abs(k), mass);
    if (!Number.isNaN(rows.numbers.mass_sigma[row]))
      addOneTimes(sums, at + MASS_WITH_SIGMA, Math.abs(k), mass);
  }

  #addTriangle(entry: number, stated: number | null, rows: RowColumns, row: number): void {
    this.#covariances.take(rows, row);
    const { triangle } = this.#covariances;
    if (stated === null) addAll(this.#triangle(entry, UNSTATED), 0, TRIANGLE, triangle, null);
    else addAllTimes(this.#triangle(entry, STATED), 0, TRIANGLE, stated * stated, triangle, null);
    if (this.#isSplit[entry] === true) addAll(this.#triangle(entry, BASIC), 0, TRIANGLE, triangle, null);
  }

  #triangle(entry: number, part: number): Float64Array {
    return (this.#triangles[entry * PARTS + part] ??= new Float64Array(2 * TRIANGLE));
  }

  /** Keeps basic apart from unstated from now on. */
  #split(entry: number): void {
    const from = entry * PARTS * PART;
    const unstated = from + UNSTATED * PART;
    this.#sums.copyWithin(from + BASIC * PART, unstated, unstated + PART);
    this.#triangles[entry * PARTS + BASIC] = this.#triangles[entry * PARTS + UNSTATED]?.slice();
    this.#isSplit[entry] = true;
  }

  #entryOf(rows: RowColumns, row: number): number {
    const group = rows.group[row] ?? 0;
    const category = rows.category[row] ?? 0;
    const maturity = rows.maturity[row] ?? 0;
    const status = rows.status[row] ?? 0;
    const key = (category * (MATURITIES.length + 1) + maturity) * CHANGE_STATUSES.length + status;
    const entries = (this.#entries[group] ??= new Uint32Array(KEYS));
    const known = entries[key] ?? 0;
    if (known !== 0) return known - 1;
    this.#keys.push({
      group: rows.groups[group] ?? '',
      category: CATEGORIES[category] ?? 'empty',
      maturity: MATURITIES[maturity] ?? null,
      status: CHANGE_STATUSES[status] ?? 'approved',
    });
    this.#isSplit.push(false);
    entries[key] = this.#keys.length;
    if (this.#keys.length * PARTS * PART > this.#sums.length) {
      this.#sums = doubled(this.#sums);
      this.#counts = doubled(this.#counts);
    }
    return this.#keys.length - 1;
  }
}

function valuesOf(sums: Float64Array, lost: Float64Array): number[] {
  return Array.from(sums, (sum, i) => sum + (lost[i] ?? NaN));
}
