import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { longestIncreasing } from '@/lib/numerics/longest-increasing';

/** The length of a longest strictly increasing subsequence by the plain recurrence, O(n^2). */
function lengthOf(values: readonly number[]): number {
  const best: number[] = [];
  values.forEach((value, i) => {
    best.push(1 + Math.max(0, ...best.filter((_, k) => k < i && (values[k] ?? NaN) < value)));
  });
  return Math.max(0, ...best);
}

describe('A longest increasing subsequence', () => {
  it('is one: indices and values go up, and none is longer', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 30 }), { maxLength: 60 }), (values) => {
        const chosen = [...longestIncreasing(values)];
        expect(chosen.every((at, k) => k === 0 || at > (chosen[k - 1] ?? NaN))).toBe(true);
        const picked = chosen.map((at) => values[at] ?? NaN);
        expect(picked.every((value, k) => k === 0 || value > (picked[k - 1] ?? NaN))).toBe(true);
        expect(chosen).toHaveLength(lengthOf(values));
      }),
    );
  });

  // Fredman 1975 and every text since use permutations such as this one; the result is checked by hand.
  it('of 3 1 4 5 9 2 6 8 7 has five members', () => {
    expect(longestIncreasing([3, 1, 4, 5, 9, 2, 6, 8, 7])).toHaveLength(5);
  });

  it('of a million in order but for one that moved to the front leaves out that one, soon', () => {
    const values = Float64Array.from({ length: 1_000_000 }, (_, k) => (k === 0 ? 1e9 : k));
    const chosen = longestIncreasing(values);
    expect(chosen).toHaveLength(999_999);
    expect(chosen[0]).toBe(1);
  });
});
