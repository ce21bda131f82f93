import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { eigenSym } from '@/lib/numerics/eigen';
import { applyMat } from '@/lib/numerics/mat3';
import { type Sym3, normSym, symToMat, trace } from '@/lib/numerics/sym3';
import { dotVec } from '@/lib/numerics/vec3';

const element = fc.double({ min: -1e6, max: 1e6, noNaN: true });
const symmetric: fc.Arbitrary<Sym3> = fc.record({
  xx: element,
  yy: element,
  zz: element,
  xy: element,
  xz: element,
  yz: element,
});

describe('the eigen-decomposition of a symmetric matrix', () => {
  it('returns vectors that the matrix stretches by their values: A V = V D', () => {
    fc.assert(
      fc.property(symmetric, (a) => {
        const { values, vectors } = eigenSym(a);
        const size = normSym(a);
        vectors.forEach((vector, i) => {
          const image = applyMat(symToMat(a), vector);
          const value = values[i] ?? NaN;
          vector.forEach((part, k) => {
            expect(Math.abs((image[k] ?? NaN) - value * part)).toBeLessThanOrEqual(1e-14 * size);
          });
        });
      }),
    );
  });

  it('returns unit vectors at right angles', () => {
    fc.assert(
      fc.property(symmetric, (a) => {
        const { vectors } = eigenSym(a);
        vectors.forEach((u, i) =>
          vectors.forEach((v, j) =>
            expect(Math.abs(dotVec(u, v) - (i === j ? 1 : 0))).toBeLessThanOrEqual(1e-14),
          ),
        );
      }),
    );
  });

  it('returns values in ascending order that add up to the trace', () => {
    fc.assert(
      fc.property(symmetric, (a) => {
        const [low, mid, high] = eigenSym(a).values;
        expect(low).toBeLessThanOrEqual(mid);
        expect(mid).toBeLessThanOrEqual(high);
        expect(Math.abs(low + mid + high - trace(a))).toBeLessThanOrEqual(1e-14 * normSym(a));
      }),
    );
  });

  it('is exact for a diagonal matrix', () => {
    expect(eigenSym({ xx: 3, yy: 1, zz: 2, xy: 0, xz: 0, yz: 0 })).toEqual({
      values: [1, 2, 3],
      vectors: [
        [0, 1, 0],
        [0, 0, 1],
        [1, 0, 0],
      ],
    });
  });

  it('is as good for very small matrices as for large ones', () => {
    // Eigenvalues of [[2,1,0],[1,2,0],[0,0,5]] are 1, 3, 5: textbook case, by hand.
    const tiny = eigenSym({ xx: 2e-200, yy: 2e-200, zz: 5e-200, xy: 1e-200, xz: 0, yz: 0 });
    [1, 3, 5].forEach((value, i) => expect((tiny.values[i] ?? NaN) * 1e200).toBeCloseTo(value, 13));
  });

  it('holds for off-diagonals so small that their squares underflow', () => {
    const { values } = eigenSym({ xx: 8.9e-16, yy: 0, zz: 0, xy: 5e-324, xz: -5e-324, yz: 0 });
    expect(values).toEqual([0, 0, 8.9e-16]);
  });

  it('refuses an element that is not finite', () => {
    expect(() => eigenSym({ xx: NaN, yy: 1, zz: 1, xy: 0, xz: 0, yz: 0 })).toThrow(/not finite/);
  });
});
