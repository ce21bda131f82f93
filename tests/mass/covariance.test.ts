import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { momentsOf, tensorOf } from '@/lib/frames/products';
import {
  type Account,
  AccountSum,
  NOTHING,
  accountOfBody,
  addAccounts,
  readAccount,
  scaleAccount,
  toNumbers,
} from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { accountOfComponent } from '@/lib/mass/place';
import { principalOf } from '@/lib/mass/principal';
import { resultOf } from '@/lib/mass/result';
import { eigenSym } from '@/lib/numerics/eigen';
import { type Mat3, applyMat, determinant, multiply } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import {
  type Sym3,
  addSym,
  congruence,
  halfTraceMinus,
  outer,
  scaleSym,
  trace,
  traceMinus,
} from '@/lib/numerics/sym3';
import { type Vec3, dotVec, normVec, scaleVec, subVec } from '@/lib/numerics/vec3';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

/*
 * What must hold of any set of bodies, whatever their numbers: first principles of rigid bodies, no table behind them.
 */

const frame = geometry();
const list = declarations();

const bodies = fc.array(
  anyComponent.map((row) => ({ ...row, pair: false, counting: 'counted' as const })),
  { minLength: 1, maxLength: 12 },
);
const angle = fc.double({ min: -3, max: 3, noNaN: true });
const turn: fc.Arbitrary<Mat3> = fc.tuple(angle, angle, angle).map(([a, b, c]) => rotation(a, b, c));
/** A rotation, or one after a reflection. */
const orthogonal: fc.Arbitrary<Mat3> = fc.tuple(turn, fc.boolean()).map(([r, isMirrored]) =>
  isMirrored
    ? multiply(r, [
        [1, 0, 0],
        [0, -1, 0],
        [0, 0, 1],
      ])
    : r,
);

function accountOf(rows: readonly Component[]): Account {
  const sum = new AccountSum();
  for (const row of rows) sum.add(accountOfComponent(row, list, frame));
  return sum.account;
}

function read(account: Account) {
  const reading = readAccount(account);
  if (reading === null) throw new Error('no mass');
  return reading;
}

/** The same bodies after r' = R r + t, written out as bodies in body axes: the list's own path is not used. */
function moved(rows: readonly Component[], r: Mat3, t: Vec3): Account {
  const sum = new AccountSum();
  for (const row of rows) {
    const { mass, place, second } = read(accountOfComponent({ ...row, quantity: 1 }, list, frame));
    const [x, y, z] = applyMat(r, place);
    const at: Vec3 = [x + t[0], y + t[1], z + t[2]];
    sum.add(accountOfBody(mass, at, congruence(r, second)), row.quantity);
  }
  return sum.account;
}

const KEYS = ['xx', 'yy', 'zz', 'xy', 'xz', 'yz'] as const;

function apart(a: Sym3, b: Sym3, size: number): number {
  return Math.max(...KEYS.map((key) => Math.abs(a[key] - b[key]))) / size;
}

const asMatrix = ({ xx, yy, zz, xy, xz, yz }: Sym3): Mat3 => [
  [xx, xy, xz],
  [xy, yy, yz],
  [xz, yz, zz],
];

/** What a tensor's rounding is a share of: all of Q, of bodies that are not smaller than 0.1 mm. */
const sizeOf = ({ mass, second }: Account): number => trace(second) + 1e-8 * mass;

describe('a rotation or a reflection of all bodies together', () => {
  it('takes the CG and the tensor along: c’ = R c + t, J’ = R J Rᵀ', () => {
    fc.assert(
      fc.property(bodies, orthogonal, fc.tuple(angle, angle, angle), (rows, r, t) => {
        const before = read(accountOf(rows));
        const account = moved(rows, r, t);
        const after = read(account);
        expect(Math.abs(after.mass - before.mass)).toBeLessThanOrEqual(1e-15 * before.mass);
        const expected = applyMat(r, before.place).map((part, k) => part + (t[k] ?? NaN));
        after.place.forEach((part, k) => expect(Math.abs(part - (expected[k] ?? NaN))).toBeLessThan(1e-13));
        expect(apart(after.tensor, congruence(r, before.tensor), sizeOf(account))).toBeLessThanOrEqual(1e-14);
      }),
    );
  });

  it('leaves trace, determinant and principal moments', () => {
    fc.assert(
      fc.property(bodies, orthogonal, fc.tuple(angle, angle, angle), (rows, r, t) => {
        const [account, other] = [accountOf(rows), moved(rows, r, t)];
        const [a, b] = [read(account).tensor, read(other).tensor];
        const size = sizeOf(account) + sizeOf(other);
        expect(Math.abs(trace(a) - trace(b))).toBeLessThanOrEqual(1e-14 * size);
        const change = determinant(asMatrix(a)) - determinant(asMatrix(b));
        expect(Math.abs(change)).toBeLessThanOrEqual(1e-14 * size ** 3);
        const [p, q] = [eigenSym(a).values, eigenSym(b).values];
        p.forEach((moment, k) => expect(Math.abs(moment - (q[k] ?? NaN))).toBeLessThanOrEqual(1e-14 * size));
      }),
    );
  });

  it('leaves the shown principal moments and turns their axes with the bodies', () => {
    fc.assert(
      fc.property(bodies, turn, (rows, r) => {
        const account = accountOf(rows);
        const { tensor } = read(account);
        const { moments, axes } = principalOf(congruence(r, tensor));
        const size = sizeOf(account);
        const expected = eigenSym(tensor).values;
        [...moments]
          .sort((a, b) => a - b)
          .forEach((moment, k) => expect(Math.abs(moment - (expected[k] ?? NaN))).toBeLessThan(1e-13 * size));
        expect(determinant(axes)).toBeCloseTo(1, 12);
        // Each axis, turned back, is an axis of the tensor that was not turned: J e = λ e.
        axes.forEach((axis, k) => {
          const back: Vec3 = [
            r[0][0] * axis[0] + r[1][0] * axis[1] + r[2][0] * axis[2],
            r[0][1] * axis[0] + r[1][1] * axis[1] + r[2][1] * axis[2],
            r[0][2] * axis[0] + r[1][2] * axis[1] + r[2][2] * axis[2],
          ];
          const off = subVec(applyMat(asMatrix(tensor), back), scaleVec(moments[k] ?? NaN, back));
          expect(normVec(off)).toBeLessThan(1e-12 * size);
        });
      }),
    );
  });
});

describe('scaling', () => {
  it('of all masses scales mass and tensor and leaves the CG', () => {
    fc.assert(
      fc.property(bodies, fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (rows, k) => {
        const account = accountOf(rows);
        const [before, after] = [read(account), read(scaleAccount(k, account))];
        expect(Math.abs(after.mass - k * before.mass)).toBeLessThanOrEqual(1e-15 * k * before.mass);
        expect(normVec(subVec(after.place, before.place))).toBeLessThan(1e-13);
        expect(apart(after.tensor, scaleSym(k, before.tensor), k * sizeOf(account))).toBeLessThanOrEqual(
          1e-15,
        );
      }),
    );
  });

  it('of all lengths by k scales the CG by k and the tensor by k²', () => {
    fc.assert(
      fc.property(bodies, fc.double({ min: 0.01, max: 100, noNaN: true }), (rows, k) => {
        const scaled = rows.map((row) => ({
          ...row,
          position: scaleVec(k, row.position),
          moments: momentsOf(scaleSym(k * k, tensorOf(row.moments))),
        }));
        const account = accountOf(rows);
        const [before, after] = [read(account), read(accountOf(scaled))];
        expect(normVec(subVec(after.place, scaleVec(k, before.place)))).toBeLessThan(1e-13 * k);
        expect(
          apart(after.tensor, scaleSym(k * k, before.tensor), k * k * sizeOf(account)),
        ).toBeLessThanOrEqual(1e-14);
      }),
    );
  });
});

describe('a body cut into pieces', () => {
  /** Two pieces of a body, d apart: they have what it has less m₁m₂/m d dᵀ of their distance. */
  const pieces = fc
    .tuple(anyComponent, fc.double({ min: 0.1, max: 0.9, noNaN: true }), turn)
    .map(([row, share, r]) => {
      const whole = aComponent({
        mass: row.mass,
        position: row.position,
        moments: momentsOf(congruence(r, tensorOf(row.moments))),
      });
      const second = halfTraceMinus(tensorOf(whole.moments));
      const { values, vectors } = eigenSym(second);
      // Apart along the axis of most S by half of what that allows.
      const axis: Vec3 = vectors[2];
      const most = values[2];
      const distance = Math.sqrt(most / 2 / (share * (1 - share) * row.mass));
      const d = scaleVec(distance, axis);
      const left = addSym(second, scaleSym(share * (1 - share) * row.mass, outer(d)), -1);
      const piece = (part: number, at: number): Component =>
        aComponent({
          ...whole,
          mass: part * row.mass,
          position: [
            whole.position[0] + at * d[0],
            whole.position[1] + at * d[1],
            whole.position[2] + at * d[2],
          ],
          moments: momentsOf(traceMinus(scaleSym(part, left))),
        });
      return { whole, parts: [piece(share, 1 - share), piece(1 - share, -share)] };
    });

  it('is the body again when they are added back', () => {
    fc.assert(
      fc.property(pieces, ({ whole, parts }) => {
        const [one, two] = [accountOf([whole]), accountOf(parts)];
        const [a, b] = [read(one), read(two)];
        expect(Math.abs(a.mass - b.mass)).toBeLessThanOrEqual(1e-15 * a.mass);
        expect(normVec(subVec(a.place, b.place))).toBeLessThan(1e-13);
        expect(apart(b.tensor, a.tensor, sizeOf(one))).toBeLessThanOrEqual(1e-14);
      }),
    );
  });

  it('leaves the other when one is taken away', () => {
    fc.assert(
      fc.property(pieces, ({ whole, parts: [first, second] }) => {
        if (first === undefined || second === undefined) throw new Error('There are two pieces.');
        const left = read(addAccounts(accountOf([whole]), scaleAccount(-1, accountOf([first]))));
        const expected = read(accountOf([second]));
        expect(Math.abs(left.mass - expected.mass)).toBeLessThanOrEqual(1e-14 * whole.mass);
        const size = sizeOf(accountOf([whole]));
        expect(apart(left.tensor, expected.tensor, size)).toBeLessThanOrEqual(1e-13);
      }),
    );
  });
});

describe('sums of bodies', () => {
  it('do not depend on the order', () => {
    fc.assert(
      fc.property(
        bodies.chain((rows) =>
          fc.tuple(
            fc.constant(rows),
            fc.shuffledSubarray(rows, { minLength: rows.length, maxLength: rows.length }),
          ),
        ),
        ([rows, shuffled]) => {
          const account = accountOf(rows);
          const [a, b] = [read(account), read(accountOf(shuffled))];
          expect(Math.abs(a.mass - b.mass)).toBeLessThanOrEqual(3e-16 * a.mass);
          expect(apart(a.tensor, b.tensor, sizeOf(account))).toBeLessThanOrEqual(3e-16);
        },
      ),
    );
  });

  it('are undone by removals, to nothing', () => {
    fc.assert(
      fc.property(bodies, (rows) => {
        const sum = new AccountSum();
        for (const row of rows) sum.add(accountOfComponent(row, list, frame));
        for (const row of [...rows].reverse()) {
          const { moments, mass } = row;
          const away = { ...row, mass: -mass, moments: momentsOf(scaleSym(-1, tensorOf(moments))) };
          sum.add(accountOfComponent(away, list, frame));
        }
        const before = toNumbers(accountOf(rows)).map(Math.abs);
        // Twice the digits of a double are kept: nothing is left but what falls below the least double.
        const least = 1e-28 * Math.max(...before) + 1e-300;
        for (const number of toNumbers(sum.account)) expect(Math.abs(number)).toBeLessThanOrEqual(least);
      }),
    );
  });

  it('have their CG within the bodies’ CGs, along every direction', () => {
    fc.assert(
      fc.property(bodies, fc.tuple(angle, angle, angle), (rows, direction) => {
        const { place } = read(accountOf(rows));
        const along = rows.map((row) => dotVec(row.position, direction));
        const at = dotVec(place, direction);
        expect(at).toBeGreaterThanOrEqual(Math.min(...along) - 1e-12 * 60);
        expect(at).toBeLessThanOrEqual(Math.max(...along) + 1e-12 * 60);
      }),
    );
  });

  it('have about any point at least the inertia of each of them', () => {
    fc.assert(
      fc.property(bodies, (rows) => {
        const whole = accountOf(rows);
        for (const row of rows) {
          const rest = addSym(whole.second, accountOf([row]).second, -1);
          expect(eigenSym(rest).values[0]).toBeGreaterThanOrEqual(-1e-14 * trace(whole.second));
        }
      }),
    );
  });

  it('of none are nothing, and nothing has no CG', () => {
    expect(accountOf([])).toEqual(NOTHING);
    expect(readAccount(accountOf([]))).toBeNull();
    expect(resultOf(NOTHING, frame).properties).toBeNull();
  });
});

describe('a sign of the products', () => {
  const off = fc
    .tuple(fc.double({ min: 0.3, max: 3, noNaN: true }), fc.boolean())
    .map(([size, isNegative]) => (isNegative ? -size : size));

  it('turned for all three, or for one where no product is zero, changes the principal moments', () => {
    fc.assert(
      fc.property(off, off, off, (xy, xz, yz) => {
        const tensor = { xx: 9, yy: 10, zz: 11, xy, xz, yz };
        const size = trace(tensor);
        const moments = (sym: Sym3): readonly number[] => eigenSym(sym).values;
        // The determinant changes by 4 xy xz yz when one or all three signs turn.
        const differ = (sym: Sym3): number =>
          Math.max(...moments(sym).map((value, k) => Math.abs(value - (moments(tensor)[k] ?? NaN)))) / size;
        for (const turned of [{ xy: -xy }, { xz: -xz }, { yz: -yz }, { xy: -xy, xz: -xz, yz: -yz }])
          expect(differ({ ...tensor, ...turned })).toBeGreaterThan(1e-6);
        // Two signs are a reflection of two axes, and change nothing.
        expect(differ({ ...tensor, xy: -xy, xz: -xz })).toBeLessThan(1e-13);
      }),
    );
  });
});
