import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type Account, AccountSum, addAccounts, scaleAccount, toNumbers } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { type Extent } from '@/lib/mass/declarations';
import { Placement, accountOfComponent, piecesOf } from '@/lib/mass/place';
import { radians } from '@/lib/units/convert';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';

/** Difference of two accounts as a share of the largest number of the second, mass, moments and second moments each by itself. */
function difference(a: Account, b: Account): number {
  const [p, q] = [toNumbers(a), toNumbers(b)];
  const part = (from: number, to: number): number => {
    const size = Math.max(...q.slice(from, to).map(Math.abs), 1e-300);
    return Math.max(...p.slice(from, to).map((value, i) => Math.abs(value - (q[from + i] ?? NaN)))) / size;
  };
  return Math.max(part(0, 1), part(1, 4), part(4, 10));
}

const airframe = geometry({ axes: ['aft', 'right', 'up'], lateralPlane: 0.25, reference: [12, 0.1, 1] });
const list = declarations({ axes: ['aft', 'right', 'up'] });

/** The mirror image of a row across lateral = plane, written out as a row of its own, by hand. */
function imageOf(row: Component, plane: number): Component {
  const [x, y, z] = row.position;
  const { yaw, pitch, roll } = row.orientation;
  return {
    ...row,
    position: [x, 2 * plane - y, z],
    moments: { ...row.moments, ixy: -row.moments.ixy, iyz: -row.moments.iyz },
    orientation: { yaw: -yaw, pitch, roll: -roll },
  };
}

describe('the account of a row', () => {
  it('of a mirrored pair is that of two rows written out', () => {
    fc.assert(
      fc.property(anyComponent, (row) => {
        const pair = accountOfComponent({ ...row, pair: true }, list, airframe);
        const one = accountOfComponent({ ...row, pair: false }, list, airframe);
        const other = accountOfComponent({ ...imageOf(row, 0.25), pair: false }, list, airframe);
        expect(difference(pair, addAccounts(one, other))).toBeLessThanOrEqual(4e-15);
      }),
    );
  });

  it('of a half list counts every row and its image, and a pair no more often', () => {
    fc.assert(
      fc.property(anyComponent, fc.constantFrom<Extent>('left-half', 'right-half'), (row, extent) => {
        const half = declarations({ axes: ['aft', 'right', 'up'], extent });
        const pair = accountOfComponent({ ...row, pair: true }, list, airframe);
        expect(accountOfComponent(row, half, airframe)).toEqual(pair);
        expect(piecesOf(row, half)).toBe(2 * row.quantity);
      }),
    );
  });

  it('of several pieces is that many times one piece', () => {
    fc.assert(
      fc.property(anyComponent, (row) => {
        const one = accountOfComponent({ ...row, quantity: 1 }, list, airframe);
        const all = accountOfComponent(row, list, airframe);
        expect(difference(all, scaleAccount(row.quantity, one))).toBeLessThanOrEqual(1e-15);
      }),
    );
  });

  it('mirrors across the airframe plane of symmetry, whatever the list frame', () => {
    // The list counts x to the left and is turned; by hand its piece at (2, 0, 0) is at y = -2 and its image at +2.
    const turned = declarations({ axes: ['left', 'up', 'aft'] });
    const frame = geometry({ axes: ['aft', 'right', 'up'] });
    const pair = accountOfComponent(aComponent({ mass: 3, position: [2, 0, 0], pair: true }), turned, frame);
    expect(pair.mass).toBe(6);
    expect(pair.first.map((part) => part + 0)).toEqual([0, 0, 0]);
    expect(pair.second.yy).toBe(24);
  });

  it('turns own moments by the component orientation first, then with the list', () => {
    // A rod along its own x, yawed by 90 degrees in the list: along list y. The list is turned by 90 about airframe x: along z.
    const row = aComponent({
      mass: 2,
      moments: diagonal([0, 3, 3]),
      orientation: { yaw: radians(90), pitch: 0, roll: 0 },
    });
    const posed = declarations({ pose: { origin: [0, 0, 0], yaw: 0, pitch: 0, roll: radians(90) } });
    const { second } = accountOfComponent(row, posed, geometry());
    expect([second.xx, second.yy, second.zz]).toEqual([0, 0, 3]);
  });

  it('is the same from a placement that is kept for many rows', () => {
    const placement = new Placement(list, airframe);
    fc.assert(
      fc.property(anyComponent, (row) => {
        expect(placement.account(row)).toEqual(accountOfComponent(row, list, airframe));
      }),
    );
  });
});

describe('accounts add', () => {
  const sumOf = (accounts: readonly Account[]): Account => {
    const sum = new AccountSum();
    for (const account of accounts) sum.add(account);
    return sum.account;
  };
  const accounts = fc
    .array(anyComponent, { minLength: 2, maxLength: 40 })
    .map((rows) => rows.map((row) => accountOfComponent(row, list, airframe)));

  it('to the same in any order', () => {
    fc.assert(
      fc.property(
        accounts.chain((some) =>
          fc.tuple(
            fc.constant(some),
            fc.shuffledSubarray(some, { minLength: some.length, maxLength: some.length }),
          ),
        ),
        ([some, shuffled]) => {
          expect(difference(sumOf(shuffled), sumOf(some))).toBeLessThanOrEqual(3e-16);
        },
      ),
    );
  });

  it('to the same when split into lists and joined again', () => {
    fc.assert(
      fc.property(accounts, fc.nat(), (some, at) => {
        const cut = at % some.length;
        const joined = sumOf([sumOf(some.slice(0, cut)), sumOf(some.slice(cut))]);
        expect(difference(joined, sumOf(some))).toBeLessThanOrEqual(1e-15);
      }),
    );
  });

  it('and give back what is taken away', () => {
    fc.assert(
      fc.property(accounts, (some) => {
        const sum = new AccountSum();
        for (const account of some) sum.add(account);
        const [first, ...rest] = some;
        if (first === undefined) return;
        sum.add(first, -1);
        const size = Math.max(...toNumbers(sumOf(some)).map(Math.abs));
        toNumbers(sum.account).forEach((value, i) =>
          expect(Math.abs(value - (toNumbers(sumOf(rest))[i] ?? NaN))).toBeLessThanOrEqual(1e-15 * size),
        );
      }),
    );
  });
});
