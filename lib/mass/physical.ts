import { type Moments, tensorOf } from '@/lib/frames/products';
import { eigenSym } from '@/lib/numerics/eigen';
import { type Sym3, halfTraceMinus, scaleSym, trace } from '@/lib/numerics/sym3';

/** A second moment matrix may be this share of its trace below zero before it counts as impossible. */
const RELATIVE_TOLERANCE = 1e-6;

export type Physicality = 'physical' | 'within-rounding' | 'impossible';

export interface PhysicalCheck {
  readonly verdict: Physicality;
  /** The least principal second moment, kg.m2: negative where nothing real can be like that. */
  readonly least: number;
  /** How far below zero `least` may be, kg.m2. */
  readonly tolerance: number;
}

/**
 * real? of the account algebra: S = ∫ρρᵀdm must be positive semidefinite, which is the same as the principal moments obeying the
 * triangle inequality. `rounding` is what the digits of the source can do to an eigenvalue of S, kg.m2.
 */
export function checkSecondMoment(second: Sym3, rounding = 0): PhysicalCheck {
  const least = eigenSym(second).values[0];
  const tolerance = Math.max(RELATIVE_TOLERANCE * Math.abs(trace(second)), rounding);
  if (least >= 0) return { verdict: 'physical', least, tolerance };
  // The decomposition itself rounds: a thin rod or plate has an exact zero that may come out as -1e-17 of the trace.
  const noise = 8 * Number.EPSILON * Math.abs(trace(second));
  if (least >= -noise) return { verdict: 'physical', least, tolerance };
  return { verdict: least >= -tolerance ? 'within-rounding' : 'impossible', least, tolerance };
}

/**
 * The same for a row's own moments: with negative mass the row takes something away, and what it takes away (-S) must be real.
 * `rounding` as in `checkSecondMoment`.
 */
export function checkOwnMoments(mass: number, moments: Moments, rounding = 0): PhysicalCheck {
  const second = halfTraceMinus(tensorOf(moments));
  return checkSecondMoment(mass < 0 ? scaleSym(-1, second) : second, rounding);
}

/**
 * True for negative mass with a positive moment of inertia: a removal states both with a minus sign. Moments up to `rounding`
 * (kg.m2) above zero, or 1e-6 of their sum, are let pass.
 */
export function removalHasPositiveMoments(mass: number, moments: Moments, rounding = 0): boolean {
  if (mass >= 0) return false;
  const diagonal = [moments.ixx, moments.iyy, moments.izz];
  const sum = diagonal.reduce((total, moment) => total + Math.abs(moment), 0);
  return Math.max(...diagonal) > Math.max(RELATIVE_TOLERANCE * sum, rounding);
}

export function hasOwnMoments(moments: Moments): boolean {
  return Object.values(moments).some((moment) => moment !== 0);
}
