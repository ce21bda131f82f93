import { describe, expect, it } from 'vitest';

import { AccountSum } from '@/lib/mass/account';
import { accountOfComponent } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { fromSi, toSi } from '@/lib/units/convert';
import { ADDED_TO_LIMIT, ALTERATION, SHIFT, SHIFT_TO_LIMIT } from '@/tests/references/balance';
import { GTM_BALANCE } from '@/tests/references/gtm';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';

const AXES = ['aft', 'right', 'up'] as const;
const frame = geometry({ axes: AXES, reference: [1, 0, 0] });
const list = declarations({ axes: AXES, massUnit: 'lb', lengthUnit: 'in' });

/** Weight, lb, and CG aft of the datum, in, of weights at stations: what the roll-up makes of them. */
function balanced(weights: readonly (readonly [pounds: number, inches: number])[]) {
  const sum = new AccountSum();
  for (const [pounds, inches] of weights)
    sum.add(
      accountOfComponent(
        aComponent({ mass: toSi(pounds, 'lb'), position: [toSi(inches, 'in'), 0, 0] }),
        list,
        frame,
      ),
    );
  const result = resultOf(sum.account, frame);
  return { weight: fromSi(result.mass, 'lb'), cg: fromSi(properties(result).cg[0], 'in') };
}

describe('worked examples of weight and balance (FAA handbook family)', () => {
  it('a weight moved aft moves the CG as printed (D4)', () => {
    const { weight, moment, moved, from, to, cg } = SHIFT;
    const found = balanced([
      [weight, moment / weight],
      [-moved, from],
      [moved, to],
    ]);
    expect(found.weight).toBeCloseTo(weight, 9);
    expect(found.cg).toBeCloseTo(cg, 9);
  });

  it('a weight moved forward brings the CG to its limit (D5)', () => {
    const { weight, cg, from, to, moved, limit } = SHIFT_TO_LIMIT;
    const found = balanced([
      [weight, cg],
      [-moved, from],
      [moved, to],
    ]);
    expect(found.cg).toBeCloseTo(limit, 9);
  });

  it.each(ADDED_TO_LIMIT)('$added lb added bring the CG to its limit ($name)', (example) => {
    const { weight, cg, arm, limit, added, exact } = example;
    const found = (pounds: number) =>
      balanced([
        [weight, cg],
        [pounds, arm],
      ]);
    expect(Number(exact.toPrecision(4))).toBeCloseTo(added, 1);
    expect(found(exact).cg).toBeCloseTo(limit, 7);
    expect(found(exact).weight).toBeCloseTo(weight + exact, 9);
  });

  it('an alteration with a removal and three additions has the printed weight and CG (D8)', () => {
    const { weight, moment, changes, newWeight, newMoment, cg, exact } = ALTERATION;
    const found = balanced([[weight, moment / weight], ...changes]);
    expect(found.weight).toBeCloseTo(newWeight, 9);
    expect(found.weight * found.cg).toBeCloseTo(newMoment, 6);
    expect(found.cg).toBeCloseTo(exact, 6);
    expect(Number(found.cg.toFixed(2))).toBe(cg);
  });
});

describe('the CG in per cent of the chord', () => {
  it('of the GTM is the 21.99 that its file prints, from its station and chord', () => {
    const { cgFeet, leadingEdgeFeet, chordFeet, percent } = GTM_BALANCE;
    const feet = (value: number): number => toSi(value, 'ft');
    const model = geometry({
      axes: ['forward', 'right', 'down'],
      lemac: [feet(-leadingEdgeFeet), 0, 0],
      mac: feet(chordFeet),
    });
    const [x, y, z] = cgFeet;
    const row = aComponent({ mass: 20, position: [feet(x), feet(y), feet(z)] });
    const found = properties(resultOf(accountOfComponent(row, declarations(), model), model));
    expect(found.percentMac).toBeCloseTo(percent, 2);
  });
});
