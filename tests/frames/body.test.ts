import { describe, expect, expectTypeOf, it } from 'vitest';

import { airframeToBody, tensorToBody, toBody } from '@/lib/frames/body';
import { percentMac } from '@/lib/frames/chord';
import { type AirframeVec, type BodyVec, type In, type ListVec } from '@/lib/frames/tags';
import { determinant } from '@/lib/numerics/mat3';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type Vec3, addVec } from '@/lib/numerics/vec3';
import { radians, toSi } from '@/lib/units/convert';
import { f16 } from '@/tests/references/nesc';

const plain = (v: Vec3): number[] => v.map((part) => part + 0);

describe('body axes (ANSI/AIAA R-004-1992, ISO 1151)', () => {
  it('are forward, right, down from an airframe frame aft, right, up', () => {
    expect(airframeToBody(['aft', 'right', 'up'], 0).map(plain)).toEqual([
      [-1, 0, 0],
      [0, 1, 0],
      [0, 0, -1],
    ]);
  });

  it('are right-handed in space: det A is +1 from a right-handed frame, -1 from a left-handed one', () => {
    expect(determinant(airframeToBody(['aft', 'right', 'up'], 0.1))).toBeCloseTo(1, 15);
    expect(determinant(airframeToBody(['aft', 'left', 'up'], 0.1))).toBeCloseTo(-1, 15);
  });

  it('with an incidence have x nose-up: a place straight ahead lies below the x axis, at positive z', () => {
    const a = airframeToBody(['aft', 'right', 'up'], radians(3));
    const [x, y, z] = toBody(a, [-10, 0, 0]);
    expect([x, y, z]).toEqual([
      expect.closeTo(10 * Math.cos(radians(3)), 14),
      0,
      expect.closeTo(10 * Math.sin(radians(3)), 14),
    ]);
  });

  it('take a tensor the same way from either handedness', () => {
    // One body seen with butt lines right and left: products with y change sign in the list, not in body axes.
    const right = { xx: 2, yy: 3, zz: 4, xy: 0.1, xz: 0.2, yz: 0.3 };
    const left = { ...right, xy: -0.1, yz: -0.3 };
    expect(tensorToBody(airframeToBody(['aft', 'left', 'up'], 0.2), left)).toEqual(
      tensorToBody(airframeToBody(['aft', 'right', 'up'], 0.2), right),
    );
  });
});

describe('frame tags', () => {
  it('keep list, airframe and body quantities apart', () => {
    expectTypeOf<BodyVec>().not.toExtend<AirframeVec>();
    expectTypeOf<AirframeVec>().not.toExtend<BodyVec>();
    expectTypeOf<ListVec>().not.toExtend<AirframeVec>();
    expectTypeOf<In<'airframe', Sym3>>().not.toExtend<In<'body', Sym3>>();
    expectTypeOf(toBody).parameter(1).toEqualTypeOf<AirframeVec>();
    const place: AirframeVec = [1, 2, 3];
    expectTypeOf(addVec(place, place)).toEqualTypeOf<AirframeVec>();
    expect(addVec(place, place)).toEqual([2, 4, 6]);
  });
});

describe('CG in per cent of the mean chord', () => {
  it('is 25 when the F-16 CG is 1.132 ft ahead of the 35 per cent point (NESC F16_inertia.dml)', () => {
    const chord = toSi(f16.chordFeet, 'ft');
    const reference = (f16.momentReferencePercent / 100) * chord;
    const ahead = toSi(f16.forwardFeet, 'ft');
    expect(percentMac([reference - ahead, 0, 0], [0, 0, 0], chord, ['aft', 'right', 'up'])).toBeCloseTo(
      f16.testCgPercent,
      12,
    );
    // The same with x forward, the LEMAC elsewhere and the datum 10 km away.
    const lemac: AirframeVec = [1e4, 5, 2];
    expect(
      percentMac([1e4 - reference + ahead, 7, 3], lemac, chord, ['forward', 'right', 'down']),
    ).toBeCloseTo(f16.testCgPercent, 9);
  });

  it('is not stated where there is no chord', () => {
    expect(percentMac([1, 0, 0], [0, 0, 0], 0, ['aft', 'right', 'up'])).toBeNull();
  });
});
