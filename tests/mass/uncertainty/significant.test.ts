import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { decimalsFromSigma, significantDigits } from '@/lib/mass/uncertainty/significant';
import { ROUNDED } from '@/tests/references/uncertainty';

describe('significant figures from a σ', () => {
  it('put the last figure of the value where the second of the σ stands (JCGM 100:2008, 7.2.6)', () => {
    const { value, sigma, text } = ROUNDED;
    expect(value.toFixed(decimalsFromSigma(sigma) ?? NaN)).toBe(text);
    expect(value.toPrecision(significantDigits(value, sigma) ?? NaN)).toBe(text);
  });

  it.each([
    [15234.6, 42, 5],
    [15234.6, 420, 4],
    [-1234.567, 0.0234, 7],
    // A σ that rounds up to the next power of ten, and a value that does.
    [1.2345678, 0.000996, 5],
    [9.9996, 0.01, 5],
    [99999.6, 12, 6],
    [0.012345, 0.0011, 3],
    [1 / 3, 1e-30, 15],
  ])('of %d with σ %d are %i', (value, sigma, figures) => {
    expect(significantDigits(value, sigma)).toBe(figures);
  });

  it('are none where the value is lost in its σ, and one where it rounds up to the last place', () => {
    expect(significantDigits(0, 1)).toBe(0);
    expect(significantDigits(0.004, 1.2)).toBe(0);
    expect(significantDigits(0.04, 1.2)).toBe(0);
    expect(significantDigits(0.06, 1.2)).toBe(1);
  });

  it('are not told without a σ', () => {
    for (const sigma of [null, 0, NaN, Infinity]) {
      expect(significantDigits(1, sigma)).toBeNull();
      expect(decimalsFromSigma(sigma)).toBeNull();
    }
  });

  it('say the same as the decimals', () => {
    const sizes = fc.double({ min: 1e-3, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(sizes, fc.double({ min: 1e-4, max: 1, noNaN: true }), (value, share) => {
        const [decimals, figures] = [
          decimalsFromSigma(share * value),
          significantDigits(value, share * value),
        ];
        if (decimals === null || figures === null) throw new Error('There is a σ.');
        fc.pre(decimals >= 0 && figures > 0 && figures < 15);
        expect(Number(value.toPrecision(figures))).toBe(Number(value.toFixed(decimals)));
      }),
    );
  });
});
