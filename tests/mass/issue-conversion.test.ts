import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type AxisTriple } from '@/lib/frames/axes';
import { carriedPose } from '@/lib/frames/carry';
import { type IssueChange, changeFromFormer, changedPlace, reversed } from '@/lib/frames/issue-change';
import { NO_POSE, type Pose } from '@/lib/frames/pose';
import { type Account, fromNumbers, toNumbers } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { IssueConversion, noConversion } from '@/lib/mass/issue-conversion';
import { convertedPercentMac, issueDifferences } from '@/lib/mass/issue-differences';
import { Placement } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import { covarianceMatrix } from '@/lib/mass/uncertainty/sums';
import { uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { convertRotor } from '@/lib/rotors/convert';
import { angularMomentum } from '@/lib/rotors/momentum';
import { type Rotor } from '@/lib/rotors/rotor';
import { radians } from '@/lib/units/convert';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';

const USUAL: AxisTriple = ['aft', 'right', 'up'];

const FORMER = geometry({
  axes: USUAL,
  lateralPlane: 0.1,
  reference: [6.5, 0.1, 1],
  lemac: [6, 0.1, 1],
  mac: 2,
  incidence: radians(1.5),
});

const lies = (said: Partial<Pose>): Pose => ({ ...NO_POSE, ...said });

/**
 * The ways an issue differs from the one before it: the frame it has, and where the former frame lies in it. Chord, plane of
 * symmetry and body axes stay where they are on the aircraft, but for the last, whose plane of symmetry a turn about z leaves behind.
 */
const CHANGES: readonly (readonly [string, AirframeGeometry, Pose])[] = [
  [
    'a datum moved',
    { ...FORMER, reference: [9, 0.1, 1], lemac: [8.5, 0.1, 1] },
    lies({ origin: [2.5, 0, 0] }),
  ],
  [
    'stations renumbered from a datum 100 m ahead, waterlines from one below',
    { ...FORMER, reference: [107, 0.1, 3], lemac: [106, 0.1, 3] },
    lies({ origin: [100, 0, 2] }),
  ],
  [
    'axes turned round',
    { ...FORMER, axes: ['forward', 'right', 'down'], reference: [-6.5, 0.1, -1], lemac: [-6, 0.1, -1] },
    NO_POSE,
  ],
  [
    'butt lines counted to the left, so that the frame is left-handed',
    {
      ...FORMER,
      axes: ['aft', 'left', 'up'],
      lateralPlane: -0.1,
      reference: [6.4, 0, 1.1],
      lemac: [6, -0.1, 1],
    },
    NO_POSE,
  ],
  [
    'a reference line laid anew, two degrees nose-down of the old one',
    { ...FORMER, incidence: radians(3.5), reference: [6.5, 0.1, 1] },
    lies({ origin: [0.2, 0, 0.05], pitch: radians(2) }),
  ],
];

const changeTo = (to: AirframeGeometry, step: Pose): IssueChange =>
  changeFromFormer(FORMER.axes, step, to.axes);

const LIST = declarations({
  axes: ['forward', 'right', 'down'],
  pose: { origin: [5, 0.3, 1.1], yaw: 0.02, pitch: -0.3, roll: 0.1 },
});

const bookOf = (rows: readonly Component[], list: ListDeclarations, frame: AirframeGeometry) => {
  const placement = new Placement(list, frame);
  const [book, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
  for (const row of rows) {
    book.add(row);
    uncertainty.add(row);
  }
  return { subtotals: book.subtotals(), uncertainty: uncertainty.sums() };
};

const RUNS = { numRuns: 25 };
const within = (limit: number) => fc.double({ min: limit / 1000, max: limit, noNaN: true });
const anySigma = fc.record({
  mass: fc.option(within(0.1)),
  x: fc.option(within(0.05)),
  y: fc.option(within(0.05)),
  z: fc.option(within(0.05)),
  ixx: fc.option(within(0.2)),
  iyy: fc.option(within(0.2)),
  izz: fc.option(within(0.2)),
  ixy: fc.option(within(0.1)),
  ixz: fc.option(within(0.1)),
  iyz: fc.option(within(0.1)),
});
const rows = fc.array(
  fc.tuple(anyComponent, fc.option(anySigma)).map(([row, sigma]): Component => ({ ...row, sigma })),
  { minLength: 1, maxLength: 8 },
);

/** Largest difference of two lists of numbers as a share of the largest of the second. */
function difference(a: readonly number[], b: readonly number[]): number {
  const size = Math.max(...b.map(Math.abs), 1e-300);
  return Math.max(...a.map((value, i) => Math.abs(value - (b[i] ?? NaN)))) / size;
}
const accountDifference = (a: Account, b: Account): number => {
  const [p, q] = [toNumbers(a), toNumbers(b)];
  return Math.max(
    difference(p.slice(0, 1), q.slice(0, 1)),
    difference(p.slice(1, 4), q.slice(1, 4)),
    difference(p.slice(4), q.slice(4)),
  );
};

describe.each(CHANGES)('with %s', (_name, to, step) => {
  const change = changeTo(to, step);
  const conversion = new IssueConversion(change, FORMER, to);

  it('converted subtotals are those of the same rows placed in the new issue directly', () => {
    // The frame of the list stays where it is on the aircraft; the plane of symmetry is the same plane in both issues.
    const carried = { ...LIST, pose: carriedPose(LIST.axes, LIST.pose, change, FORMER.axes, to.axes) };
    fc.assert(
      fc.property(rows, (some) => {
        const before = bookOf(some, LIST, FORMER).subtotals;
        const direct = bookOf(some, carried, to).subtotals;
        before.forEach((part, i) => {
          const [now, other] = [conversion.subtotal(part), direct[i]];
          if (other === undefined) throw new Error('the same keys');
          expect([now.group, now.rows, now.pieces]).toEqual([other.group, other.rows, other.pieces]);
          for (const of of ['basic', 'statedPredicted', 'unstatedBasic'] as const)
            expect(accountDifference(now[of], other[of])).toBeLessThanOrEqual(2e-13);
        });
      }),
      RUNS,
    );
  });

  it('so is their uncertainty: that of mass, CG and all six elements', () => {
    const carried = { ...LIST, pose: carriedPose(LIST.axes, LIST.pose, change, FORMER.axes, to.axes) };
    fc.assert(
      fc.property(rows, (some) => {
        const counted = some.map((row): Component => ({ ...row, counting: 'counted' }));
        const before = bookOf(counted, LIST, FORMER);
        const direct = bookOf(counted, carried, to);
        const total = (parts: typeof before.uncertainty) => combineUncertainty(parts, [], NO_GROWTH).basic;
        const account = rollUp(direct.subtotals, [], to, NO_GROWTH).basicAccount;
        const now = total(before.uncertainty.map((part) => conversion.uncertaintySubtotal(part)));
        const a = uncertaintyOf(now, account, to);
        const whole = total(direct.uncertainty);
        const b = uncertaintyOf(whole, account, to);
        expect(a.massShare).toBe(b.massShare);
        expect(a.mass).toBeCloseTo(b.mass, 12);
        const [p, q] = [a.properties, b.properties];
        if (p === null || q === null) throw new Error('there is mass');
        // A variance is a difference of terms as large as the account's: what cancels leaves the rounding of those.
        const diagonal = covarianceMatrix(whole).map((row, k) => Math.sqrt(row[k] ?? NaN));
        const deviation = (x: readonly number[], y: readonly number[], terms: number) =>
          x.forEach((one, k) => expect(Math.abs(one - (y[k] ?? NaN))).toBeLessThanOrEqual(1e-6 * terms));
        const lever = Math.hypot(...account.first) / account.mass;
        const [arm, square] = [Math.max(1, lever), Math.max(1, lever) ** 2];
        const terms = [0, 4].map((from) => Math.max(...diagonal.slice(from, from === 0 ? 4 : 10)));
        const [first = NaN, second = NaN] = terms;
        deviation([p.cg.x, p.cg.y, p.cg.z], [q.cg.x, q.cg.y, q.cg.z], (first * arm) / account.mass);
        deviation(Object.values(p.inertia), Object.values(q.inertia), second + first * square);
      }),
      RUNS,
    );
  });

  it('results say the same of the same aircraft: CG at the same place, the same share of the chord, the same tensor in body axes', () => {
    const { isChordKept } = issueDifferences(change, FORMER, to);
    fc.assert(
      fc.property(rows, (some) => {
        const before = rollUp(bookOf(some, LIST, FORMER).subtotals, [], FORMER, NO_GROWTH);
        if (before.basic.mass <= 0) return;
        const after = resultOf(conversion.account(before.basicAccount), to);
        const [p, q] = [properties(after), properties(before.basic)];
        expect(after.mass).toBe(before.basic.mass);
        const place = changedPlace(change, q.cg);
        p.cg.forEach((part, k) => expect(part).toBeCloseTo(place[k] ?? NaN, 10));
        if (isChordKept) expect(p.percentMac).toBeCloseTo(q.percentMac ?? NaN, 7);
        // A point has no tensor but rounding, so it is judged against its mass one metre away.
        const size = Math.max(before.basic.mass, ...Object.values(q.tensor).map(Math.abs));
        const [now, then] = [Object.values(p.tensor), Object.values(q.tensor)];
        now.forEach((one, k) => expect(Math.abs(one - (then[k] ?? NaN))).toBeLessThanOrEqual(1e-11 * size));
      }),
      RUNS,
    );
  });

  it('is seen for what it is: the plane of symmetry is where it was, and but for a turned frame the chord too', () => {
    const differences = issueDifferences(change, FORMER, to);
    const isTurned = step.pitch !== 0;
    expect(differences.isPlaneKept).toBe(true);
    expect(differences.isDirectionKept).toBe(!isTurned);
    expect(differences.isChordKept).toBe(!isTurned);
  });

  it('comes back by the conversion the other way', () => {
    const back = new IssueConversion(reversed(change), to, FORMER);
    const account = fromNumbers([3, 1, -2, 0.5, 7, 8, 9, 0.1, -0.2, 0.3]);
    const again = back.account(conversion.account(account));
    expect(accountDifference(again, account)).toBeLessThan(1e-14);
    expect(toNumbers(noConversion(FORMER).account(account))).toEqual(toNumbers(account));
  });
});

describe('a pair whose list is stated in an issue with another plane of symmetry', () => {
  it('keeps its image where the plane of its own issue puts it', () => {
    const to = { ...FORMER, lateralPlane: 0.4 };
    const conversion = new IssueConversion(changeTo(to, NO_POSE), FORMER, to);
    const row = aComponent({ mass: 2, position: [3, 1.1, 0], pair: true });
    const list = declarations({ axes: USUAL });
    const account = conversion.account(new Placement(list, FORMER).account(row));
    // By hand: pieces at y = 1.1 and, across 0.1, at -0.9; across the new plane it would be at -0.3.
    expect(resultOf(account, to).properties?.cg[1]).toBeCloseTo(0.1, 14);
    expect(issueDifferences(conversion.change, FORMER, to).isPlaneKept).toBe(false);
  });
});

describe('a share of the chord', () => {
  it('is another share of a chord that moved, at the same place', () => {
    // By hand: LEMAC 0.5 m further aft and a chord of 2.5 m instead of 2: 25 % was station 6.5, which is now 0 %.
    const to = { ...FORMER, lemac: [6.5, 0.1, 1] as const, mac: 2.5 };
    const change = changeTo(to, NO_POSE);
    expect(convertedPercentMac(25, change, FORMER, to)).toBeCloseTo(0, 12);
    expect(convertedPercentMac(50, change, FORMER, to)).toBeCloseTo(20, 12);
    expect(issueDifferences(change, FORMER, to).isChordKept).toBe(false);
  });
});

describe('a rotor', () => {
  const rotor = (axis: Rotor['axis']): Rotor => ({
    rotor: 'propeller',
    polarInertia: 5,
    axis,
    gearRatio: 1,
    shaft: 'engine',
    component: null,
    blades: null,
    polarInertiaSigma: null,
    group: null,
    note: null,
  });
  const point = { code: 'cruise', title: 'Cruise', speeds: [{ shaft: 'engine', speed: 100, sigma: null }] };
  const axes: readonly Rotor['axis'][] = [
    { kind: 'arrow', x: -3, y: 0.4, z: 0.2, hand: 'rh' },
    { kind: 'arrow', x: -3, y: 0.4, z: 0.2, hand: 'lh' },
    { kind: 'angles', yaw: 0.1, pitch: -0.05, sense: 'ccw' },
  ];

  it.each(CHANGES)('has the same angular momentum in body axes with %s', (_name, to, step) => {
    const change = changeTo(to, step);
    // Body axes that stay: the incidence follows the reference line.
    for (const axis of axes) {
      const before = angularMomentum([rotor(axis)], point, FORMER).total;
      const after = angularMomentum(
        [convertRotor(rotor(axis), change, FORMER.axes, to.axes)],
        point,
        to,
      ).total;
      after.forEach((part, k) => expect(part).toBeCloseTo(before[k] ?? NaN, 10));
    }
  });

  it('given by angles keeps them where the directions stay', () => {
    const [, , angles] = axes;
    if (angles === undefined) throw new Error('there are three');
    const left: AxisTriple = ['aft', 'left', 'up'];
    expect(convertRotor(rotor(angles), changeFromFormer(USUAL, NO_POSE, left), USUAL, left).axis).toBe(
      angles,
    );
  });
});
