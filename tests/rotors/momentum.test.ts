import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type AxisTriple } from '@/lib/frames/axes';
import { applyMat } from '@/lib/numerics/mat3';
import { type Vec3, normVec } from '@/lib/numerics/vec3';
import { spinArrow, spinAxisProblem } from '@/lib/rotors/axis';
import { angularMomentum, gyroMatrix, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { type Rotor, type SpinAxis } from '@/lib/rotors/rotor';
import { fromSi, radians, radiansPerSecond, toSi } from '@/lib/units/convert';
import { F16_ENGINE_MOMENTUM } from '@/tests/references/aircraft';

const USUAL: AxisTriple = ['aft', 'right', 'up'];
const LEFT_HANDED: AxisTriple = ['aft', 'left', 'up'];

const aRotor = (said: Partial<Rotor>): Rotor => ({
  rotor: 'R1',
  polarInertia: 1,
  axis: { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' },
  gearRatio: 1,
  shaft: 'R1',
  component: null,
  blades: null,
  polarInertiaSigma: null,
  group: null,
  note: null,
  ...said,
});

const at = (...speeds: readonly (readonly [string, number])[]) => ({
  code: 'cruise',
  speeds: speeds.map(([shaft, speed]) => ({ shaft, speed, sigma: null })),
});

function momentumOf(axis: SpinAxis, axes: AxisTriple, incidence = 0): readonly number[] {
  const { total } = angularMomentum([aRotor({ axis })], at(['R1', 1]), { axes, incidence });
  return total.map((part) => part + 0);
}

const near = (values: readonly number[]): number[] =>
  values.map((value) => expect.closeTo(value, 14) as number);

describe('the spin of a rotor', () => {
  it('clockwise seen from behind is +x forward by the right-hand rule, in any airframe frame', () => {
    const axis: SpinAxis = { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' };
    expect(momentumOf(axis, USUAL)).toEqual([1, 0, 0]);
    expect(momentumOf(axis, LEFT_HANDED)).toEqual([1, 0, 0]);
    expect(momentumOf({ ...axis, sense: 'ccw' }, USUAL)).toEqual([-1, 0, 0]);
  });

  it('by angles yaws right and pitches up', () => {
    const [yaw, pitch] = [radians(20), radians(-5)];
    // Body axes: forward, right, down.
    const expected = [Math.cos(pitch) * Math.cos(yaw), Math.cos(pitch) * Math.sin(yaw), -Math.sin(pitch)];
    for (const axes of [USUAL, LEFT_HANDED])
      expect(momentumOf({ kind: 'angles', yaw, pitch, sense: 'cw' }, axes)).toEqual(near(expected));
  });

  it('by an arrow of any length along the shaft and a hand, that of a real hand in space', () => {
    const forward: SpinAxis = { kind: 'arrow', x: -250, y: 0, z: 0, hand: 'rh' };
    for (const axes of [USUAL, LEFT_HANDED]) {
      expect(momentumOf(forward, axes)).toEqual([1, 0, 0]);
      expect(momentumOf({ ...forward, hand: 'lh' }, axes)).toEqual([-1, 0, 0]);
    }
    // To the right: +y where butt lines count right, -y where they count left.
    expect(momentumOf({ kind: 'arrow', x: 0, y: 3, z: 0, hand: 'rh' }, USUAL)).toEqual([0, 1, 0]);
    expect(momentumOf({ kind: 'arrow', x: 0, y: -3, z: 0, hand: 'rh' }, LEFT_HANDED)).toEqual([0, 1, 0]);
  });

  it('points below the body x axis when that is turned nose-up by the incidence', () => {
    const straight: SpinAxis = { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' };
    expect(momentumOf(straight, USUAL, radians(2))).toEqual(
      near([Math.cos(radians(2)), 0, Math.sin(radians(2))]),
    );
  });

  it('has a unit arrow, however long or short the one given', () => {
    const size = fc.double({ min: -1e200, max: 1e200, noNaN: true });
    fc.assert(
      fc.property(size, size, size, (x, y, z) => {
        fc.pre(x !== 0 || y !== 0 || z !== 0);
        expect(normVec(spinArrow({ kind: 'arrow', x, y, z, hand: 'rh' }, USUAL))).toBeCloseTo(1, 14);
      }),
    );
  });

  it('is refused without a direction or at an angle that has no "behind"', () => {
    expect(spinAxisProblem({ kind: 'arrow', x: 0, y: 0, z: 0, hand: 'rh' })).toMatch(/no direction/);
    const angles = { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' } as const;
    expect(spinAxisProblem({ ...angles, yaw: radians(90) })).toMatch(/axis_yaw .* arrow/);
    expect(spinAxisProblem({ ...angles, yaw: radians(89.9) })).toBeNull();
    expect(spinAxisProblem({ ...angles, pitch: radians(-60) })).toMatch(/axis_pitch .* arrow/);
    expect(spinAxisProblem({ ...angles, pitch: radians(59.9) })).toBeNull();
    expect(spinAxisProblem({ ...angles, pitch: NaN })).toMatch(/axis_pitch/);
    expect(() => spinArrow({ ...angles, yaw: radians(90) }, USUAL)).toThrow(RangeError);
  });
});

describe('angular momentum at an operating point', () => {
  it('is inertia times speed times gear ratio, summed over rotors', () => {
    const rotors = [
      aRotor({ rotor: 'prop', polarInertia: 12, gearRatio: 0.05, shaft: 'power' }),
      aRotor({ rotor: 'turbine', polarInertia: 0.02, shaft: 'power' }),
      aRotor({ rotor: 'spool', polarInertia: 0.03, shaft: 'gas' }),
    ];
    const point = at(['power', radiansPerSecond(24000)], ['gas', -radiansPerSecond(36000)]);
    const { total, rotors: each } = angularMomentum(rotors, point, { axes: USUAL, incidence: 0 });
    // By hand, from rpm = 2 pi / 60 rad/s.
    const turn = (2 * Math.PI) / 60;
    expect(each.map(({ momentum }) => momentum[0])).toEqual(
      [12 * 1200 * turn, 0.02 * 24000 * turn, -0.03 * 36000 * turn].map((h) => expect.closeTo(h, 9)),
    );
    expect(each[0]?.speed).toBeCloseTo(1200 * turn, 10);
    expect(total[0]).toBeCloseTo((14400 + 480 - 1080) * turn, 9);
  });

  it('names the shafts whose speed is missing', () => {
    const rotors = [aRotor({ shaft: 'left' }), aRotor({ shaft: 'right' }), aRotor({ shaft: 'right' })];
    expect(shaftsWithoutSpeed(rotors, at(['left', 1]))).toEqual(['right']);
    expect(() => angularMomentum(rotors, at(), { axes: USUAL, incidence: 0 })).toThrow(
      'Operating point cruise states no speed for: left, right.',
    );
  });

  it('of the F-16 engine is 160 slug.ft2/s, 216.93 kg.m2/s (Stevens and Lewis, after NASA TP-1538)', () => {
    const h = toSi(F16_ENGINE_MOMENTUM, 'slug.ft2/s');
    expect(h).toBeCloseTo(216.93, 2);
    expect(fromSi(h, 'slug.ft2/s')).toBeCloseTo(F16_ENGINE_MOMENTUM, 12);
  });
});

describe('the gyroscopic matrix', () => {
  const parts = fc.double({ min: -1e3, max: 1e3, noNaN: true });
  const vectors = fc.tuple(parts, parts, parts);

  it('is the cross product: G w = h x w', () => {
    fc.assert(
      fc.property(vectors, vectors, (h: Vec3, w: Vec3) => {
        const cross = [h[1] * w[2] - h[2] * w[1], h[2] * w[0] - h[0] * w[2], h[0] * w[1] - h[1] * w[0]];
        applyMat(gyroMatrix(h), w).forEach((part, k) => expect(part).toBeCloseTo(cross[k] ?? NaN, 8));
      }),
    );
  });

  it('does no work: w . G w = 0, exactly where it is one product', () => {
    expect(applyMat(gyroMatrix([2, 3, 5]), [2, 3, 5])).toEqual([0, 0, 0]);
  });

  it('has the terms of the F-16 model: pitch -r hx, yaw +q hx (Stevens and Lewis)', () => {
    const [q, r, hx] = [0.3, 0.2, 160];
    const [roll, pitch, yaw] = applyMat(gyroMatrix([hx, 0, 0]), [0, q, r]);
    expect([roll + 0, pitch, yaw]).toEqual([0, -r * hx, q * hx]);
  });

  it('swings the nose left when the tail comes up behind a propeller that turns clockwise seen from behind (common practice, no source)', () => {
    const { gyroMatrix: g } = angularMomentum([aRotor({})], at(['R1', 200]), { axes: USUAL, incidence: 0 });
    // Tail up is nose down: negative pitch rate; nose left is a negative yawing moment.
    const yaw = applyMat(g, [0, -0.5, 0])[2];
    expect(yaw).toBeLessThan(0);
  });
});
