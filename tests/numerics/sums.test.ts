import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { CompensatedSum, CompensatedSums } from '@/lib/numerics/sums';
import { Rational, ZERO } from '@/tests/support/rational';

const term = fc.double({ min: -1e12, max: 1e12, noNaN: true });

describe('a compensated sum', () => {
  it('keeps what a plain sum loses', () => {
    const sum = new CompensatedSum();
    for (const value of [1, 1e100, 1, -1e100]) sum.add(value);
    expect(sum.value).toBe(2);
    expect(1 + 1e100 + 1 - 1e100).toBe(0);
  });

  it('is zero for nothing', () => {
    expect(new CompensatedSum().value).toBe(0);
  });

  it('is within two roundings of the exact sum, and the square of a rounding of what cancels', () => {
    fc.assert(
      fc.property(fc.array(term, { maxLength: 200 }), (terms) => {
        const sum = new CompensatedSum();
        terms.forEach((value) => sum.add(value));
        const exact = terms.reduce((total, value) => total.plus(Rational.of(value)), ZERO);
        const size = terms.reduce((total, value) => total + Math.abs(value), 0);
        const error = Math.abs(Rational.of(sum.value).minus(exact).toNumber());
        expect(error).toBeLessThanOrEqual(
          Number.EPSILON * Math.abs(exact.toNumber()) + terms.length * Number.EPSILON ** 2 * size,
        );
      }),
    );
  });

  it('adds products as if they were not rounded', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(term, term), { maxLength: 100 }), (pairs) => {
        // Far below 1e-280 a product's error underflows; nothing here weighs so little.
        fc.pre(pairs.every(([a, b]) => a * b === 0 || Math.abs(a * b) > 1e-200));
        const sum = new CompensatedSum();
        pairs.forEach(([a, b]) => sum.addProduct(a, b));
        const exact = pairs.reduce((total, [a, b]) => total.plus(Rational.of(a).times(Rational.of(b))), ZERO);
        const size = pairs.reduce((total, [a, b]) => total + Math.abs(a * b), 0);
        const error = Math.abs(Rational.of(sum.value).minus(exact).toNumber());
        expect(error).toBeLessThanOrEqual(
          Number.EPSILON * Math.abs(exact.toNumber()) + 2 * pairs.length * Number.EPSILON ** 2 * size,
        );
      }),
    );
  });
});

describe('compensated sums side by side', () => {
  it('with their rests are the exact sums of products, to the square of a rounding', () => {
    const small = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(fc.tuple(term, small, small), { minLength: 1, maxLength: 60 }), (terms) => {
        const sums = new CompensatedSums(2);
        for (const [value, k, rest] of terms) sums.add([value, 1], k, [Number.EPSILON * rest, 0]);
        const exact = terms.reduce(
          (total, [value, k, rest]) =>
            total.plus(Rational.of(k).times(Rational.of(value).plus(Rational.of(Number.EPSILON * rest)))),
          ZERO,
        );
        const whole = Rational.of(sums.values[0] ?? NaN).plus(Rational.of(sums.rests[0] ?? NaN));
        const size = terms.reduce((total, [value]) => total + Math.abs(value) + 1, 0);
        expect(Math.abs(whole.minus(exact).toNumber())).toBeLessThanOrEqual(
          terms.length * Number.EPSILON ** 2 * size,
        );
      }),
    );
  });
});
