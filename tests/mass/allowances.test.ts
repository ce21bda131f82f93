import { describe, expect, it } from 'vitest';
import { allowanceFor, pathsUp } from '@/lib/mass/allowances';
import { type Component } from '@/lib/mass/component';
import { Placement } from '@/lib/mass/place';
import { type GrowthAllowances, groupBranches, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import { uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';

const ALLOWANCES: GrowthAllowances = {
  E: 0.1,
  C: 0.04,
  A: 0,
  groups: [
    { group: 'Wing', maturity: 'E', fraction: 0.2 },
    { group: 'Wing/Flaps/Tracks', maturity: 'E', fraction: 0.5 },
  ],
};

const SIGMA = { x: null, y: null, z: null, ixx: null, iyy: null, izz: null, ixy: null, ixz: null, iyz: null };

function rolledUp(rows: readonly Partial<Component>[]) {
  const placement = new Placement(declarations(), geometry());
  const [book, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
  rows.forEach((row, index) => {
    const component = aComponent({ item: `R${index}`, maturity: 'E', ...row });
    book.add(component);
    uncertainty.add(component);
  });
  const whole = rollUp(book.subtotals(), [], geometry(), ALLOWANCES);
  const { predicted } = combineUncertainty(uncertainty.sums(), [], ALLOWANCES);
  return { whole, sigma: uncertaintyOf(predicted, whole.predictedAccount, geometry()) };
}

describe('the growth allowance of rows that state none', () => {
  it('is that of the nearest group up their path which states one for their maturity, and names it', () => {
    const given = (group: string, maturity: 'E' | 'C' | null = 'E') =>
      allowanceFor(ALLOWANCES, group, maturity);
    expect(given('Wing')).toEqual({ fraction: 0.2, from: 'Wing' });
    expect(given('Wing/Flaps')).toEqual({ fraction: 0.2, from: 'Wing' });
    expect(given('Wing/Flaps/Tracks')).toEqual({ fraction: 0.5, from: 'Wing/Flaps/Tracks' });
    expect(given('Wing/Flaps/Tracks/Left')).toEqual({ fraction: 0.5, from: 'Wing/Flaps/Tracks' });
  });

  it('is the program’s own where no group up the path states one for that maturity', () => {
    const given = (group: string, maturity: 'E' | 'C' | null) => allowanceFor(ALLOWANCES, group, maturity);
    expect(given('Wing/Flaps', 'C')).toEqual({ fraction: 0.04, from: '' });
    expect(given('Wing tips', 'E')).toEqual({ fraction: 0.1, from: '' });
    expect(given('Body/Wing', 'E')).toEqual({ fraction: 0.1, from: '' });
    expect(given('Wing', null)).toEqual({ fraction: 0, from: null });
  });

  it('asks the longest path first', () => {
    expect(pathsUp('a/b/c')).toEqual(['a/b/c', 'a/b', 'a']);
  });

  it('moves predicted mass, CG and tensor as the rows grown one by one would', () => {
    const rows = [
      { group: 'Wing/Spars', mass: 10, position: [1, 2, 0] as const },
      { group: 'Wing/Flaps/Tracks', mass: 4, position: [3, -1, 1] as const },
      { group: 'Body', mass: 20, position: [-2, 0, 0] as const },
      { group: 'Wing', mass: 5, position: [0, 1, 1] as const, growth: 0.01 },
    ];
    const { whole } = rolledUp(rows);
    const growth = [0.2, 0.5, 0.1, 0.01];
    const grown = rolledUp(
      rows.map((row, index) => ({ ...row, mass: row.mass * (1 + (growth[index] ?? 0)), growth: 0 })),
    ).whole;
    expect(whole.predicted.mass).toBeCloseTo(10 * 1.2 + 4 * 1.5 + 20 * 1.1 + 5 * 1.01, 12);
    const [is, should] = [properties(whole.predicted), properties(grown.basic)];
    is.cg.forEach((value, axis) => expect(value).toBeCloseTo(should.cg[axis] ?? NaN, 12));
    for (const key of ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const)
      expect(is.inertia[key]).toBeCloseTo(should.inertia[key], 10);
    expect(is.cg[0]).not.toBeCloseTo(properties(whole.basic).cg[0], 3);
  });

  it('scales the σ of predicted mass by the rule of each row’s group', () => {
    const { sigma } = rolledUp([
      { group: 'Wing/Spars', mass: 10, sigma: { mass: 1, ...SIGMA } },
      { group: 'Body', mass: 20, sigma: { mass: 2, ...SIGMA } },
    ]);
    // Independent errors: Var M = Σ ((1 + growth) σ)² (JCGM 100:2008, 5.1.2).
    expect(sigma.mass).toBeCloseTo(Math.hypot(1.2 * 1, 1.1 * 2), 12);
  });
});

describe('mass by maturity', () => {
  it('adds up to the basic mass, of the whole and of every group with those below it; memo rows and pending ones are in none', () => {
    const { whole } = rolledUp([
      { group: 'Wing/Spars', mass: 10, maturity: 'C' },
      { group: 'Wing/Ribs', mass: 4, maturity: 'E', quantity: 3 },
      { group: 'Wing', mass: 1, maturity: null },
      { group: 'Body', mass: 7, maturity: 'A' },
      { group: 'Wing', mass: 99, maturity: 'A', counting: 'memo' },
      { group: 'Body', mass: 50, maturity: 'A', status: 'pending' },
    ]);
    expect(whole.byMaturity).toEqual({ E: 12, C: 10, A: 7, none: 1 });
    const branches = groupBranches(whole.groups, geometry());
    expect(branches.map(({ group, byMaturity }) => [group, byMaturity])).toEqual([
      ['Body', { E: 0, C: 0, A: 7, none: 0 }],
      ['Wing', { E: 12, C: 10, A: 0, none: 1 }],
      ['Wing/Ribs', { E: 12, C: 0, A: 0, none: 0 }],
      ['Wing/Spars', { E: 0, C: 10, A: 0, none: 0 }],
    ]);
  });

  it('is absent, not zero, for groups that were stored before it was kept', () => {
    const { whole } = rolledUp([
      { group: 'Wing/Spars', mass: 10 },
      { group: 'Wing', mass: 2 },
    ]);
    const stored = whole.groups.map(({ byMaturity, ...group }) => {
      expect(byMaturity).toBeDefined();
      return group;
    });
    for (const branch of groupBranches(stored, geometry())) expect('byMaturity' in branch).toBe(false);
  });
});
