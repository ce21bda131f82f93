import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { principalOf } from '@/lib/mass/principal';
import { applyMat, determinant } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import { congruence, normSym, symToMat, trace, traceMinus } from '@/lib/numerics/sym3';
import { dotVec } from '@/lib/numerics/vec3';
import { radians } from '@/lib/units/convert';
import { anySecondMoment } from '@/tests/support/arbitrary';

const anyTensor = anySecondMoment.map(traceMinus).filter((tensor) => normSym(tensor) > 1e-6);

describe('principal moments and axes', () => {
  it('are what the tensor does to its axes: J a = I a', () => {
    fc.assert(
      fc.property(anyTensor, (tensor) => {
        const { moments, axes } = principalOf(tensor);
        axes.forEach((axis, i) => {
          const image = applyMat(symToMat(tensor), axis);
          axis.forEach((part, k) =>
            expect(Math.abs((image[k] ?? NaN) - (moments[i] ?? NaN) * part)).toBeLessThanOrEqual(
              5e-12 * normSym(tensor),
            ),
          );
        });
      }),
    );
  });

  it('are right-handed unit arrows at right angles', () => {
    fc.assert(
      fc.property(anyTensor, (tensor) => {
        const { axes } = principalOf(tensor);
        expect(determinant(axes)).toBeCloseTo(1, 13);
        axes.forEach((u, i) => axes.forEach((v, j) => expect(dotVec(u, v)).toBeCloseTo(i === j ? 1 : 0, 13)));
      }),
    );
  });

  it('keep trace and determinant', () => {
    fc.assert(
      fc.property(anyTensor, (tensor) => {
        const [a, b, c] = principalOf(tensor).moments;
        const size = normSym(tensor);
        expect(Math.abs(a + b + c - trace(tensor))).toBeLessThanOrEqual(1e-14 * size);
        expect(Math.abs(a * b * c - determinant(symToMat(tensor)))).toBeLessThanOrEqual(1e-14 * size ** 3);
      }),
    );
  });

  it('stand in the order of the body axes they are nearest to', () => {
    const tensor = { xx: 3, yy: 1, zz: 2, xy: 0, xz: 0, yz: 0 };
    for (const degrees of [0, 1, 10, 30, 44]) {
      const turn = rotation(radians(degrees), 0, 0);
      const { moments, axes } = principalOf(congruence(turn, tensor));
      expect([...moments]).toEqual([3, 1, 2].map((moment) => expect.closeTo(moment, 13)));
      expect(axes[0].map((part) => part + 0)).toEqual([
        expect.closeTo(Math.cos(radians(degrees)), 13),
        expect.closeTo(Math.sin(radians(degrees)), 13),
        expect.closeTo(0, 13),
      ]);
    }
  });

  it('of a round body are the body axes, for every pair in the plane is principal', () => {
    expect(principalOf({ xx: 5, yy: 5, zz: 5, xy: 0, xz: 0, yz: 0 }).axes).toEqual([
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ]);
    // The same up to rounding must not turn the axes by 45 degrees.
    const { axes } = principalOf({ xx: 1, yy: 8, zz: 8, xy: 0, xz: 0, yz: 1e-15 });
    axes.forEach((axis, i) => axis.forEach((part, k) => expect(part).toBeCloseTo(i === k ? 1 : 0, 14)));
  });

  it('of the F-16 are turned by half of atan(2 Ixz / (Izz - Ixx)) about y: the plane formula', () => {
    // Positive Ixz in body axes: tensor element xz is -982 (NESC F16_inertia.dml); the formula is any handbook's.
    const { moments, axes } = principalOf({ xx: 9496, yy: 55814, zz: 63100, xy: 0, xz: -982, yz: 0 });
    const angle = 0.5 * Math.atan2(2 * 982, 63100 - 9496);
    expect(axes[0][0]).toBeCloseTo(Math.cos(angle), 13);
    expect(axes[0][2]).toBeCloseTo(Math.sin(angle), 13);
    const half = Math.hypot((63100 - 9496) / 2, 982);
    expect(moments[0]).toBeCloseTo((9496 + 63100) / 2 - half, 9);
    expect(moments[2]).toBeCloseTo((9496 + 63100) / 2 + half, 9);
  });
});
