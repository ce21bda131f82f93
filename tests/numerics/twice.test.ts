import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type Twice, addTwice, minusTwice, overTwice, timesTwice } from '@/lib/numerics/twice';
import { Rational } from '@/tests/support/rational';

const exactly = ([value, rest]: Twice): Rational => Rational.of(value).plus(Rational.of(rest));

/** A double and something below its last place. */
const anyTwice: fc.Arbitrary<Twice> = fc
  .tuple(
    fc.double({ min: 1e-9, max: 1e9, noNaN: true }),
    fc.double({ min: -0.49, max: 0.49, noNaN: true }),
    fc.boolean(),
  )
  .map(([size, share, negative]) => {
    const value = negative ? -size : size;
    return [value, share * 2 ** (Math.floor(Math.log2(size)) - 52)];
  });

/** Relative error against exact arithmetic. */
function off(result: Twice, exact: Rational, size = exact): number {
  return Math.abs(exactly(result).minus(exact).over(size).toNumber());
}

describe('numbers to twice the precision', () => {
  it('add, multiply and divide to 2^-100 of exact rational arithmetic', () => {
    fc.assert(
      fc.property(anyTwice, anyTwice, (a, b) => {
        const [x, y] = [exactly(a), exactly(b)];
        const size = Rational.of(Math.max(Math.abs(a[0]), Math.abs(b[0])));
        expect(off(addTwice(a, b), x.plus(y), size)).toBeLessThanOrEqual(2 ** -100);
        expect(off(timesTwice(a, b), x.times(y))).toBeLessThanOrEqual(2 ** -100);
        expect(off(overTwice(a, b), x.over(y))).toBeLessThanOrEqual(2 ** -100);
      }),
    );
  });

  it('keep what a double alone would lose', () => {
    const third = overTwice([1, 0], [3, 0]);
    const back = addTwice(timesTwice(third, [3, 0]), [-1, 0]);
    expect(Math.abs(back[0])).toBeLessThanOrEqual(2 ** -104);
    expect(addTwice([1e16, 0], [1, 0])).toEqual([1e16, 1]);
    expect(addTwice(addTwice([1e16, 0], [1, 0]), minusTwice([1e16, 0]))).toEqual([1, 0]);
  });
});
