import { type BodyVec } from '@/lib/frames/tags';
import { type Moments } from '@/lib/frames/products';
import { type Principal } from '@/lib/mass/principal';
import { type Vec3 } from '@/lib/numerics/vec3';

import { RESULTS } from './uncertainty-of';

/** Covariances in the order of `RESULTS`. */
type Covariance = readonly (readonly number[])[];

/** σ of a result that changes with mass, CG and moments as `weights` say, those left out not at all. */
function sigmaOf(
  weights: Readonly<Partial<Record<(typeof RESULTS)[number], number>>>,
  covariance: Covariance,
): number {
  let variance = 0;
  RESULTS.forEach((p, i) =>
    RESULTS.forEach((q, j) => {
      variance += (weights[p] ?? 0) * (weights[q] ?? 0) * (covariance[i]?.[j] ?? NaN);
    }),
  );
  // Rounding may leave a certain result just below zero.
  return Math.sqrt(Math.max(variance, 0));
}

/**
 * σ of the radii of gyration about the body axes, m, to first order: k = sqrt(I/m), so δk = k/2 (δI/I - δm/m). Null where a moment is
 * zero or less.
 */
export function radiiSigma(
  mass: number,
  { ixx, iyy, izz }: Pick<Moments, 'ixx' | 'iyy' | 'izz'>,
  covariance: Covariance,
): Vec3 | null {
  if (!(mass > 0) || Math.min(ixx, iyy, izz) <= 0) return null;
  const along = (name: 'ixx' | 'iyy' | 'izz', moment: number): number => {
    const half = Math.sqrt(moment / mass) / 2;
    return sigmaOf({ [name]: half / moment, mass: -half / mass }, covariance);
  };
  return [along('ixx', ixx), along('iyy', iyy), along('izz', izz)];
}

/**
 * σ of the principal moments, kg.m2, in their order, to first order: δλ = eᵀ δJ e, because turning e changes nothing to first order. Holds
 * where the moments are farther apart than their σ.
 */
export function principalSigma({ axes }: Pick<Principal, 'axes'>, covariance: Covariance): Vec3 {
  const along = ([x, y, z]: BodyVec): number =>
    sigmaOf(
      { ixx: x * x, iyy: y * y, izz: z * z, ixy: -2 * x * y, ixz: -2 * x * z, iyz: -2 * y * z },
      covariance,
    );
  return [along(axes[0]), along(axes[1]), along(axes[2])];
}
