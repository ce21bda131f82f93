import { describe, expect, it } from 'vitest';

import { slipOfTwo, unitSlips } from '@/lib/findings/unit-slips';
import { leastTrace } from '@/lib/findings/rows/size';
import { toSi } from '@/lib/units/convert';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS, type Unit } from '@/lib/units/table';
import { NESC_SPHERE } from '@/tests/references/aircraft';
import { diagonal } from '@/tests/support/mass';
import { SOUND, aircraft, found, ids, ruled } from './support';

const factorOf = (declared: Unit, units: readonly Unit[], unit: Unit): number =>
  unitSlips(declared, units).find((slip) => slip.unit === unit && !slip.isTwice)?.factor ?? NaN;

describe('the factors of unit slips', () => {
  it.each([
    // I1. NIST SP 811 (2008), appendix B; computed in exact rational arithmetic from lb, in and g0.
    ['kg', MASS_UNITS, 'lb', 2.2046226218487757],
    ['slug', MASS_UNITS, 'lb', 32.17404855643045],
    ['in', LENGTH_UNITS, 'mm', 25.4],
    ['ft', LENGTH_UNITS, 'in', 12],
    ['m', LENGTH_UNITS, 'ft', 1 / 0.3048],
    ['lb.ft2', INERTIA_UNITS, 'lb.in2', 144],
    ['lbf.ft.s2', INERTIA_UNITS, 'lbf.in.s2', 12],
    ['slug.ft2', INERTIA_UNITS, 'lb.ft2', 32.17404855643045],
    ['slug.ft2', INERTIA_UNITS, 'lb.in2', 4633.062992125984],
  ] as const)('are those of the factor table: %s declared, %3$s meant', (declared, units, unit, factor) => {
    expect(Math.abs(factorOf(declared, units, unit) / factor - 1)).toBeLessThan(1e-14);
  });

  it('tell which of two figures it is', () => {
    const slips = unitSlips('kg', MASS_UNITS);
    expect(slipOfTwo(2.2046, slips, 0.005)).toMatchObject({ of: 'now', slip: { unit: 'lb' } });
    expect(slipOfTwo(1 / 2.2046, slips, 0.005)).toMatchObject({ of: 'before', slip: { unit: 'lb' } });
    expect(slipOfTwo(2.25, slips, 0.005)).toBeNull();
  });
});

describe('findings on the size of a body', () => {
  const ball = (pounds: number, i: number) => ({
    mass: toSi(pounds, 'slug'),
    moments: diagonal([i, i, i], toSi(1, 'slug.ft2')),
    position: [-7, 0, 0] as const,
  });
  const list = { massUnit: 'slug', lengthUnit: 'ft', inertiaUnit: 'slug.ft2' } as const;
  const { mass, diameter, published, right } = NESC_SPHERE;

  it('stop the published NESC cannonball, larger than itself by a unit, and not the right one', () => {
    // A vehicle that is the ball: its diameter is its span and its length.
    const geometry = aircraft({ span: toSi(diameter, 'in'), length: toSi(diameter, 'in') });
    const finding = found([ball(mass, published)], list, { geometry })[0];
    expect(finding).toMatchObject({ rule: 'larger-than-aircraft', severity: 'blocker' });
    expect(finding?.message).toBe(
      '1 row has moments that no part of this aircraft can have. R1: radius of gyration 1.342 ft, half the aircraft 0.25 ft; in lb.ft2, slug.in2 or lb.in2 they could be.',
    );
    expect(found([ball(mass, right)], list, { geometry })).toEqual([]);
  });

  it('stop moments that need more room than the aircraft has, and say which unit would explain them', () => {
    const geometry = aircraft();
    const beam = (k: number) => [
      { mass: 100, moments: diagonal([1, k * k, k * k], 100), position: [-7, 0, 0] as const },
    ];
    expect(found(beam(9.9), {}, { geometry })).toEqual([]);
    expect(ids(found(beam(10.2), {}, { geometry }))).toEqual(['larger-than-aircraft']);
    expect(ids(found(beam(10.2)))).toEqual([]);
    const slugs = { inertiaUnit: 'slug.ft2' } as const;
    expect(found(beam(68), slugs, { geometry })[0]?.message).toMatch(
      /; in slug\.in2 or lb\.in2 they could be\.$/,
    );
  });

  it('warn of moments smaller than a ball of osmium has, which rounding does not excuse', () => {
    // First principles: tr S = 3/5 m r²; 22.59 kg make a ball of osmium of 1 l, r = 0.0620350 m.
    expect(leastTrace(22.59)).toBeCloseTo(0.6 * 22.59 * 0.062035 ** 2, 6);
    const finding = found([{ mass: 22.59, moments: diagonal([0.01, 0.01, 0.01]) }])[0];
    expect(finding).toMatchObject({ rule: 'denser-than-metal', severity: 'warning' });
    expect(finding?.message).toMatch(
      /^1 row .* R1: 22.59 kg, Ixx \+ Iyy \+ Izz 0.03 kg\.m2, .* 3\.477 times/,
    );
    expect(found([{ mass: 22.59, moments: diagonal([0.0353, 0.0353, 0.0353]) }])).toEqual([]);
    // Printed to two places, 0.01 and 0.02 may be anything around them.
    expect(found([{ mass: 7, moments: diagonal([0.0, 0.01, 0.01]) }])).toEqual([]);
  });

  it('warn of moments about the datum', () => {
    const at = [-8, 0.5, -2] as const;
    const own = diagonal([0.05, 0.06, 0.07], 40);
    const [x, y, z] = at;
    const moved = {
      ...own,
      ixx: own.ixx + 40 * (y * y + z * z),
      iyy: own.iyy + 40 * (x * x + z * z),
      izz: own.izz + 40 * (x * x + y * y),
    };
    expect(found([{ mass: 40, moments: own, position: at }])).toEqual([]);
    expect(found([{ mass: 40, moments: moved, position: at }])[0]).toMatchObject({
      rule: 'moments-about-datum',
      severity: 'warning',
    });
    // A rod from the datum out to twice its CG has (2x)²/12, a third of x² more.
    expect(found([{ mass: 40, moments: diagonal([0.1, 21.4, 21.4], 40), position: [8, 0, 0] }])).toEqual([]);
  });
});

describe('findings on rows that should be alike', () => {
  const part = { partNumber: 'DN-1', moments: diagonal([1, 1, 1]) };

  it('warn of a mass off by the factor of a unit', () => {
    const two = (mass: number, massUnit: 'kg' | 'lb') =>
      found(
        [
          { ...part, mass: 10 },
          { ...part, mass, position: [9, 0, 0] },
        ],
        { massUnit },
      );
    expect(ruled(two(22.046, 'kg'), 'mass-unit-slip')).toMatchObject({
      severity: 'warning',
      message:
        '1 row is off in mass by the factor of a unit. R2: 22.05 kg, R1 10 kg: this one looks as if in lb.',
      rows: ['R2'],
    });
    expect(ruled(two(4.536, 'kg'), 'mass-unit-slip')?.message).toMatch(/R1 10 kg: R1 looks as if in lb\.$/);
    expect(ids(two(22.4, 'kg'))).toEqual(['same-part-differs']);
    expect(ids(two(10.8, 'kg'))).toEqual([]);
  });

  it('warn of moments off by the factor of a unit at one mass', () => {
    const two = (factor: number) =>
      found(
        [
          { ...part, mass: 10 },
          { mass: 10, partNumber: 'DN-1', moments: diagonal([factor, factor, factor]), position: [9, 0, 0] },
        ],
        { inertiaUnit: 'slug.ft2' },
      );
    for (const factor of [32.174, 12, 144, 1 / 144])
      expect(ids(two(factor === 144 ? 4633.06 : factor))).toContain('inertia-unit-slip');
    expect(ruled(two(32.174), 'inertia-unit-slip')?.message).toMatch(/these look as if in lb\.ft2\.$/);
    expect(ids(two(30))).not.toContain('inertia-unit-slip');
  });

  it('hold the left against the right one by their names', () => {
    const side = (name: string, y: number, mass: number) => ({
      ...SOUND,
      description: name,
      mass,
      position: [5, y, 0] as const,
    });
    const rows = (mass: number) => [side('Left aileron', -4, 10), side('Right aileron', 4, mass)];
    expect(ids(found(rows(22.046)))).toEqual(['mass-unit-slip']);
    expect(found(rows(10.3))).toEqual([]);
  });
});

describe('findings against the neighbours', () => {
  const rows = (last: object) => [
    ...Array.from({ length: 14 }, (_, i) => ({
      mass: 2 + 0.1 * i,
      position: [6 + 0.1 * i, -1, 1 + 0.02 * i] as const,
      moments: diagonal([0.04 + 0.01 * i, 0.05 + 0.01 * i, 0.05 + 0.01 * i]),
    })),
    { mass: 3, position: [6.5, -1, 1.1] as const, moments: diagonal([0.1, 0.1, 0.1]), ...last },
  ];

  it('warn of a place that another sign or another length unit would put right', () => {
    expect(found(rows({}))).toEqual([]);
    const wrong = (position: readonly [number, number, number]) => found(rows({ position }));
    expect(ruled(wrong([6.5, -1, -1.1]), 'place-slip')?.message).toMatch(
      /R15: z -1\.1 m, most of its group 1\.04 to 1\.2 m; with the other sign of z it is where they are\.$/,
    );
    expect(ruled(wrong([-6.5, -1, 1.1]), 'place-slip')?.rows).toEqual(['R15']);
    expect(ruled(wrong([6.5 / 0.3048, -1 / 0.3048, 1.1 / 0.3048]), 'place-slip')?.message).toMatch(
      /its place looks as if in ft\.$/,
    );
    expect(ruled(wrong([6500, -1, 1.1]), 'place-slip')?.message).toMatch(/its x looks as if in mm\.$/);
  });

  it('note a place that is merely far from the group', () => {
    const findings = found(rows({ position: [11, -1, 1.1] }));
    expect(findings.map(({ rule, severity }) => [rule, severity])).toEqual([['outside-group', 'note']]);
    expect(found(rows({ position: [8, -1, 1.1] }))).toEqual([]);
  });

  it('find three slips in one group: they do not hide each other', () => {
    const slips = [0, 1, 2].map((i) => ({
      ...SOUND,
      mass: 4 + i,
      position: [6.3 + 0.1 * i, -1, -1.1] as const,
      moments: diagonal([0.1, 0.1, 0.1]),
    }));
    expect(ruled(found([...rows({}), ...slips]), 'place-slip')?.count).toBe(3);
  });

  it('warn of moments larger than the group reaches, or as small as metal, that another unit puts right', () => {
    const sized = (k: number) =>
      ids(found(rows({ moments: diagonal([k * k, k * k, k * k], 3) }), { inertiaUnit: 'slug.ft2' }));
    expect(sized(0.2 * Math.sqrt(144))).toEqual(['inertia-scale']);
    expect(sized(0.2 * Math.sqrt(4633.06))).toEqual(['inertia-scale']);
    // Larger than the others, but no larger than the group reaches: a long part.
    expect(sized(0.53)).toEqual([]);
  });

  it('warn of moments that no body within the group has, where no unit explains them', () => {
    const sized = (k: number) => found(rows({ moments: diagonal([k * k, k * k, k * k], 3) }));
    // The box of the CGs is 1.3 by 0 by 0.26 m: half its diagonal 0.6629 m.
    expect(ids(sized(0.75))).toEqual(['larger-than-group']);
    expect(sized(0.75)[0]?.message).toMatch(/which reaches 0\.6629 m from its middle\.$/);
    expect(sized(0.53)).toEqual([]);
  });

  it('note what rows without moments may leave out, by the scatter of their group', () => {
    const bare = Array.from({ length: 12 }, (_, i) => ({
      mass: 1,
      group: 'Paint',
      position: [i, 0.1, 0] as const,
    }));
    const heavy = { mass: 5000 };
    expect(
      ruled(found([{ ...heavy, moments: diagonal([0.8, 0.8, 0.8], 5000) }, ...bare]), 'omitted-inertia'),
    ).toBeDefined();
    expect(
      ruled(found([{ ...heavy, moments: diagonal([1, 1, 1], 5000) }, ...bare]), 'omitted-inertia'),
    ).toBeUndefined();
  });
});
