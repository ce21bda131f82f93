import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type AxisTriple } from '@/lib/frames/axes';
import { NO_POSE, listToAirframe, placeFrom } from '@/lib/frames/pose';
import { momentsOf, tensorOf, withProductSign } from '@/lib/frames/products';
import { lateralIndex, mirrorPlace, mirrorSym } from '@/lib/frames/reflection';
import { applyMat, transpose } from '@/lib/numerics/mat3';
import { type Vec3, subVec } from '@/lib/numerics/vec3';
import { radians } from '@/lib/units/convert';

const coordinate = fc.double({ min: -50, max: 50, noNaN: true });
const place: fc.Arbitrary<Vec3> = fc.tuple(coordinate, coordinate, coordinate);
const angle = fc.double({ min: -3, max: 3, noNaN: true });
const triples: AxisTriple[] = [
  ['aft', 'right', 'up'],
  ['aft', 'left', 'up'],
  ['up', 'forward', 'left'],
];

describe('the pose of a list', () => {
  it('puts a nacelle list, turned by 90 degrees, where the airframe has it', () => {
    // By hand: list x along airframe y, origin at (3, -4, 1).
    const axes: AxisTriple = ['aft', 'right', 'up'];
    const pose = { origin: [3, -4, 1], yaw: radians(90), pitch: 0, roll: 0 } as const;
    const matrix = listToAirframe(axes, pose, axes);
    expect(placeFrom([0, 0, 0], matrix, pose.origin, [2, 0, 0])).toEqual([3, -2, 1]);
    expect(placeFrom([3, 0, 0], matrix, pose.origin, [0, 2, 5])).toEqual([-2, -4, 6]);
  });

  it('is undone by its transpose', () => {
    fc.assert(
      fc.property(
        place,
        place,
        angle,
        angle,
        angle,
        fc.constantFrom(...triples),
        fc.constantFrom(...triples),
        (r, origin, yaw, pitch, roll, from, to) => {
          const matrix = listToAirframe(from, { origin, yaw, pitch, roll }, to);
          const there = placeFrom([0, 0, 0], matrix, origin, r);
          const back = applyMat(transpose(matrix), subVec<Vec3>(there, origin));
          back.forEach((part, k) => expect(Math.abs(part - (r[k] ?? NaN))).toBeLessThanOrEqual(2e-13));
        },
      ),
    );
  });

  it('loses nothing to a datum 10 km away', () => {
    const axes: AxisTriple = ['aft', 'right', 'up'];
    const matrix = listToAirframe(axes, NO_POSE, axes);
    // 10000.1 - 10000 in doubles is what the subtraction of those doubles gives, exactly (Sterbenz).
    expect(placeFrom([10000, 0, 0], matrix, NO_POSE.origin, [10000.1, 0, 0])[0]).toBe(10000.1 - 10000);
    expect(placeFrom([10000, 0, 0], matrix, [10000, 0, 0], [0.1, 0, 0])[0]).toBe(0.1);
  });
});

describe('reflection across the plane of symmetry', () => {
  it('finds the lateral axis wherever it is', () => {
    expect(lateralIndex(['aft', 'left', 'up'])).toBe(1);
    expect(lateralIndex(['right', 'up', 'aft'])).toBe(0);
    expect(lateralIndex(['up', 'forward', 'left'])).toBe(2);
  });

  it('is its own inverse and leaves the plane in place', () => {
    fc.assert(
      fc.property(place, coordinate, fc.constantFrom(0 as const, 1 as const, 2 as const), (r, plane, k) => {
        const twice = mirrorPlace(mirrorPlace(r, k, plane), k, plane);
        twice.forEach((part, i) => expect(part).toBeCloseTo(r[i] ?? NaN, 12));
        const inPlane: [number, number, number] = [...r];
        inPlane[k] = plane + 0;
        expect(mirrorPlace(inPlane, k, plane).map((part) => part + 0)).toEqual(
          inPlane.map((part) => part + 0),
        );
      }),
    );
  });

  it('turns the sign of the two products with the lateral axis', () => {
    const a = { xx: 1, yy: 2, zz: 3, xy: 4, xz: 5, yz: 6 };
    expect(mirrorSym(a, 1)).toEqual({ ...a, xy: -4, yz: -6 });
    expect(mirrorSym(a, 0)).toEqual({ ...a, xy: -4, xz: -5 });
    expect(mirrorSym(a, 2)).toEqual({ ...a, xz: -5, yz: -6 });
  });
});

describe('the sign of products', () => {
  const moments = { ixx: 1, iyy: 2, izz: 3, ixy: 0.1, ixz: -0.2, iyz: 0 };

  it('is that of the positive integral, and minus it in the tensor', () => {
    expect(tensorOf(moments)).toEqual({ xx: 1, yy: 2, zz: 3, xy: -0.1, xz: 0.2, yz: 0 });
    expect(momentsOf(tensorOf(moments))).toEqual(moments);
  });

  it('of a list that declares negative integrals is turned once', () => {
    expect(withProductSign(moments, 'negative')).toEqual({ ...moments, ixy: -0.1, ixz: 0.2 });
    expect(withProductSign(withProductSign(moments, 'negative'), 'negative')).toEqual(moments);
    expect(withProductSign(moments, 'positive')).toEqual(moments);
  });
});
