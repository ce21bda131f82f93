/**
 * Which of `values` belong to a longest strictly increasing subsequence, by index and in order: patience sorting with links back,
 * O(n log n) (Fredman, On computing the length of longest increasing subsequences, 1975).
 */
export function longestIncreasing(values: ArrayLike<number>): Int32Array {
  const n = values.length;
  // The index that ends the best subsequence of each length, and what comes before each index in its own.
  const tails = new Int32Array(n);
  const before = new Int32Array(n);
  let length = 0;
  for (let i = 0; i < n; i += 1) {
    const value = at(values, i);
    let low = 0;
    let high = length;
    // Mostly in order: the end is tried first.
    if (length > 0 && at(values, at(tails, length - 1)) < value) low = length;
    while (low < high) {
      const middle = (low + high) >>> 1;
      if (at(values, at(tails, middle)) < value) low = middle + 1;
      else high = middle;
    }
    before[i] = low === 0 ? -1 : at(tails, low - 1);
    tails[low] = i;
    if (low === length) length += 1;
  }
  const chosen = new Int32Array(length);
  let i = length === 0 ? -1 : at(tails, length - 1);
  for (let k = length - 1; k >= 0; k -= 1) {
    chosen[k] = i;
    i = at(before, i);
  }
  return chosen;
}

function at(values: ArrayLike<number>, i: number): number {
  return values[i] ?? NaN;
}
