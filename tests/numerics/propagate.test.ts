import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { propagate } from '@/lib/numerics/propagate';

describe('the law of propagation in matrix form', () => {
  it('is the sum of squares for independent inputs and the square of the sum for fully correlated ones (JCGM 100:2008, 5.2.2)', () => {
    expect(
      propagate(
        [[3, 4]],
        [
          [1, 0],
          [0, 1],
        ],
      ),
    ).toEqual([[25]]);
    expect(
      propagate(
        [[3, 4]],
        [
          [1, 1],
          [1, 1],
        ],
      ),
    ).toEqual([[49]]);
  });

  it('gives a symmetric matrix that no direction makes negative', () => {
    const numbers = fc.array(fc.double({ min: -10, max: 10, noNaN: true }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(fc.tuple(numbers, numbers, numbers), numbers, numbers, (rows, effect, direction) => {
        const covariance = effect.map((a) => effect.map((b) => a * b));
        const result = propagate(rows, covariance);
        const along = result.reduce(
          (sum, row, i) =>
            sum + row.reduce((part, value, j) => part + value * (direction[i] ?? 0) * (direction[j] ?? 0), 0),
          0,
        );
        const size = result.reduce(
          (sum, row) => sum + row.reduce((part, value) => part + Math.abs(value), 0),
          0,
        );
        expect(along).toBeGreaterThanOrEqual(-1e-12 * (1 + 100 * size));
        expect(result[0]?.[1]).toBeCloseTo(result[1]?.[0] ?? NaN, 6);
      }),
    );
  });

  it('takes a variance that is only rounding for none, and its covariances with it', () => {
    const sigma = 0.7;
    const result = propagate(
      [
        [1, -1 - Number.EPSILON],
        [1, 0],
      ],
      [
        [sigma, sigma],
        [sigma, sigma],
      ],
    );
    expect(result).toEqual([
      [0, 0],
      [0, sigma],
    ]);
  });
});
