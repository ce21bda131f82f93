import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { applyMat, determinant, multiply, transpose } from '@/lib/numerics/mat3';
import { rotation, rotationX, rotationY, rotationZ } from '@/lib/numerics/rotation';
import { radians } from '@/lib/units/convert';

const angle = fc.double({ min: -7, max: 7, noNaN: true });

describe('rotations', () => {
  it('turn y to z about x, z to x about y and x to y about z', () => {
    expect(applyMat(rotationX(Math.PI / 2), [0, 1, 0])).toEqual([0, 0, 1]);
    expect(applyMat(rotationY(Math.PI / 2), [0, 0, 1])).toEqual([1, 0, 0]);
    expect(applyMat(rotationZ(Math.PI / 2), [1, 0, 0])).toEqual([0, 1, 0]);
  });

  it('are exact at every quarter turn that degrees can state', () => {
    for (const degrees of [-720, -270, -180, -90, 0, 90, 180, 270, 360, 450])
      for (const turn of [rotationX, rotationY, rotationZ])
        for (const part of turn(radians(degrees)).flat()) expect([-1, 0, 1]).toContain(part + 0);
  });

  it('do not take a small angle for a quarter turn', () => {
    expect(rotationZ(1e-12)[1][0]).toBeCloseTo(1e-12, 24);
    expect(rotationZ(Math.PI / 2 - 1e-12)[0][0]).toBeCloseTo(1e-12, 15);
  });

  it('compose as Rz(yaw) Ry(pitch) Rx(roll)', () => {
    fc.assert(
      fc.property(angle, angle, angle, (yaw, pitch, roll) => {
        const whole = rotation(yaw, pitch, roll);
        const steps = multiply(multiply(rotationZ(yaw), rotationY(pitch)), rotationX(roll));
        whole.forEach((row, i) =>
          row.forEach((part, j) =>
            expect(Math.abs(part - (steps[i]?.[j] ?? NaN))).toBeLessThanOrEqual(1e-15),
          ),
        );
      }),
    );
  });

  it('have determinant 1 and their transpose as inverse', () => {
    fc.assert(
      fc.property(angle, angle, angle, (yaw, pitch, roll) => {
        const r = rotation(yaw, pitch, roll);
        expect(Math.abs(determinant(r) - 1)).toBeLessThanOrEqual(1e-15);
        multiply(r, transpose(r)).forEach((row, i) =>
          row.forEach((part, j) => expect(Math.abs(part - (i === j ? 1 : 0))).toBeLessThanOrEqual(1e-15)),
        );
      }),
    );
  });
});
