import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type Account, AccountSum, moveAccount } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { contributionOf, leverOf, type Whole, wholeOf } from '@/lib/mass/contributions/contribution';
import { accountOfPart, movePart, withInstead, without } from '@/lib/mass/contributions/effects';
import { TEN, type TenNumbers, tenOf } from '@/lib/mass/contributions/ten';
import { Largest } from '@/lib/mass/contributions/top';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { addVec, type Vec3 } from '@/lib/numerics/vec3';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';
import { box, rod, solidSphere } from '@/tests/references/solids';

const aircraft = geometry({
  axes: ['aft', 'right', 'up'],
  reference: [12, 0, 1],
  incidence: 0.02,
  lateralPlane: 0.1,
});
const placement = new Placement(declarations({ axes: ['aft', 'right', 'up'] }), aircraft);
const plain = new Placement(declarations(), geometry());

function summed(accounts: readonly Account[]): Account {
  const sum = new AccountSum();
  for (const account of accounts) sum.add(account);
  return sum.account;
}

function wholeIn(account: Account, frame: AirframeGeometry): Whole {
  const whole = wholeOf(account, frame);
  if (whole === null) throw new Error('There is no whole without mass.');
  return whole;
}

function numbersOf(account: Account, frame: AirframeGeometry): TenNumbers {
  const ten = tenOf(account, frame);
  if (ten === null) throw new Error('There are no ten numbers without mass.');
  return ten;
}

/** Each of the ten, as a share of the size of its kind: the mass, 30 m, the largest moment or the mass at 1 m. */
function expectClose(a: TenNumbers, b: TenNumbers, within: number): void {
  const moment = Math.max(Math.abs(b.ixx), Math.abs(b.iyy), Math.abs(b.izz), b.mass);
  for (const name of TEN) {
    const size = name === 'mass' ? b.mass : name.length === 1 ? 30 : moment;
    expect(Math.abs(a[name] - b[name]) / size, name).toBeLessThan(within);
  }
}

const within = (limit: number) => fc.double({ min: -limit, max: limit, noNaN: true });
const someRows = fc.array(anyComponent, { minLength: 2, maxLength: 25 });

describe('the contributions of the parts', () => {
  it('add up to the mass and to the whole tensor, and the levers to nothing', () => {
    fc.assert(
      fc.property(someRows, (rows) => {
        const accounts = rows.map((row) => placement.account(row));
        const total = summed(accounts);
        const whole = wholeIn(total, aircraft);
        const parts = accounts.map((account) => contributionOf(account, whole));
        const ten = numbersOf(total, aircraft);
        const sums = Object.fromEntries(
          TEN.map((name) => [name, parts.reduce((sum, part) => sum + part[name], 0)]),
        ) as TenNumbers;
        expectClose(sums, { ...ten, x: 0, y: 0, z: 0 }, 1e-12);
      }),
    );
  });

  it('add up to the place of the CG from whatever point their levers are counted', () => {
    fc.assert(
      fc.property(someRows, fc.tuple(within(50), within(50), within(50)), (rows, o) => {
        const accounts = rows.map((row) => placement.account(row));
        const whole = wholeIn(summed(accounts), aircraft);
        const sum = accounts
          .map((account) => leverOf(account, whole, o))
          .reduce<Vec3>((all, lever) => addVec(all, lever), [0, 0, 0]);
        sum.forEach((value, k) => expect(value).toBeCloseTo((whole.cg[k] ?? NaN) - (o[k] ?? NaN), 10));
      }),
    );
  });

  it('of two equal point masses are m d² each: closed form of the dumbbell', () => {
    // Two points of mass m at ±d along y: Ixx = Izz = 2 m d², Iyy = 0. Common practice, from the definition ∫(y² + z²) dm.
    const [a, b] = [3, -3].map((y) => plain.account(aComponent({ mass: 5, position: [0, y, 0] })));
    const whole = wholeIn(summed([a, b] as Account[]), geometry());
    expect(contributionOf(a as Account, whole)).toEqual({
      mass: 5,
      x: 0,
      y: 1.5,
      z: 0,
      ixx: 45,
      iyy: 0,
      izz: 45,
      ixy: 0,
      ixz: 0,
      iyz: 0,
    });
  });

  it('carry products as positive integrals: a part behind and above, and one ahead and below, have Ixz above zero', () => {
    // Body axes x forward, z down: behind and above is x < 0, z < 0, so ∫ x z dm > 0. From the definition.
    const parts = [
      plain.account(aComponent({ mass: 2, position: [-4, 0, -3] })),
      plain.account(aComponent({ mass: 2, position: [4, 0, 3] })),
    ];
    const whole = wholeIn(summed(parts), geometry());
    for (const part of parts) expect(contributionOf(part, whole).ixz).toBeCloseTo(24, 12);
  });
});

describe('a part removed', () => {
  it('leaves what a roll-up without its row gives', () => {
    fc.assert(
      fc.property(someRows, (rows) => {
        const [first, ...others] = rows.map((row) => placement.account(row));
        if (first === undefined) return;
        const rest = summed(others);
        const left = without(summed([first, ...others]), first);
        expectClose(numbersOf(left, aircraft), numbersOf(rest, aircraft), 1e-11);
      }),
    );
  });

  it('leaves the box of a box with a ball beside it, to the last digit', () => {
    // Closed forms of a box and of a sphere: tests/references/solids.ts, C1.
    const boxed = plain.account(
      aComponent({ mass: 12, position: [7, -2, 1], moments: diagonal(box(2, 3, 4), 12) }),
    );
    const ball = plain.account(
      aComponent({ mass: 40, position: [-6, 5, 2], moments: diagonal(solidSphere(1.5), 40) }),
    );
    const left = numbersOf(without(summed([boxed, ball]), ball), geometry());
    expectClose(
      left,
      { mass: 12, x: 7, y: -2, z: 1, ixx: 25, iyy: 20, izz: 13, ixy: 0, ixz: 0, iyz: 0 },
      1e-15,
    );
  });

  it('leaves no ten numbers when it was all there was', () => {
    const only = plain.account(aComponent({ mass: 3 }));
    expect(tenOf(without(only, only), geometry())).toBeNull();
  });
});

describe('a part moved', () => {
  const anyMove = fc.tuple(within(8), within(8), within(8)) as fc.Arbitrary<Vec3>;

  it('gives what a roll-up with its row at the new place gives, a pair as a pair', () => {
    fc.assert(
      fc.property(someRows, anyMove, (rows, by) => {
        const [first, ...others] = rows as [Component, ...Component[]];
        const part = placement.parts(first);
        const total = summed(rows.map((row) => placement.account(row)));
        const there = { ...first, position: addVec(first.position, by) };
        const rolledUp = summed([there, ...others].map((row) => placement.account(row)));
        const moved = withInstead(total, part, movePart(part, by, placement.lateral));
        expectClose(numbersOf(moved, aircraft), numbersOf(rolledUp, aircraft), 1e-11);
      }),
    );
  });

  it('shifts the CG by m d / M and nothing of the mass', () => {
    const rows = [
      aComponent({ mass: 30, position: [1, 0, 0] }),
      aComponent({ mass: 10, position: [9, 0, 0] }),
    ];
    const total = summed(rows.map((row) => plain.account(row)));
    const part = plain.parts(rows[1] as Component);
    const moved = numbersOf(withInstead(total, part, movePart(part, [2, -4, 8], 1)), geometry());
    expect([moved.mass, moved.x, moved.y, moved.z]).toEqual([40, 3.5, -1, 2]);
  });

  it('along from its middle to its end turns the rod about its middle into the rod about its end', () => {
    // Young and Freedman, University Physics, problem 9.31: 2.5 kg and 0.75 m, 0.117 kg.m2 about the middle, 0.469 about an end.
    const about = rod.mass * (rod.length ** 2 / 12);
    const middle = plain.account(
      aComponent({ mass: rod.mass, moments: { ixx: 0, iyy: about, izz: about, ixy: 0, ixz: 0, iyz: 0 } }),
    );
    const heavy = plain.account(aComponent({ mass: 1e18 }));
    const fixed = wholeIn(heavy, geometry());
    expect(contributionOf(middle, fixed).izz).toBeCloseTo(rod.aboutCentre, 3);
    expect(contributionOf(moveAccount(middle, [rod.length / 2, 0, 0]), fixed).izz).toBeCloseTo(
      rod.aboutEnd,
      3,
    );
  });

  it('and moved back is where it was', () => {
    fc.assert(
      fc.property(anyComponent, anyMove, (row, by) => {
        const part = placement.parts(row);
        const back: Vec3 = [-by[0], -by[1], -by[2]];
        const again = movePart(movePart(part, by, 1), back, 1);
        expectClose(
          numbersOf(accountOfPart(again), aircraft),
          numbersOf(placement.account(row), aircraft),
          1e-13,
        );
      }),
    );
  });
});

describe('the largest of many', () => {
  it('are those that a sort of all of them puts first, without regard to sign', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -50, max: 50 }), { maxLength: 200 }), (weights) => {
        const largest = new Largest<number>(7);
        weights.forEach((weight, index) => largest.add(weight, index));
        const sorted = weights
          .map((weight, index) => ({ weight: Math.abs(weight), index }))
          .sort((a, b) => b.weight - a.weight || a.index - b.index)
          .slice(0, 7)
          .map(({ index }) => index);
        expect(largest.all()).toEqual(sorted);
      }),
    );
  });
});
