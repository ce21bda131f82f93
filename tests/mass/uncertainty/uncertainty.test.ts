import { describe, expect, it } from 'vitest';

import { AccountSum } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement, accountOfComponent } from '@/lib/mass/place';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import {
  CERTAIN,
  UNCERTAINTY_LENGTH,
  UncertaintySum,
  fromNumbers,
  toNumbers,
} from '@/lib/mass/uncertainty/sums';
import { type PropertiesUncertainty, RESULTS, uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { TEN_RESISTORS, variancesByHand } from '@/tests/references/uncertainty';
import { aComponent, declarations, geometry } from '@/tests/support/mass';
import { normalNumbers } from '@/tests/support/random';
import { SETTINGS, VALUES, moved, resultsOf, sigmas, uncertainRows } from './support';

const ALLOWANCES = { E: 0.15, C: 0.05, A: 0 };

function booked(rows: readonly Component[], list: ListDeclarations, frame: AirframeGeometry) {
  const placement = new Placement(list, frame);
  const [book, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
  for (const row of rows) {
    book.add(row);
    uncertainty.add(row);
  }
  return { subtotals: book.subtotals(), sums: uncertainty.sums() };
}

/** Uncertainty of the basic and the predicted result, from subtotals alone. */
function evaluated(rows: readonly Component[], list: ListDeclarations, frame: AirframeGeometry) {
  const { subtotals, sums } = booked(rows, list, frame);
  const whole = rollUp(subtotals, [], frame, ALLOWANCES);
  const combined = combineUncertainty(sums, [], ALLOWANCES);
  return {
    basic: uncertaintyOf(combined.basic, whole.basicAccount, frame),
    predicted: uncertaintyOf(combined.predicted, whole.predictedAccount, frame),
  };
}

function known(of: { readonly properties: PropertiesUncertainty | null }): PropertiesUncertainty {
  if (of.properties === null) throw new Error('The result has no mass and so no properties.');
  return of.properties;
}

const grown = (row: Component): number =>
  1 + (row.growth ?? (row.maturity === null ? 0 : ALLOWANCES[row.maturity]));

/** Covariances of the ten results by central differences of the roll-up over every value that has a σ. */
function byDifferences(
  rows: readonly Component[],
  list: ListDeclarations,
  frame: AirframeGeometry,
  growth: (row: Component) => number = () => 1,
): number[][] {
  const covariance = RESULTS.map(() => RESULTS.map(() => 0));
  rows.forEach((row, at) => {
    for (const value of VALUES) {
      const sigma = row.sigma?.[value] ?? 0;
      if (sigma === 0) continue;
      const side = (by: number): number[] =>
        resultsOf(
          rows.map((other, k) => (k === at ? moved(row, value, by) : other)),
          list,
          frame,
          growth,
        );
      const [up, down] = [side(sigma), side(-sigma)];
      const effect = up.map((result, k) => (result - (down[k] ?? NaN)) / 2);
      covariance.forEach((line, i) =>
        line.forEach((so, j) => (line[j] = so + (effect[i] ?? NaN) * (effect[j] ?? NaN))),
      );
    }
  });
  return covariance;
}

/** Results that have one unit. */
const ALIKE = [[0], [1, 2, 3], [4, 5, 6, 7, 8, 9]];

/**
 * Largest difference of two covariance matrices as a share of the two standard deviations concerned; of a millionth of the largest of
 * their kind where symmetry leaves a result certain.
 */
function difference(a: readonly (readonly number[])[], b: readonly (readonly number[])[]): number {
  const sigma = (k: number): number => Math.sqrt(b[k]?.[k] ?? NaN);
  const scale = RESULTS.map((_, k) => {
    const alike = ALIKE.find((kind) => kind.includes(k)) ?? [];
    return Math.max(sigma(k), 1e-6 * Math.max(...alike.map(sigma)));
  });
  return Math.max(
    ...b.flatMap((line, i) =>
      line.map((value, j) => Math.abs((a[i]?.[j] ?? NaN) - value) / ((scale[i] ?? NaN) * (scale[j] ?? NaN))),
    ),
  );
}

describe.each(SETTINGS)('the uncertainty of $name', ({ list, frame }) => {
  const rows = uncertainRows(12, 5);

  it('is that of numerical differentiation of the roll-up, all covariances to 1e-6', () => {
    const { basic } = evaluated(rows, list, frame);
    expect(difference(known(basic).covariance, byDifferences(rows, list, frame))).toBeLessThanOrEqual(1e-6);
  });

  it('with growth is that of rows grown with their errors', () => {
    const { predicted } = evaluated(rows, list, frame);
    const expected = byDifferences(rows, list, frame, grown);
    expect(difference(known(predicted).covariance, expected)).toBeLessThanOrEqual(1e-6);
  });

  it('is the scatter of results from rows with normal errors, within sampling error', () => {
    const normal = normalNumbers(20100527);
    const samples = Array.from({ length: 3000 }, () =>
      resultsOf(
        rows.map((row) =>
          VALUES.reduce((so, value) => moved(so, value, (row.sigma?.[value] ?? 0) * normal()), row),
        ),
        list,
        frame,
      ),
    );
    const mean = RESULTS.map((_, k) => samples.reduce((sum, sample) => sum + (sample[k] ?? NaN), 0) / 3000);
    const scatter = RESULTS.map((_, i) =>
      RESULTS.map(
        (__, j) =>
          samples.reduce(
            (sum, one) => sum + ((one[i] ?? NaN) - (mean[i] ?? NaN)) * ((one[j] ?? NaN) - (mean[j] ?? NaN)),
            0,
          ) / 2999,
      ),
    );
    // A sampled covariance errs by at most sqrt(2/n) of the product of the two σ (one σ); 100 of them stay within 4.
    const { basic } = evaluated(rows, list, frame);
    expect(difference(scatter, known(basic).covariance)).toBeLessThanOrEqual(4 * Math.sqrt(2 / 3000));
  });

  it('does not depend on where r0 and the datum are', () => {
    const far = [1e4, -1e4, 1e4] as const;
    const there = evaluated(
      rows,
      { ...list, pose: { ...list.pose, origin: add(list.pose.origin, far) } },
      {
        ...frame,
        reference: add(frame.reference, [far[0] + 2, far[1] - 1, far[2] + 0.5]),
        lateralPlane: frame.lateralPlane + far[1],
      },
    );
    const here = evaluated(rows, list, frame);
    expect(difference(known(there.basic).covariance, known(here.basic).covariance)).toBeLessThanOrEqual(
      1e-11,
    );
  });

  it('adds up in any order, of rows and of subtotals', () => {
    const straight = combineUncertainty(booked(rows, list, frame).sums, [], ALLOWANCES);
    const turned = combineUncertainty(
      booked([...rows].reverse(), list, frame).sums.reverse(),
      [],
      ALLOWANCES,
    );
    for (const basis of ['basic', 'predicted'] as const) {
      const [a, b] = [toNumbers(straight[basis]), toNumbers(turned[basis])];
      const size = Math.max(...a.map(Math.abs));
      a.forEach((value, k) => expect(Math.abs(value - (b[k] ?? NaN))).toBeLessThanOrEqual(1e-15 * size));
    }
  });
});

function add(a: readonly [number, number, number], b: readonly [number, number, number]) {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]] as const;
}

describe('the law of propagation (JCGM 100:2008, clause 5)', () => {
  const points = [
    { mass: 10, place: [0, 0, 0], massSigma: 0.2, placeSigma: [0.01, 0.02, 0.03] },
    { mass: 4, place: [3, 1, -2], massSigma: 0.1, placeSigma: [0.05, 0.01, 0.02] },
    { mass: 25, place: [-2, 4, 1], massSigma: 0, placeSigma: [0.02, 0.02, 0.01] },
  ] as const;

  it('with the derivatives about the CG worked out by hand gives the variances of points', () => {
    const rows = points.map(({ mass, place, massSigma, placeSigma: [x, y, z] }) =>
      aComponent({ mass, position: place, sigma: sigmas({ mass: massSigma, x, y, z }) }),
    );
    const { basic } = evaluated(rows, declarations(), geometry({ reference: [0.5, 1, -0.5] }));
    const { cg, cgMassCovariance, inertia } = known(basic);
    const expected = variancesByHand(points);
    expect(basic.mass ** 2).toBeCloseTo(expected.mass, 14);
    expect(cg.x ** 2).toBeCloseTo(expected.cx, 14);
    expect(cgMassCovariance[0]).toBeCloseTo(expected.massAndCx, 14);
    expect(inertia.ixx ** 2).toBeCloseTo(expected.ixx, 12);
    expect(inertia.ixy ** 2).toBeCloseTo(expected.ixy, 12);
  });

  it('makes the errors of ten pieces of one row one error, those of ten rows ten (the ten resistors of 5.2.2)', () => {
    const { each, sigma, together, wrongly } = TEN_RESISTORS;
    const row = aComponent({ mass: each, sigma: sigmas({ mass: sigma }) });
    const sigmaOf = (rows: readonly Component[]): number =>
      evaluated(rows, declarations(), geometry()).basic.mass;
    expect(sigmaOf([{ ...row, quantity: 10 }])).toBeCloseTo(together, 14);
    expect(sigmaOf([{ ...row, quantity: 5, pair: true }])).toBeCloseTo(together, 14);
    expect(sigmaOf(Array.from({ length: 10 }, () => row))).toBeCloseTo(wrongly, 2);
  });
});

describe('one error of a row', () => {
  it('leaves the lateral CG and the lateral products of a half list certain', () => {
    const half = SETTINGS[3];
    if (!half) throw new Error('There is a fourth setting.');
    const { cg, inertia } = known(evaluated(uncertainRows(12, 5), half.list, half.frame).basic);
    expect([cg.y, inertia.ixy, inertia.iyz]).toEqual([0, 0, 0]);
    expect(Math.min(cg.x, cg.z, inertia.ixz)).toBeGreaterThan(0);
  });

  it('moves a piece and its mirror image to opposite sides: a pair leaves the lateral CG certain', () => {
    const row = aComponent({ mass: 5, position: [1, 3, 0], sigma: sigmas({ mass: 0.5, x: 0.1, y: 0.2 }) });
    const { cg, inertia } = known(
      evaluated([{ ...row, pair: true }], declarations(), geometry({ reference: [0, 0, 1] })).basic,
    );
    expect(cg.y).toBe(0);
    expect(cg.x).toBeCloseTo(0.1, 14);
    // Ixx = 2 m y²: σ² = (2 y² σm)² + (4 m y σy)².
    expect(inertia.ixx).toBeCloseTo(Math.hypot(2 * 9 * 0.5, 4 * 5 * 3 * 0.2), 12);
    expect(inertia.ixy).toBe(0);
  });

  it('of mass scales own moments that have no σ, and leaves those that have one, zero too', () => {
    const moments = { ixx: 6, iyy: 8, izz: 10, ixy: 1, ixz: 0, iyz: 0 };
    const row = aComponent({ mass: 4, moments, sigma: sigmas({ mass: 0.2, iyy: 0, izz: 0.3 }) });
    const { inertia } = known(evaluated([row], declarations(), geometry({ reference: [1, 1, 1] })).basic);
    expect(inertia.ixx).toBeCloseTo((0.2 * 6) / 4, 12);
    expect(inertia.ixy).toBeCloseTo((0.2 * 1) / 4, 12);
    expect(inertia.iyy).toBe(0);
    expect(inertia.izz).toBeCloseTo(0.3, 12);
  });

  it('along an axis of the list is turned with the list', () => {
    const row = aComponent({ mass: 2, sigma: sigmas({ x: 0.1 }) });
    const pose = { origin: [0, 0, 0], yaw: Math.PI / 4, pitch: 0, roll: 0 } as const;
    const { cg, cgCovariance } = known(evaluated([row], declarations({ pose }), geometry()).basic);
    expect(cg.x).toBeCloseTo(0.1 * Math.SQRT1_2, 14);
    expect(cg.y).toBeCloseTo(0.1 * Math.SQRT1_2, 14);
    expect(cgCovariance.xy).toBeCloseTo(0.005, 14);
    expect(cg.z).toBe(0);
  });
});

describe('the share of mass that carries a σ', () => {
  const row = (mass: number, sigma: number | null): Component =>
    aComponent({ mass, sigma: sigmas({ mass: sigma, x: 0.1 }) });

  it('counts pieces and images, removals without their sign, and a stated zero as stated', () => {
    const rows = [
      { ...row(10, 0.1), quantity: 2, pair: true },
      row(-5, null),
      row(15, 0),
      aComponent({ mass: 20 }),
    ];
    const { basic } = evaluated(rows, declarations(), geometry());
    expect(basic.massShare).toBeCloseTo(55 / 80, 14);
  });

  it('counts items on board as mass without one, and is nothing where there is no mass', () => {
    const { sums } = booked([row(30, 1)], declarations(), geometry());
    const { basic } = combineUncertainty(sums, [{ mass: 90 }], NO_GROWTH);
    expect(basic.massWithSigma / basic.mass).toBe(0.25);
    expect(uncertaintyOf(CERTAIN, { ...noAccount, mass: 0 }, geometry())).toEqual({
      mass: 0,
      massShare: null,
      properties: null,
    });
  });

  const noAccount = accountOfComponent(row(1, 1), declarations(), geometry());
});

describe('subtotals of uncertainty', () => {
  it('are kept under the keys of the subtotals, in their order', () => {
    const [setting] = SETTINGS;
    if (!setting) throw new Error('There is a first setting.');
    const { subtotals, sums } = booked(uncertainRows(9, 3), setting.list, setting.frame);
    const keys = (part: (typeof sums)[number] | (typeof subtotals)[number]) => [
      part.group,
      part.category,
      part.maturity,
      part.status,
    ];
    expect(sums.map(keys)).toEqual(subtotals.map(keys));
  });

  it('leave out memo rows, unapproved adjustments and other categories, as the roll-up does', () => {
    const row = aComponent({ mass: 10, sigma: sigmas({ mass: 3 }) });
    const { sums } = booked(
      [row, { ...row, counting: 'memo' }, { ...row, status: 'pending' }, { ...row, category: 'fuel' }],
      declarations({ kind: 'adjustments' }),
      geometry(),
    );
    const variance = (options: Parameters<typeof combineUncertainty>[3]): number | undefined =>
      combineUncertainty(sums, [], NO_GROWTH, options).basic.covariance[0];
    expect(variance({})).toBe(18);
    expect(variance({ categories: ['empty'] })).toBe(9);
    expect(variance({ statuses: ['approved', 'pending'] })).toBe(27);
  });

  it('are finite for the largest numbers that a list can hold', () => {
    const large = sigmas({ mass: 1e40, x: 1e40, y: 1e40, z: 1e40, ixy: 1e40 });
    const row = aComponent({
      mass: 1e40,
      position: [1e40, -1e40, 1e40],
      quantity: 1e6,
      pair: true,
      sigma: large,
    });
    for (const { basic } of booked([row], declarations(), geometry()).sums)
      expect(toNumbers(basic).every(Number.isFinite)).toBe(true);
  });

  it('come back from 57 numbers as they were', () => {
    const [, setting] = SETTINGS;
    if (!setting) throw new Error('There is a second setting.');
    const sum = new UncertaintySum();
    for (const { basic } of booked(uncertainRows(6, 9), setting.list, setting.frame).sums) sum.add(basic);
    const stored = toNumbers(sum.uncertainty);
    expect(stored).toHaveLength(UNCERTAINTY_LENGTH);
    expect(fromNumbers(JSON.parse(JSON.stringify(stored)))).toEqual(sum.uncertainty);
    expect(() => fromNumbers([1, 2, 3])).toThrow(/57 finite numbers/);
    expect(() => fromNumbers([...stored.slice(1), NaN])).toThrow(RangeError);
  });
});

describe('the uncertainty of a stateless roll-up', () => {
  it('is that of the same rows in a program', () => {
    const [, { list, frame } = { list: declarations(), frame: geometry() }] = SETTINGS;
    const whole = new StatelessRollUp(list);
    const sum = new AccountSum();
    for (const row of uncertainRows(8, 2)) {
      whole.add({ ...row, growth: null, pair: false });
      sum.add(accountOfComponent({ ...row, pair: false }, list, whole.geometry));
    }
    const stateless = uncertaintyOf(whole.uncertainty().basic, sum.account, whole.geometry);
    const rows = uncertainRows(8, 2).map((row) => ({ ...row, pair: false }));
    const inProgram = evaluated(rows, list, { ...frame, axes: list.axes, incidence: 0 }).basic;
    expect(difference(known(stateless).covariance, known(inProgram).covariance)).toBeLessThanOrEqual(1e-10);
  });
});
