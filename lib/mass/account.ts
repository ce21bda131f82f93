import { type AirframeVec, type In } from '@/lib/frames/tags';
import { CompensatedSum } from '@/lib/numerics/sums';
import { type Sym3, ZERO_SYM, addSym, outer, scaleSym, trace, traceMinus } from '@/lib/numerics/sym3';
import { ZERO_VEC, addVec, scaleVec } from '@/lib/numerics/vec3';

/**
 * The ten additive numbers of any set of bodies about a fixed point r0, in airframe components: mass m (kg), first moment
 * p = Σ m (r - r0) (kg.m) and second moment Q = Σ [S + m (r - r0)(r - r0)ᵀ] (kg.m2), S = ∫ρρᵀdm of a body about its own CG.
 * It is the pseudo-inertia of Wensing, Kim and Slotine (2018), kept as numbers that simply add. Any sign, zero mass too.
 */
export interface Account {
  readonly mass: number;
  readonly first: AirframeVec;
  readonly second: In<'airframe', Sym3>;
}

export const NOTHING: Account = { mass: 0, first: ZERO_VEC, second: ZERO_SYM };

/** a + b: two sets of bodies about the same r0. */
export function addAccounts(a: Account, b: Account): Account {
  return {
    mass: a.mass + b.mass,
    first: addVec(a.first, b.first),
    second: addSym(a.second, b.second),
  };
}

/** k a: quantity, growth, or -1 to take away. */
export function scaleAccount(k: number, a: Account): Account {
  return { mass: k * a.mass, first: scaleVec(k, a.first), second: scaleSym(k, a.second) };
}

/** The account of one body: its mass, its CG as seen from r0, and its second moment S about its own CG. */
export function accountOfBody(mass: number, place: AirframeVec, own: In<'airframe', Sym3>): Account {
  return { mass, first: scaleVec(mass, place), second: addSym(own, outer(place), mass) };
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

/** Q - m c cᵀ; what is no more than the rounding of that difference is zero, so that a point seen from afar has no moments. */
function aboutCentre(q: Sym3, mass: number, place: AirframeVec): Sym3 {
  const moved = scaleSym(mass, outer(place));
  const rounding = ROUNDING * (Math.abs(trace(q)) + Math.abs(trace(moved)));
  const { xx, yy, zz, xy, xz, yz } = addSym(q, moved, -1);
  const beyond = (element: number): number => (Math.abs(element) <= rounding ? 0 : element);
  return {
    xx: beyond(xx),
    yy: beyond(yy),
    zz: beyond(zz),
    xy: beyond(xy),
    xz: beyond(xz),
    yz: beyond(yz),
  };
}

/** c = p/m, S = Q - m c cᵀ, J = tr(S) 1 - S. Null when the mass is zero: then there is no CG to speak of. */
export function readAccount(a: Account): Reading | null {
  if (a.mass === 0) return null;
  const place: AirframeVec = [a.first[0] / a.mass, a.first[1] / a.mass, a.first[2] / a.mass];
  const second = aboutCentre(a.second, a.mass, place);
  return { mass: a.mass, place, second, tensor: traceMinus(second) };
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

export function toNumbers(a: Account): AccountNumbers {
  const { mass, first, second: q } = a;
  return [mass, first[0], first[1], first[2], q.xx, q.yy, q.zz, q.xy, q.xz, q.yz];
}

/** @throws RangeError unless there are exactly ten finite numbers. */
export function fromNumbers(numbers: readonly number[]): Account {
  if (numbers.length !== 10 || !numbers.every(Number.isFinite))
    throw new RangeError(`An account is ten finite numbers, not [${numbers.join(', ')}].`);
  const [mass = 0, px = 0, py = 0, pz = 0, xx = 0, yy = 0, zz = 0, xy = 0, xz = 0, yz = 0] = numbers;
  return { mass, first: [px, py, pz], second: { xx, yy, zz, xy, xz, yz } };
}

/** Adds accounts one after another, in any number and any order, with an error that does not grow with their number. */
export class AccountSum {
  readonly #sums = Array.from({ length: 10 }, () => new CompensatedSum());

  /** Adds k a. */
  add(a: Account, k = 1): void {
    const numbers = toNumbers(a);
    this.#sums.forEach((sum, i) => {
      const number = numbers[i] ?? 0;
      if (k === 1) sum.add(number);
      else sum.addProduct(k, number);
    });
  }

  get account(): Account {
    return fromNumbers(this.#sums.map((sum) => sum.value));
  }
}
