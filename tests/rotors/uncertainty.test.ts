import { describe, expect, it } from 'vitest';

import { angularMomentum } from '@/lib/rotors/momentum';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { momentumUncertainty } from '@/lib/rotors/uncertainty';
import { normalNumbers } from '@/tests/support/random';

const FRAME = { axes: ['aft', 'left', 'up'], incidence: 0.04 } as const;

const aRotor = (said: Partial<Rotor>): Rotor => ({
  rotor: 'R1',
  polarInertia: 2,
  axis: { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' },
  gearRatio: 1,
  shaft: 'power',
  component: null,
  blades: null,
  polarInertiaSigma: null,
  group: null,
  note: null,
  ...said,
});

const ROTORS: readonly Rotor[] = [
  aRotor({
    rotor: 'prop',
    polarInertia: 12,
    polarInertiaSigma: 0.2,
    gearRatio: 0.05,
    axis: { kind: 'angles', yaw: 0.1, pitch: -0.2, sense: 'ccw' },
  }),
  aRotor({ rotor: 'turbine', polarInertia: 0.4, polarInertiaSigma: 0.01 }),
  aRotor({ rotor: 'spool', polarInertia: 0.3, polarInertiaSigma: 0.008, shaft: 'gas' }),
  aRotor({
    rotor: 'fan',
    polarInertia: 0.5,
    gearRatio: 0.3,
    shaft: 'gas',
    axis: { kind: 'arrow', x: 0, y: 1, z: 2, hand: 'lh' },
  }),
];

const POINT: OperatingPoint = {
  code: 'cruise',
  title: 'Cruise',
  speeds: [
    { shaft: 'power', speed: 2500, sigma: 12 },
    { shaft: 'gas', speed: -3700, sigma: 20 },
  ],
};

describe('the uncertainty of the angular momentum', () => {
  it('is the scatter of momenta from inertias and shaft speeds with normal errors, within sampling error', () => {
    const normal = normalNumbers(1795);
    const n = 6000;
    const samples = Array.from({ length: n }, () => {
      const speeds = POINT.speeds.map((of) => ({ ...of, speed: of.speed + (of.sigma ?? 0) * normal() }));
      const rotors = ROTORS.map((of) => ({
        ...of,
        polarInertia: of.polarInertia + (of.polarInertiaSigma ?? 0) * normal(),
      }));
      return angularMomentum(rotors, { ...POINT, speeds }, FRAME).total;
    });
    const mean = [0, 1, 2].map((k) => samples.reduce((sum, h) => sum + (h[k] ?? NaN), 0) / n);
    const scatter = (i: 0 | 1 | 2, j: 0 | 1 | 2): number =>
      samples.reduce((sum, h) => sum + (h[i] - (mean[i] ?? NaN)) * (h[j] - (mean[j] ?? NaN)), 0) / (n - 1);
    const { sigma, covariance } = momentumUncertainty(ROTORS, POINT, FRAME);
    const { xx, yy, zz, xy, xz, yz } = covariance;
    for (const [i, j, value] of [
      [0, 0, xx],
      [1, 1, yy],
      [2, 2, zz],
      [0, 1, xy],
      [0, 2, xz],
      [1, 2, yz],
    ] as const)
      expect(Math.abs(scatter(i, j) - value)).toBeLessThanOrEqual(4 * Math.sqrt(2 / n) * sigma[i] * sigma[j]);
  });

  it('of one rotor is the root of the sum of squares of relative ones (JCGM 100:2008, 5.1.6)', () => {
    const rotor = aRotor({ polarInertiaSigma: 0.06, gearRatio: 0.5 });
    const point = { code: 'p', speeds: [{ shaft: 'power', speed: 200, sigma: 8 }] };
    const { sigma } = momentumUncertainty([rotor], point, { axes: FRAME.axes, incidence: 0 });
    expect(sigma[0] / (2 * 100)).toBeCloseTo(Math.hypot(0.06 / 2, 8 / 200), 14);
  });

  it('lets rotors on one shaft err together: two that turn against each other cancel, on two shafts they do not', () => {
    const twin = (axis: Rotor['axis'], shaft: string): Rotor => aRotor({ axis, shaft });
    const [cw, ccw] = [
      { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' },
      { kind: 'angles', yaw: 0, pitch: 0, sense: 'ccw' },
    ] as const;
    const point = {
      code: 'p',
      speeds: [
        { shaft: 'power', speed: 100, sigma: 1 },
        { shaft: 'other', speed: 100, sigma: 1 },
      ],
    };
    const along = (rotors: readonly Rotor[]): number =>
      momentumUncertainty(rotors, point, { axes: FRAME.axes, incidence: 0 }).sigma[0];
    expect(along([twin(cw, 'power'), twin(ccw, 'power')])).toBe(0);
    expect(along([twin(cw, 'power'), twin(cw, 'power')])).toBeCloseTo(4, 14);
    expect(along([twin(cw, 'power'), twin(ccw, 'other')])).toBeCloseTo(2 * Math.SQRT2, 14);
  });

  it('names the rotors and the shafts that state no σ', () => {
    const speeds = [
      { shaft: 'power', speed: 100, sigma: null },
      { shaft: 'gas', speed: 100, sigma: 0 },
      { shaft: 'not carrying a rotor', speed: 100, sigma: null },
    ];
    const { rotorsWithoutSigma, shaftsWithoutSigma } = momentumUncertainty(
      ROTORS,
      { code: 'p', speeds },
      FRAME,
    );
    expect(rotorsWithoutSigma).toEqual(['fan']);
    expect(shaftsWithoutSigma).toEqual(['power']);
    expect(() => momentumUncertainty(ROTORS, { code: 'p', speeds: [] }, FRAME)).toThrow(/no speed for/);
  });
});
