import { describe, expect, it } from 'vitest';

import { momentsOf } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { type ListPose } from '@/lib/mass/declarations';
import { type MassResult } from '@/lib/mass/result';
import { Placement } from '@/lib/mass/place';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { congruence, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';
import { Rational, ZERO } from '@/tests/support/rational';

/** Rows of an aircraft 40 m long: masses over five decades, full tensors, a tenth of them removals, some pieces several. */
function randomRows(count: number, datum: Vec3, seed: number): Component[] {
  const random = randomNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  return Array.from({ length: count }, (_, i) => {
    const size = between(0.01, 2);
    const edge = (): Vec3 => [between(-size, size), between(-size, size), between(-size, size)];
    const mass = 10 ** between(-2, 3);
    const sign = i > 0 && random() < 0.1 ? -1 : 1;
    const second = congruence([edge(), edge(), edge()], {
      xx: mass,
      yy: mass,
      zz: mass,
      xy: 0,
      xz: 0,
      yz: 0,
    });
    const m = momentsOf(traceMinus(second));
    return aComponent({
      item: `row ${i}`,
      mass: sign * mass * (sign < 0 ? 0.1 : 1),
      quantity: 1 + Math.floor(random() * 4),
      position: [datum[0] + between(-20, 20), datum[1] + between(-15, 15), datum[2] + between(-3, 3)],
      moments: {
        ixx: sign * m.ixx,
        iyy: sign * m.iyy,
        izz: sign * m.izz,
        ixy: sign * m.ixy,
        ixz: sign * m.ixz,
        iyz: sign * m.iyz,
      },
    });
  });
}

type Six = readonly [Rational, Rational, Rational, Rational, Rational, Rational];

/** Place of a row in the airframe, exactly. */
type ExactPlace = (row: Component) => readonly [Rational, Rational, Rational];

const asStated: ExactPlace = ({ position: [x, y, z] }) => [Rational.of(x), Rational.of(y), Rational.of(z)];

/** Mass, CG and tensor about the CG (elements xx yy zz xy xz yz) in exact arithmetic, straight from the definition. */
function exactly(
  rows: readonly Component[],
  placeOf: ExactPlace,
): { mass: Rational; cg: readonly Rational[]; tensor: Six } {
  const sum = (terms: readonly Rational[]): Rational => terms.reduce((a, b) => a.plus(b), ZERO);
  const bodies = rows.map((row) => ({
    row,
    pieces: Rational.of(row.quantity),
    mass: Rational.of(row.mass).times(Rational.of(row.quantity)),
    place: placeOf(row),
  }));
  const mass = sum(bodies.map((body) => body.mass));
  const mean = (k: 0 | 1 | 2): Rational => sum(bodies.map((body) => body.mass.times(body.place[k])));
  const moment = [mean(0), mean(1), mean(2)] as const;
  const about = (i: 0 | 1 | 2, j: 0 | 1 | 2): Rational =>
    sum(bodies.map((body) => body.mass.times(body.place[i]).times(body.place[j]))).minus(
      moment[i].times(moment[j]).over(mass),
    );
  const own = (key: keyof Component['moments']): Rational =>
    sum(bodies.map(({ row, pieces }) => pieces.times(Rational.of(row.moments[key]))));
  const [xx, yy, zz] = [about(0, 0), about(1, 1), about(2, 2)];
  return {
    mass,
    cg: moment.map((part) => part.over(mass)),
    tensor: [
      own('ixx').plus(yy).plus(zz),
      own('iyy').plus(xx).plus(zz),
      own('izz').plus(xx).plus(yy),
      own('ixy').plus(about(0, 1)).negative(),
      own('ixz').plus(about(0, 2)).negative(),
      own('iyz').plus(about(1, 2)).negative(),
    ],
  };
}

/** Errors against exact arithmetic: of mass, of the tensor (norm-wise, a share of it), and of the CG in metres. */
function errors(
  result: MassResult,
  rows: readonly Component[],
  placeOf: ExactPlace = asStated,
): { mass: number; tensor: number; cg: number } {
  const exact = exactly(rows, placeOf);
  const { cg, tensor } = properties(result);
  const off = (value: number, truth: Rational): number => Rational.of(value).minus(truth).toNumber();
  const { xx, yy, zz, xy, xz, yz } = tensor;
  const differences = [xx, yy, zz, xy, xz, yz].map((value, k) => off(value, exact.tensor[k] ?? ZERO));
  const norm = (six: readonly number[]): number =>
    Math.hypot(...six.slice(0, 3), ...six.slice(3).map((part) => Math.SQRT2 * part));
  return {
    mass: Math.abs(off(result.mass, exact.mass)) / Math.abs(exact.mass.toNumber()),
    tensor: norm(differences) / norm(exact.tensor.map((part) => part.toNumber())),
    cg: Math.hypot(...cg.map((part, k) => off(part, exact.cg[k] ?? ZERO))),
  };
}

function bookedAbout(rows: readonly Component[], reference: Vec3, pose?: ListPose): MassResult {
  const frame = geometry({ reference });
  const list = pose === undefined ? declarations() : declarations({ pose });
  const book = new SubtotalBook(new Placement(list, frame));
  for (const row of rows) book.add(row);
  return rollUp(book.subtotals(), [], frame, NO_GROWTH).basic;
}

const FAR: Vec3 = [10000, -10000, 10000];
const SEEDS = [1, 7, 1968];

describe('a roll-up against exact rational arithmetic', () => {
  it.each(SEEDS)('near the datum is right to 1e-14, tensor norm-wise (rows %i)', (seed) => {
    const rows = randomRows(400, [0, 0, 0], seed);
    const off = errors(bookedAbout(rows, [1, 0.5, -0.5]), rows);
    expect(off.mass).toBeLessThanOrEqual(2e-16);
    expect(off.tensor).toBeLessThanOrEqual(1e-14);
    expect(off.cg).toBeLessThanOrEqual(1e-14);
  });

  it.each(SEEDS)('with the datum 10 km away is right to 1e-12 (rows %i)', (seed) => {
    const rows = randomRows(400, FAR, seed);
    const reference: Vec3 = [FAR[0] + 1, FAR[1] + 0.5, FAR[2] - 0.5];
    const off = errors(bookedAbout(rows, reference), rows);
    expect(off.tensor).toBeLessThanOrEqual(1e-12);
    // A coordinate of 10 km is itself rounded to 2e-12 m when the CG is stated from the datum.
    expect(off.cg).toBeLessThanOrEqual(4e-12);
  });

  it('about the datum itself, 10 km away, would not be: the reason for a near reference point', () => {
    const rows = randomRows(400, FAR, 7);
    expect(errors(bookedAbout(rows, [0, 0, 0]), rows).tensor).toBeGreaterThan(1e-12);
  });

  it.each(SEEDS)('without a frame issue, about the first row, is right to 1e-12 (rows %i)', (seed) => {
    const rows = randomRows(400, FAR, seed);
    const whole = new StatelessRollUp(declarations());
    for (const row of rows) whole.add(row);
    expect(errors(whole.result().basic, rows).tensor).toBeLessThanOrEqual(1e-12);
  });

  it('of a list whose own frame is turned and 10 km from the datum is right to 1e-12', () => {
    const rows = randomRows(200, [0, 0, 0], 3).map((row) => ({
      ...row,
      moments: { ixx: 0, iyy: 0, izz: 0, ixy: 0, ixz: 0, iyz: 0 },
    }));
    // A right triangle of 3, 4, 5: its cosine and sine are exact fractions.
    const pose = { origin: FAR, yaw: Math.atan2(4, 3), pitch: 0, roll: 0 } as const;
    const [cos, sin] = [Rational.of(3).over(Rational.of(5)), Rational.of(4).over(Rational.of(5))];
    const placeOf: ExactPlace = ({ position }) => {
      const [x, y, z] = position.map((part) => Rational.of(part));
      const [ox, oy, oz] = FAR.map((part) => Rational.of(part));
      if (!x || !y || !z || !ox || !oy || !oz) throw new Error('A place has three parts.');
      return [
        ox.plus(cos.times(x)).minus(sin.times(y)),
        oy.plus(sin.times(x)).plus(cos.times(y)),
        oz.plus(z),
      ];
    };
    const off = errors(bookedAbout(rows, [FAR[0] + 1, FAR[1], FAR[2]], pose), rows, placeOf);
    expect(off.tensor).toBeLessThanOrEqual(1e-12);
    expect(off.cg).toBeLessThanOrEqual(4e-12);
  });

  it('does not get worse with a hundred times the rows', () => {
    const some = randomRows(60, [0, 0, 0], 11);
    const many = Array.from({ length: 100 }, () => some).flat();
    const [few, all] = [bookedAbout(some, [1, 0, 0]), bookedAbout(many, [1, 0, 0])];
    const [a, b] = [properties(few).tensor, properties(all).tensor];
    for (const key of ['xx', 'yy', 'zz'] as const)
      expect(Math.abs(b[key] / a[key] / 100 - 1)).toBeLessThanOrEqual(1e-14);
  });
});

describe('the exact reference itself', () => {
  it('knows two masses on a rod: reduced mass times distance squared', () => {
    const rows = [aComponent({ mass: 3, position: [0, 0, 0] }), aComponent({ mass: 1, position: [4, 0, 0] })];
    const { tensor, cg } = exactly(rows, asStated);
    expect(tensor.map((part) => part.toNumber())).toEqual([0, 12, 12, 0, 0, 0]);
    expect(cg.map((part) => part.toNumber())).toEqual([1, 0, 0]);
  });
});
