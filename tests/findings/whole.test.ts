import { describe, expect, it } from 'vitest';

import { type Finding } from '@/lib/findings/finding';
import { findingsOnRotors, findingsOnWhole } from '@/lib/findings/look';
import { ROTOR_RULES, ROW_RULES, WHOLE_RULES, ruleOf } from '@/lib/findings/rules';
import { momentsOf, tensorOf } from '@/lib/frames/products';
import { accountOfBody, addAccounts, readAccount, scaleAccount } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { Placement } from '@/lib/mass/place';
import { type GrowthAllowances, NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { halfTraceMinus } from '@/lib/numerics/sym3';
import { type Rotor } from '@/lib/rotors/rotor';
import { toSi } from '@/lib/units/convert';
import { GTM_BASELINE, GTM_REMOVALS } from '@/tests/references/gtm';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';

function found(
  rows: readonly Partial<Component>[],
  allowances: GrowthAllowances = { E: 0.1, C: 0.1, A: 0.1 },
): Finding[] {
  const book = new SubtotalBook(new Placement(declarations(), geometry()));
  rows.forEach((row, i) => book.add(aComponent({ item: `R${i + 1}`, maturity: 'C', ...row })));
  return findingsOnWhole(rollUp(book.subtotals(), [], geometry(), allowances), geometry());
}

const SOUND = { mass: 10, moments: diagonal([1, 1, 1]) };

describe('findings on a rolled-up condition', () => {
  it('say nothing of a sound one', () => {
    expect(found([SOUND, { ...SOUND, position: [4, 1, 0] }])).toEqual([]);
  });

  it('stop one whose mass is zero or less', () => {
    for (const mass of [10, 10.5])
      expect(found([SOUND, { mass: -mass, moments: diagonal([-1, -1, -1]) }])[0]).toMatchObject({
        rule: 'mass-not-positive',
        severity: 'blocker',
      });
    expect(found([]).map(({ rule }) => rule)).toEqual(['mass-not-positive']);
  });

  it('stop one from which more was taken than was there', () => {
    const findings = found([SOUND, { mass: -1, moments: diagonal([-0.1, -0.1, -1.5]), position: [0, 0, 0] }]);
    expect(findings[0]?.rule).toBe('impossible-total');
    const fine = found([SOUND, { mass: -1, moments: diagonal([-0.1, -0.1, -0.1]) }]);
    expect(fine).toEqual([]);
  });

  it('stop the GTM tail removal when the part itself is what is left (GTM_DesignSim, with the wrong baseline weight)', () => {
    // What the published removal implies with 57.75 lb instead of 49.6 lb has negative moments.
    const removal = GTM_REMOVALS[1];
    const slugs = toSi(1, 'slug.ft2');
    const { inertia, grossWeight } = GTM_BASELINE;
    const { change } = removal;
    const scaled = (m: typeof inertia): Component['moments'] => ({
      ...diagonal([m.ixx, m.iyy, m.izz], slugs),
      ixy: slugs * m.ixy,
      ixz: slugs * m.ixz,
      iyz: slugs * m.iyz,
    });
    const [x, y, z] = removal.cg;
    const left = accountOfBody(
      toSi(grossWeight + removal.weight, 'lb'),
      [toSi(x, 'in'), toSi(y, 'in'), toSi(z, 'in')],
      halfTraceMinus(
        tensorOf({
          ...diagonal([inertia.ixx + change.ixx, inertia.iyy + change.iyy, inertia.izz + change.izz], slugs),
          ixy: slugs * (inertia.ixy + change.ixy),
          ixz: slugs * (inertia.ixz + change.ixz),
          iyz: slugs * (inertia.iyz + change.iyz),
        }),
      ),
    );
    const whole = accountOfBody(
      toSi(grossWeight, 'lb'),
      [0, 0, 0],
      halfTraceMinus(tensorOf(scaled(inertia))),
    );
    const part = readAccount(addAccounts(whole, scaleAccount(-1, left)));
    if (part === null) throw new Error('Nothing was removed.');
    const [finding] = found([{ mass: part.mass, position: part.place, moments: momentsOf(part.tensor) }]);
    expect(finding?.rule).toBe('impossible-total');
    expect(finding?.message).toMatch(/basic: least principal second moment -/);
  });

  it('note a condition that lies in one plane only up to rounding', () => {
    const flat = { mass: 1, moments: diagonal([1, 2, 3 + 1e-6]) };
    expect(found([flat]).map(({ rule, severity }) => [rule, severity])).toEqual([
      ['total-within-rounding', 'note'],
    ]);
  });

  it('warn of a group from which more was taken than it holds, though the total is sound', () => {
    const cabin = { ...SOUND, group: 'Cabin' };
    const removed = (moment: number) =>
      found([
        { ...SOUND, mass: 100, moments: diagonal([90, 90, 90]) },
        cabin,
        { mass: -4, group: 'Cabin', moments: diagonal([-0.1, -0.1, -moment]) },
      ]);
    expect(removed(0.1)).toEqual([]);
    expect(removed(1.2)).toMatchObject([
      { rule: 'impossible-group', severity: 'warning', rows: ['Cabin'], count: 1 },
    ]);
  });

  it('note groups that only take away', () => {
    const findings = found([
      { ...SOUND, group: 'Fuselage' },
      { mass: -1, group: 'Removed/Seats', moments: diagonal([-0.1, -0.1, -0.1]) },
    ]);
    expect(findings).toEqual([
      {
        rule: 'group-without-mass',
        severity: 'note',
        message: '1 group has no positive mass and so no CG. First, Removed/Seats: -1 kg (-2.205 lb).',
        rows: ['Removed/Seats'],
        count: 1,
      },
    ]);
  });

  it('note mass that has no growth allowance', () => {
    const findings = found([SOUND, { ...SOUND, mass: 5, growth: 0.02 }], NO_GROWTH);
    expect(findings).toEqual([
      {
        rule: 'growth-unknown',
        severity: 'note',
        message: '10 kg (22.05 lb) of 15 kg (33.07 lb) has no growth allowance and is predicted as it is.',
        rows: [],
        count: 1,
      },
    ]);
    expect(found([{ ...SOUND, maturity: null }]).map(({ rule }) => rule)).toEqual(['growth-unknown']);
  });
});

describe('findings on rotating parts', () => {
  const rotor = (said: Partial<Rotor>): Rotor => ({
    rotor: 'P1',
    polarInertia: 2,
    axis: { kind: 'angles', yaw: 0, pitch: 0, sense: 'cw' },
    gearRatio: 1,
    shaft: 'P1',
    component: 'plant/P1',
    blades: 4,
    polarInertiaSigma: null,
    group: null,
    note: null,
    ...said,
  });
  const points = [{ code: 'cruise', title: 'Cruise', speeds: [{ shaft: 'P1', speed: 100, sigma: null }] }];

  it('note two blades', () => {
    expect(findingsOnRotors({ rotors: [rotor({})], points })).toEqual([]);
    expect(findingsOnRotors({ rotors: [rotor({ blades: null }), rotor({ blades: 3 })], points })).toEqual([]);
    expect(findingsOnRotors({ rotors: [rotor({ blades: 2 })], points })).toMatchObject([
      { rule: 'two-bladed-rotor', severity: 'note', rows: ['P1'], count: 1 },
    ]);
  });

  it('stop an operating point without the speed of a shaft', () => {
    const rotors = [rotor({}), rotor({ rotor: 'G1', shaft: 'gas' })];
    expect(findingsOnRotors({ rotors, points })).toMatchObject([
      {
        rule: 'shaft-without-speed',
        severity: 'blocker',
        message: '1 shaft speed is missing. First, gas at cruise.',
        rows: ['G1'],
        count: 1,
      },
    ]);
  });
});

describe('the rules', () => {
  const rules = [...ROW_RULES, ...WHOLE_RULES, ...ROTOR_RULES];

  it('have ids of their own, by which they are found', () => {
    expect(new Set(rules.map(({ id }) => id)).size).toBe(rules.length);
    for (const rule of rules) expect(ruleOf(rule.id)).toBe(rule);
    expect(ruleOf('no-such-rule')).toBeNull();
  });

  it('say what they see, why it matters, what to do and where it comes from, in whole sentences', () => {
    for (const { id, sees, why, remedy, source } of rules) {
      expect(id).toMatch(/^[a-z]+(-[a-z]+)*$/);
      for (const text of [sees, why, remedy]) expect(text).toMatch(/^[A-Z(].*\.$/s);
      expect(source.length).toBeGreaterThan(10);
    }
  });

  it('about rows say what they keep in memory', () => {
    for (const { keeps } of ROW_RULES) expect(keeps).toMatch(/\.$/);
  });
});
