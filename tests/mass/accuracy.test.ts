import { describe, expect, it } from 'vitest';

import { NO_MOMENTS } from '@/lib/frames/products';
import { AccountSum, fromNumbers, toNumbers, toNumbersWithRest } from '@/lib/mass/account';
import { Placement, accountOfComponent } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { type Vec3 } from '@/lib/numerics/vec3';
import {
  type ExactPlace,
  bookedAbout,
  elevenDecades,
  errors,
  exactly,
  randomRows,
  roundingOfCoordinates,
} from '@/tests/support/exact-roll-up';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';
import { Rational } from '@/tests/support/rational';

const FAR: Vec3 = [10000, -10000, 10000];
const SEEDS = [1, 7, 1968];

/** Sizes, seeds, and whether own tensors soften the contrast of masses. */
const CASES = [2, 3, 30, 300].flatMap((count) =>
  SEEDS.flatMap((seed) => [true, false].map((points) => ({ count, seed, points }))),
);

describe('a roll-up of masses from 1e-6 to 1e5 kg against exact rational arithmetic', () => {
  it.each(CASES)('is right to 1e-14: $count rows, seed $seed, points $points', ({ count, seed, points }) => {
    const rows = randomRows(count, seed, { ...elevenDecades, points });
    const off = errors(bookedAbout(rows, [1, 0.5, -0.5]), rows);
    expect(off.mass).toBeLessThanOrEqual(2e-16);
    expect(off.tensor).toBeLessThanOrEqual(1e-14);
    expect(off.cg).toBeLessThanOrEqual(1e-14);
  });

  it.each(CASES)(
    'with the datum 10 km away is as right about any r0, and off by less than the rounding of the coordinates or the last digit of the result: $count rows, seed $seed, points $points',
    ({ count, seed, points }) => {
      const rows = randomRows(count, seed, { ...elevenDecades, points, datum: FAR });
      for (const reference of [
        [FAR[0] + 1, FAR[1] + 0.5, FAR[2] - 0.5],
        [0, 0, 0],
      ] as const) {
        const result = bookedAbout(rows, reference);
        const off = errors(result, rows);
        expect(off.tensor).toBeLessThanOrEqual(1e-14);
        expect(off.tensor).toBeLessThanOrEqual(Math.max(roundingOfCoordinates(rows, result), Number.EPSILON));
        // A coordinate of 10 km is itself rounded to 2e-12 m when the CG is stated from the datum.
        expect(off.cg).toBeLessThanOrEqual(4e-12);
      }
    },
  );

  it('is right to 1e-14 where the first row, about which a stateless roll-up is kept, weighs nothing beside the second', () => {
    const rows = [
      aComponent({ mass: 1e-6, position: [17.3, -4.1, 0.7] }),
      aComponent({ mass: 1e5, position: [0.3, 0.1, -0.2] }),
    ];
    const whole = new StatelessRollUp(declarations());
    for (const row of rows) whole.add(row);
    expect(errors(whole.result().basic, rows).tensor).toBeLessThanOrEqual(1e-14);
  });
});

describe('a roll-up with removals against exact rational arithmetic', () => {
  it.each(SEEDS)('is right to 1e-14, tensor norm-wise (rows %i)', (seed) => {
    const rows = randomRows(400, seed);
    const off = errors(bookedAbout(rows, [1, 0.5, -0.5]), rows);
    expect(off.mass).toBeLessThanOrEqual(2e-16);
    expect(off.tensor).toBeLessThanOrEqual(1e-14);
    expect(off.cg).toBeLessThanOrEqual(1e-14);
  });

  it.each(SEEDS)(
    'without a frame issue, about the first row, 10 km from the datum, too (rows %i)',
    (seed) => {
      const rows = randomRows(400, seed, { datum: FAR });
      const whole = new StatelessRollUp(declarations());
      for (const row of rows) whole.add(row);
      expect(errors(whole.result().basic, rows).tensor).toBeLessThanOrEqual(1e-14);
    },
  );

  it('of a list whose own frame is turned and 10 km from the datum is right to 1e-14', () => {
    const rows = randomRows(200, 3).map((row) => ({ ...row, moments: NO_MOMENTS }));
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
    expect(off.tensor).toBeLessThanOrEqual(1e-14);
    expect(off.cg).toBeLessThanOrEqual(4e-12);
  });

  it('does not get worse with a hundred times the rows', () => {
    const some = randomRows(60, 11);
    const many = Array.from({ length: 100 }, () => some).flat();
    const [few, all] = [bookedAbout(some, [1, 0, 0]), bookedAbout(many, [1, 0, 0])];
    const [a, b] = [properties(few).tensor, properties(all).tensor];
    for (const key of ['xx', 'yy', 'zz'] as const)
      expect(Math.abs(b[key] / a[key] / 100 - 1)).toBeLessThanOrEqual(1e-15);
  });
});

describe('subtotals', () => {
  const rows = randomRows(240, 5, { ...elevenDecades, points: true }).map((row, i) => ({
    ...row,
    group: `G${i % 12}`,
  }));
  const frame = geometry({ reference: [1, 0.5, -0.5] });
  const book = new SubtotalBook(new Placement(declarations(), frame));
  for (const row of rows) book.add(row);
  const parts = book.subtotals();

  it('add up to the same in any order', () => {
    const random = randomNumbers(99);
    const straight = properties(rollUp(parts, [], frame, NO_GROWTH).basic).tensor;
    for (let round = 0; round < 20; round += 1) {
      const mixed = parts
        .map((part) => ({ part, key: random() }))
        .sort((a, b) => a.key - b.key)
        .map(({ part }) => part);
      const tensor = properties(rollUp(mixed, [], frame, NO_GROWTH).basic).tensor;
      for (const key of ['xx', 'yy', 'zz'] as const)
        expect(Math.abs(tensor[key] / straight[key] - 1)).toBeLessThanOrEqual(2.3e-16);
    }
  });

  it('are the same bits whenever the same rows are booked', () => {
    const again = new SubtotalBook(new Placement(declarations(), frame));
    for (const row of rows) again.add(row);
    expect(again.subtotals()).toStrictEqual(parts);
  });

  it('keep their digits in storage as twenty numbers; as ten they lose those that a far r0 needs', () => {
    const far = randomRows(100, 4, { datum: FAR });
    const sum = new AccountSum();
    for (const row of far) sum.add(accountOfComponent(row, declarations(), geometry()));
    const stored = (numbers: readonly number[]) =>
      errors(resultOf(fromNumbers(JSON.parse(JSON.stringify(numbers)) as number[]), geometry()), far);
    expect(stored(toNumbersWithRest(sum.account)).tensor).toBeLessThanOrEqual(1e-14);
    expect(stored(toNumbers(sum.account)).tensor).toBeGreaterThan(1e-12);
  });
});

describe('the exact reference itself', () => {
  it('knows two masses on a rod: reduced mass times distance squared', () => {
    const rows = [aComponent({ mass: 3, position: [0, 0, 0] }), aComponent({ mass: 1, position: [4, 0, 0] })];
    const { tensor, cg } = exactly(rows);
    expect(tensor.map((part) => part.toNumber())).toEqual([0, 12, 12, 0, 0, 0]);
    expect(cg.map((part) => part.toNumber())).toEqual([1, 0, 0]);
  });

  it('finds the rounding of coordinates where rows moved 10 km away are compared with what they were', () => {
    const near = randomRows(300, 8, { ...elevenDecades, points: true, decades: [0, 1] });
    const far = near.map(({ position: [x, y, z], ...row }) => ({
      ...row,
      position: [FAR[0] + x, FAR[1] + y, FAR[2] + z] as const,
    }));
    const result = bookedAbout(far, FAR);
    const share = errors(result, near).tensor / roundingOfCoordinates(far, result);
    expect(share).toBeGreaterThan(0.3);
    expect(share).toBeLessThan(3);
  });
});
