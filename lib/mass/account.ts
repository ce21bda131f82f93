import { type AirframeTwice } from '@/lib/frames/pose';
import { type AirframeVec, type In } from '@/lib/frames/tags';
import { CompensatedSums } from '@/lib/numerics/sums';
import { type Sym3, ZERO_SYM, traceMinus } from '@/lib/numerics/sym3';
import { type Twice, addTwice, minusTwice, overTwice, timesTwice } from '@/lib/numerics/twice';
import { ZERO_VEC } from '@/lib/numerics/vec3';

/**
 * The ten additive numbers of any set of bodies about a fixed point r0, in airframe components: mass m (kg), first moment
 * p = Σ m (r - r0) (kg.m) and second moment Q = Σ [S + m (r - r0)(r - r0)ᵀ] (kg.m2), S = ∫ρρᵀdm of a body about its own CG.
 * It is the pseudo-inertia of Wensing, Kim and Slotine (2018), kept as numbers that simply add. Any sign, zero mass too.
 */
export interface Account {
  readonly mass: number;
  readonly first: AirframeVec;
  readonly second: In<'airframe', Sym3>;
  /**
   * What rounding left out of the ten numbers, in the order of `AccountNumbers`: with it they hold twice the digits, which a tensor
   * needs whose CG is far from r0 beside its size. Absent where it is not known.
   */
  readonly rest?: AccountNumbers;
}

/** The ten numbers in the order m; px, py, pz; Qxx, Qyy, Qzz, Qxy, Qxz, Qyz: how an account is stored. */
export type AccountNumbers = readonly [
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
];

const NO_REST: AccountNumbers = [0, 0, 0, 0, 0, 0, 0, 0, 0, 0];

export const NOTHING: Account = { mass: 0, first: ZERO_VEC, second: ZERO_SYM, rest: NO_REST };

export function toNumbers(a: Account): AccountNumbers {
  const { mass, first, second: q } = a;
  return [mass, first[0], first[1], first[2], q.xx, q.yy, q.zz, q.xy, q.xz, q.yz];
}

/** The ten numbers and, where it is known, what rounding left out of each: ten or twenty. */
export function toNumbersWithRest(a: Account): readonly number[] {
  return a.rest === undefined ? toNumbers(a) : [...toNumbers(a), ...a.rest];
}

// By index: taking a list apart by pattern is several times slower, and this is done for every row.
function tenOf(numbers: readonly number[]): AccountNumbers {
  const at = (i: number): number => numbers[i] ?? NaN;
  return [at(0), at(1), at(2), at(3), at(4), at(5), at(6), at(7), at(8), at(9)];
}

function accountOf(numbers: AccountNumbers, rest: AccountNumbers | undefined): Account {
  const mass = numbers[0];
  const first: AirframeVec = [numbers[1], numbers[2], numbers[3]];
  const second: Sym3 = {
    xx: numbers[4],
    yy: numbers[5],
    zz: numbers[6],
    xy: numbers[7],
    xz: numbers[8],
    yz: numbers[9],
  };
  return rest === undefined ? { mass, first, second } : { mass, first, second, rest };
}

/** @throws RangeError unless there are exactly ten finite numbers, or twenty with what rounding left out of them. */
export function fromNumbers(numbers: readonly number[]): Account {
  if ((numbers.length !== 10 && numbers.length !== 20) || !numbers.every(Number.isFinite))
    throw new RangeError(`An account is ten finite numbers, or twenty, not [${numbers.join(', ')}].`);
  return accountOf(tenOf(numbers), numbers.length === 20 ? tenOf(numbers.slice(10)) : undefined);
}

/** The account whose ten numbers stand in `numbers` from `at` on; for long arrays of trusted ones, unchecked. */
export function accountFrom(numbers: ArrayLike<number>, at: number): Account {
  const n = (i: number): number => numbers[at + i] ?? NaN;
  return {
    mass: n(0),
    first: [n(1), n(2), n(3)],
    second: { xx: n(4), yy: n(5), zz: n(6), xy: n(7), xz: n(8), yz: n(9) },
  };
}

/** The ten numbers, each with what rounding left out of it. */
function twicesOf(a: Account): Twice[] {
  const rest = a.rest ?? NO_REST;
  return toNumbers(a).map((number, i) => [number, rest[i] ?? NaN]);
}

function fromTwices(ten: readonly Twice[], restIsKnown: boolean): Account {
  const rest = restIsKnown ? tenOf(ten.map((part) => part[1])) : undefined;
  return accountOf(tenOf(ten.map((part) => part[0])), rest);
}

/** a + b: two sets of bodies about the same r0. */
export function addAccounts(a: Account, b: Account): Account {
  const other = twicesOf(b);
  const sum = twicesOf(a).map((part, i) => addTwice(part, other[i] ?? [NaN, NaN]));
  return fromTwices(sum, a.rest !== undefined && b.rest !== undefined);
}

/** k a: quantity, growth, or -1 to take away. */
export function scaleAccount(k: number, a: Account): Account {
  const product = twicesOf(a).map((part) => timesTwice([k, 0], part));
  return fromTwices(product, a.rest !== undefined);
}

/**
 * The same bodies carried along `by` (m), as one: r' = r + d, so p' = p + m d and Q' = Q + d pᵀ + p' dᵀ. It is how a translation acts on
 * the pseudo-inertia (Wensing, Kim and Slotine 2018).
 */
export function moveAccount(a: Account, by: AirframeVec): Account {
  const ten = twicesOf(a);
  const part = (i: number): Twice => ten[i] ?? [NaN, NaN];
  const d = by.map((k): Twice => [k, 0]) as [Twice, Twice, Twice];
  const before = [part(1), part(2), part(3)] as const;
  const after = [0, 1, 2].map((i) => addTwice(part(i + 1), timesTwice(part(0), d[i as 0 | 1 | 2])));
  const moved = (at: number, i: 0 | 1 | 2, j: 0 | 1 | 2): Twice =>
    addTwice(part(at), addTwice(timesTwice(d[i], before[j]), timesTwice(after[i] ?? [NaN, NaN], d[j])));
  const second = [
    moved(4, 0, 0),
    moved(5, 1, 1),
    moved(6, 2, 2),
    moved(7, 0, 1),
    moved(8, 0, 2),
    moved(9, 1, 2),
  ];
  return fromTwices([part(0), ...after, ...second], a.rest !== undefined);
}

/** The account of one body: its mass, its CG as seen from r0 to twice the precision, and its second moment S about its own CG. */
export function accountAt(mass: number, place: AirframeTwice, own: In<'airframe', Sym3>): Account {
  const m: Twice = [mass, 0];
  const [x, y, z] = place;
  const [px, py, pz] = [timesTwice(m, x), timesTwice(m, y), timesTwice(m, z)];
  const moved = (p: Twice, r: Twice, s: number): Twice => addTwice(timesTwice(p, r), [s, 0]);
  const xx = moved(px, x, own.xx);
  const yy = moved(py, y, own.yy);
  const zz = moved(pz, z, own.zz);
  const xy = moved(px, y, own.xy);
  const xz = moved(px, z, own.xz);
  const yz = moved(py, z, own.yz);
  return {
    mass,
    first: [px[0], py[0], pz[0]],
    second: { xx: xx[0], yy: yy[0], zz: zz[0], xy: xy[0], xz: xz[0], yz: yz[0] },
    rest: [0, px[1], py[1], pz[1], xx[1], yy[1], zz[1], xy[1], xz[1], yz[1]],
  };
}

/** The account of one body: its mass, its CG as seen from r0, and its second moment S about its own CG. */
export function accountOfBody(mass: number, [x, y, z]: AirframeVec, own: In<'airframe', Sym3>): Account {
  return accountAt(
    mass,
    [
      [x, 0],
      [y, 0],
      [z, 0],
    ],
    own,
  );
}

/** A body read back from its account. */
export interface Reading {
  readonly mass: number;
  /** CG as seen from r0, m. */
  readonly place: AirframeVec;
  /** S about the CG, kg.m2: positive semidefinite for anything real. */
  readonly second: In<'airframe', Sym3>;
  /** J = tr(S) 1 - S about the CG, kg.m2. */
  readonly tensor: In<'airframe', Sym3>;
}

/** What a difference of two sums of this size may hold and mean nothing, as a share of their size. */
const ROUNDING = 4 * Number.EPSILON;

/** The same with twice the digits: places that differ by less than 2^-44 of their distance from r0 are one place. */
const ROUNDING_WITH_REST = 2 ** -88;

/**
 * c = p/m, S = Q - p cᵀ, J = tr(S) 1 - S. Null when the mass is zero: then there is no CG to speak of. What is no more than the
 * rounding of that difference is zero, so that a point seen from afar has no moments.
 */
export function readAccount(a: Account): Reading | null {
  if (a.mass === 0) return null;
  const ten = twicesOf(a);
  const part = (i: number): Twice => ten[i] ?? [NaN, NaN];
  const m = part(0);
  const p = [part(1), part(2), part(3)] as const;
  const c = [overTwice(p[0], m), overTwice(p[1], m), overTwice(p[2], m)] as const;
  const moved = (i: 0 | 1 | 2, j: 0 | 1 | 2): Twice => timesTwice(p[i], c[j]);
  const sizes = [part(4), part(5), part(6), moved(0, 0), moved(1, 1), moved(2, 2)];
  const size = sizes.reduce((sum, [value]) => sum + Math.abs(value), 0);
  const rounding = size * (a.rest === undefined ? ROUNDING : ROUNDING_WITH_REST);
  const about = (at: number, i: 0 | 1 | 2, j: 0 | 1 | 2): number => {
    const [element] = addTwice(part(at), minusTwice(moved(i, j)));
    return Math.abs(element) <= rounding ? 0 : element;
  };
  const second: Sym3 = {
    xx: about(4, 0, 0),
    yy: about(5, 1, 1),
    zz: about(6, 2, 2),
    xy: about(7, 0, 1),
    xz: about(8, 0, 2),
    yz: about(9, 1, 2),
  };
  return { mass: a.mass, place: [c[0][0], c[1][0], c[2][0]], second, tensor: traceMinus(second) };
}

/** Adds accounts one after another, in any number and any order, with an error that does not grow with their number. */
export class AccountSum {
  readonly #sums = new CompensatedSums(10);
  #restIsKnown = true;

  /** Adds k a. */
  add(a: Account, k = 1): void {
    this.#sums.add(toNumbers(a), k, a.rest);
    if (a.rest === undefined) this.#restIsKnown = false;
  }

  get account(): Account {
    return accountOf(tenOf(this.#sums.values), this.#restIsKnown ? tenOf(this.#sums.rests) : undefined);
  }
}
