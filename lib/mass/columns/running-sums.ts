import { productError, sumError } from '@/lib/numerics/sums';

/*
 * The compensated sums of numerics/sums (Neumaier 1974) in a piece of a larger array: so many sums, then what was lost of each.
 */

/** Adds `count` terms to the sums at `at`; `rest` is what rounding left out of the terms. */
export function addAll(
  sums: Float64Array,
  at: number,
  count: number,
  terms: Float64Array,
  rest: Float64Array | null,
): void {
  for (let i = 0; i < count; i += 1) {
    const before = sums[at + i] ?? NaN;
    const term = terms[i] ?? NaN;
    const sum = before + term;
    let error = sumError(before, term, sum);
    if (rest !== null) error += rest[i] ?? NaN;
    sums[at + count + i] = (sums[at + count + i] ?? NaN) + error;
    sums[at + i] = sum;
  }
}

/** Adds k times each term without rounding the product. */
export function addAllTimes(
  sums: Float64Array,
  at: number,
  count: number,
  k: number,
  terms: Float64Array,
  rest: Float64Array | null,
): void {
  if (k === 1) {
    addAll(sums, at, count, terms, rest);
    return;
  }
  for (let i = 0; i < count; i += 1) {
    const before = sums[at + i] ?? NaN;
    const factor = terms[i] ?? NaN;
    const term = k * factor;
    const sum = before + term;
    let error = sumError(before, term, sum) + productError(k, factor, term);
    if (rest !== null) error += k * (rest[i] ?? NaN);
    sums[at + count + i] = (sums[at + count + i] ?? NaN) + error;
    sums[at + i] = sum;
  }
}

/** Adds a term to the sum at `at`, what was lost of it behind it. */
export function addOne(sums: Float64Array, at: number, term: number): void {
  const before = sums[at] ?? NaN;
  const sum = before + term;
  sums[at + 1] = (sums[at + 1] ?? NaN) + sumError(before, term, sum);
  sums[at] = sum;
}

/** Adds k times a term without rounding the product. */
export function addOneTimes(sums: Float64Array, at: number, k: number, factor: number): void {
  const before = sums[at] ?? NaN;
  const term = k * factor;
  const sum = before + term;
  const error = sumError(before, term, sum) + (k === 1 ? 0 : productError(k, factor, term));
  sums[at + 1] = (sums[at + 1] ?? NaN) + error;
  sums[at] = sum;
}

export function doubled(array: Float64Array<ArrayBuffer>): Float64Array<ArrayBuffer> {
  const larger = new Float64Array(2 * array.length);
  larger.set(array);
  return larger;
}
