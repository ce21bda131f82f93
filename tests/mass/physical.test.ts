import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { momentsOf } from '@/lib/frames/products';
import { checkOwnMoments, checkSecondMoment, hasOwnMoments } from '@/lib/mass/physical';
import { roundingOfPrinted } from '@/lib/mass/rounding';
import { principalOf } from '@/lib/mass/principal';
import { traceMinus } from '@/lib/numerics/sym3';
import { toSi } from '@/lib/units/convert';
import { anySecondMoment } from '@/tests/support/arbitrary';
import { diagonal } from '@/tests/support/mass';

const element = fc.double({ min: -10, max: 10, noNaN: true });

describe('what is real', () => {
  it('is every body made of masses', () => {
    fc.assert(
      fc.property(anySecondMoment, (second) => {
        expect(checkSecondMoment(second).verdict).not.toBe('impossible');
        expect(checkOwnMoments(1, momentsOf(traceMinus(second))).verdict).not.toBe('impossible');
      }),
    );
  });

  it('is the same as the triangle inequality of the principal moments', () => {
    fc.assert(
      fc.property(
        fc.record({ xx: element, yy: element, zz: element, xy: element, xz: element, yz: element }),
        (second) => {
          const { least, verdict } = checkSecondMoment(second);
          const [a, b, c] = [...principalOf(traceMinus(second)).moments].sort((p, q) => p - q);
          const margin = ((a ?? NaN) + (b ?? NaN) - (c ?? NaN)) / 2;
          expect(least).toBeCloseTo(margin, 10);
          if (Math.abs(margin) > 1e-3) expect(verdict).toBe(margin > 0 ? 'physical' : 'impossible');
        },
      ),
    );
  });

  it('includes plates and rods, which lie on the limit', () => {
    expect(checkOwnMoments(1, diagonal([1, 2, 3])).verdict).toBe('physical');
    expect(checkOwnMoments(1, diagonal([0, 2, 2])).verdict).toBe('physical');
    expect(checkOwnMoments(1, diagonal([0, 0, 0])).verdict).toBe('physical');
  });

  it('ends at 1e-6 of the second moments or at the rounding of the digits, whichever is more', () => {
    expect(checkOwnMoments(1, diagonal([1, 2, 3 + 1e-7])).verdict).toBe('within-rounding');
    expect(checkOwnMoments(1, diagonal([1, 2, 3.0001])).verdict).toBe('impossible');
    expect(checkOwnMoments(1, diagonal([1, 2, 3.0001]), 1e-3).verdict).toBe('within-rounding');
  });

  it('of a removal is what it takes away', () => {
    expect(checkOwnMoments(-1, diagonal([-1, -2, -2.5])).verdict).toBe('physical');
    expect(checkOwnMoments(-1, diagonal([1, 2, 2.5])).verdict).toBe('impossible');
    expect(checkOwnMoments(-1, diagonal([-1, -2, -4])).verdict).toBe('impossible');
  });

  it('knows whether there are moments at all', () => {
    expect(hasOwnMoments(diagonal([0, 0, 0]))).toBe(false);
    expect(hasOwnMoments({ ...diagonal([0, 0, 0]), ixy: 1e-9 })).toBe(true);
  });
});

describe('the rounding of printed moments', () => {
  it('is half a unit of the finest printed place, one and a half times for a diagonal of S', () => {
    expect(roundingOfPrinted(diagonal([8884, 1939, 11001]), 'kg.m2')).toBe(0.75);
    expect(roundingOfPrinted(diagonal([0.25, 1, 1.125]), 'kg.m2')).toBe(0.00075);
    const unit = toSi(1, 'lb.in2');
    expect(roundingOfPrinted(diagonal([12.3, 45, 50], unit), 'lb.in2') / unit).toBeCloseTo(0.075, 12);
  });

  it('is more where products are stated', () => {
    expect(roundingOfPrinted({ ...diagonal([80.5, 90, 110]), ixz: -2 }, 'kg.m2')).toBeCloseTo(0.175, 14);
  });

  it('excuses no more than a hundredth where all figures are whole numbers', () => {
    // S of (1, 1, 3) has trace 2.5: 1, 1 and 3 are not 1.4, 1.4 and 2.6.
    expect(roundingOfPrinted(diagonal([1, 1, 3]), 'kg.m2')).toBeCloseTo(0.025, 14);
    expect(checkOwnMoments(1, diagonal([1, 1, 3]), 0.025).verdict).toBe('impossible');
  });

  it('reads exponents', () => {
    expect(roundingOfPrinted(diagonal([3e-7, 3e-7, 3e-7]), 'kg.m2')).toBeCloseTo(0.75e-7, 20);
  });
});
