import { fromNumbers } from '@/lib/mass/account';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type Placement } from '@/lib/mass/place';
import { type Subtotal, type SubtotalKey } from '@/lib/mass/subtotals';
import { type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';
import { type AccountUncertainty, CERTAIN } from '@/lib/mass/uncertainty/sums';
import { CompensatedSums, productError, sumError } from '@/lib/numerics/sums';

import { RowAccounts } from './row-accounts';
import { type RowColumns } from './row-columns';
import { RowCovariances } from './row-covariances';

const TEN = 10;
/** Three accounts, each ten sums and what was lost of them; then three pairs of masses, all and with a σ, with what was lost. */
const BASIC = 0;
const STATED = 2 * TEN;
const UNSTATED = 4 * TEN;
const MASSES = 6 * TEN;
const STRIDE = MASSES + 12;

const KEYS = CATEGORIES.length * (MATURITIES.length + 1) * CHANGE_STATUSES.length;

/** Covariances of a subtotal of which some row states a σ. */
interface Covariances {
  readonly basic: CompensatedSums;
  readonly stated: CompensatedSums;
  readonly unstated: CompensatedSums;
}

const newCovariances = (): Covariances => ({
  basic: new CompensatedSums(CERTAIN.covariance.length),
  stated: new CompensatedSums(CERTAIN.covariance.length),
  unstated: new CompensatedSums(CERTAIN.covariance.length),
});

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
  #sums = new Float64Array(16 * STRIDE);
  /** Rows, pieces, memo rows of each entry. */
  #counts = new Float64Array(16 * 3);
  readonly #byEntry: (Covariances | undefined)[] = [];

  constructor(readonly placement: Placement) {
    this.#accounts = new RowAccounts(placement);
    this.#covariances = new RowCovariances(this.#accounts);
  }

  add(rows: RowColumns): void {
    const accounts = this.#accounts;
    for (let row = 0; row < rows.rows; row += 1) {
      const entry = this.#entryOf(rows, row);
      const counts = this.#counts;
      if (rows.memo[row] === 1) {
        counts[3 * entry + 2] = (counts[3 * entry + 2] ?? NaN) + 1;
        continue;
      }
      const pieces = (rows.numbers.quantity[row] ?? NaN) * (accounts.isMirrored(rows, row) ? 2 : 1);
      counts[3 * entry] = (counts[3 * entry] ?? NaN) + 1;
      counts[3 * entry + 1] = (counts[3 * entry + 1] ?? NaN) + pieces;
      accounts.take(rows, row);
      const growth = rows.numbers.growth[row] ?? NaN;
      const isStated = !Number.isNaN(growth);
      const factor = isStated ? 1 + growth : 1;
      const at = entry * STRIDE;
      const { numbers, rest } = accounts;
      addTen(this.#sums, at + BASIC, numbers, rest);
      if (!isStated) addTen(this.#sums, at + UNSTATED, numbers, rest);
      else addTenTimes(this.#sums, at + STATED, factor, numbers, rest);
      this.#addMasses(rows, row, entry, pieces, isStated, factor);
    }
  }

  /** One per key, in the order in which the keys first came. */
  subtotals(): Subtotal[] {
    return this.#keys.map((key, entry) => ({
      ...key,
      rows: this.#counts[3 * entry] ?? NaN,
      pieces: this.#counts[3 * entry + 1] ?? NaN,
      memoRows: this.#counts[3 * entry + 2] ?? NaN,
      basic: this.#account(entry, BASIC),
      statedPredicted: this.#account(entry, STATED),
      unstatedBasic: this.#account(entry, UNSTATED),
    }));
  }

  /** In the order of `subtotals`. */
  uncertainties(): UncertaintySubtotal[] {
    return this.#keys.map((key, entry) => {
      const covariances = this.#byEntry[entry];
      return {
        ...key,
        basic: this.#uncertainty(entry, 0, covariances?.basic),
        statedPredicted: this.#uncertainty(entry, 1, covariances?.stated),
        unstatedBasic: this.#uncertainty(entry, 2, covariances?.unstated),
      };
    });
  }

  #account(entry: number, part: number): Subtotal['basic'] {
    const from = entry * STRIDE + part;
    const sums = this.#sums.subarray(from, from + TEN);
    const lost = this.#sums.subarray(from + TEN, from + 2 * TEN);
    const values = Array.from(sums, (sum, i) => sum + (lost[i] ?? NaN));
    const rests = Array.from(sums, (sum, i) => sumError(sum, lost[i] ?? NaN, values[i] ?? NaN));
    return fromNumbers([...values, ...rests]);
  }

  #uncertainty(entry: number, part: number, covariance: CompensatedSums | undefined): AccountUncertainty {
    const from = entry * STRIDE + MASSES + 4 * part;
    const [mass = NaN, lost = NaN, withSigma = NaN, withSigmaLost = NaN] = this.#sums.subarray(
      from,
      from + 4,
    );
    return {
      mass: mass + lost,
      massWithSigma: withSigma + withSigmaLost,
      covariance: covariance?.values ?? CERTAIN.covariance,
    };
  }

  #addMasses(
    rows: RowColumns,
    row: number,
    entry: number,
    pieces: number,
    isStated: boolean,
    factor: number,
  ): void {
    const { numbers } = rows;
    const sums = this.#sums;
    const mass = Math.abs(numbers.mass[row] ?? NaN) * pieces;
    const at = entry * STRIDE + MASSES;
    const part = at + (isStated ? 4 : 8);
    if (rows.hasSigma[row] === 0) {
      addTo(sums, at, mass, 0);
      addTo(sums, part, Math.abs(factor * mass), 0);
      return;
    }
    const massWithSigma = Number.isNaN(numbers.mass_sigma[row]) ? 0 : mass;
    addTo(sums, at, mass, 0);
    addTo(sums, at + 2, massWithSigma, 0);
    const size = Math.abs(factor);
    const errorOf = (value: number): number => (size === 1 ? 0 : productError(size, value, size * value));
    addTo(sums, part, size * mass, errorOf(mass));
    addTo(sums, part + 2, size * massWithSigma, errorOf(massWithSigma));
    this.#covariances.take(rows, row);
    const { triangle } = this.#covariances;
    const covariances = (this.#byEntry[entry] ??= newCovariances());
    covariances.basic.add(triangle);
    if (isStated) covariances.stated.add(triangle, factor * factor);
    else covariances.unstated.add(triangle);
  }

  #entryOf(rows: RowColumns, row: number): number {
    const group = rows.group[row] ?? 0;
    const [category, maturity, status] = [
      rows.category[row] ?? 0,
      rows.maturity[row] ?? 0,
      rows.status[row] ?? 0,
    ];
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
    entries[key] = this.#keys.length;
    if (this.#keys.length * STRIDE > this.#sums.length) {
      this.#sums = doubled(this.#sums);
      this.#counts = doubled(this.#counts);
    }
    return this.#keys.length - 1;
  }
}

/** Adds a term, of which `error` was rounded away, to a compensated sum (Neumaier 1974); what is lost stands behind the sum. */
function addTo(sums: Float64Array, at: number, term: number, error: number): void {
  const before = sums[at] ?? NaN;
  const sum = before + term;
  sums[at + 1] = (sums[at + 1] ?? NaN) + (sumError(before, term, sum) + error);
  sums[at] = sum;
}

/** `CompensatedSums.add` of ten sums at `at`, what was lost of them behind. */
function addTen(sums: Float64Array, at: number, numbers: Float64Array, rest: Float64Array): void {
  for (let i = 0; i < TEN; i += 1) {
    const before = sums[at + i] ?? NaN;
    const term = numbers[i] ?? NaN;
    const sum = before + term;
    sums[at + TEN + i] = (sums[at + TEN + i] ?? NaN) + (sumError(before, term, sum) + (rest[i] ?? NaN));
    sums[at + i] = sum;
  }
}

/** The same of k times the numbers. */
function addTenTimes(
  sums: Float64Array,
  at: number,
  k: number,
  numbers: Float64Array,
  rest: Float64Array,
): void {
  if (k === 1) {
    addTen(sums, at, numbers, rest);
    return;
  }
  for (let i = 0; i < TEN; i += 1) {
    const before = sums[at + i] ?? NaN;
    const number = numbers[i] ?? NaN;
    const term = k * number;
    const sum = before + term;
    const error = sumError(before, term, sum) + productError(k, number, term) + k * (rest[i] ?? NaN);
    sums[at + TEN + i] = (sums[at + TEN + i] ?? NaN) + error;
    sums[at + i] = sum;
  }
}

function doubled(array: Float64Array<ArrayBuffer>): Float64Array<ArrayBuffer> {
  const larger = new Float64Array(2 * array.length);
  larger.set(array);
  return larger;
}
