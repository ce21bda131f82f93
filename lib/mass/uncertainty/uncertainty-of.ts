import { arrow } from '@/lib/frames/axes';
import { type AirframeToBody, airframeToBody, tensorToBody } from '@/lib/frames/body';
import { type Moments, momentsOf } from '@/lib/frames/products';
import { type AirframeVec, type In } from '@/lib/frames/tags';
import { type Account, fromNumbers } from '@/lib/mass/account';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { propagate } from '@/lib/numerics/propagate';
import { type Sym3, addSym, symmetricProduct, traceMinus } from '@/lib/numerics/sym3';
import { scaleVec, subVec } from '@/lib/numerics/vec3';

import { ACCOUNT_LENGTH, type AccountUncertainty, covarianceMatrix } from './sums';

/** The order of the rows and columns of `PropertiesUncertainty.covariance`: CG in airframe components, moments in body axes. */
export const RESULTS = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;

export interface PropertiesUncertainty {
  /** σ of the CG, airframe components, m. */
  readonly cg: { readonly x: number; readonly y: number; readonly z: number };
  /** Covariance matrix of the CG, airframe components, m2. */
  readonly cgCovariance: In<'airframe', Sym3>;
  /** Covariance of the CG with the mass, airframe components, kg.m. */
  readonly cgMassCovariance: AirframeVec;
  /** σ of the CG along the chord, per cent of it; null where the geometry has no chord. */
  readonly percentMac: number | null;
  /** σ of moments and products about the CG in body axes, kg.m2. */
  readonly inertia: In<'body', Moments>;
  /** Of all ten in the order of `RESULTS`, products as positive integrals, by rows; SI. */
  readonly covariance: readonly (readonly number[])[];
}

/** Standard deviations of a `MassResult`, to first order (JCGM 100:2008, clause 5). A value without a σ counts as certain. */
export interface MassUncertainty {
  /** kg */
  readonly mass: number;
  /** The share, 0 to 1, of the mass (of rows, without sign) whose σ is stated; null where there is no mass at all. */
  readonly massShare: number | null;
  /** Null where the mass is zero or less: then there is no CG. */
  readonly properties: PropertiesUncertainty | null;
}

/**
 * How mass, CG and moments change with the account, to first order: δc = (δp - c δm)/m, δS = δQ - δp cᵀ - c δpᵀ + c cᵀ δm, c the CG
 * as seen from r0; the own change of c cancels, because Σ m d = 0 about it.
 */
function response(change: Account, mass: number, c: AirframeVec, a: AirframeToBody): number[] {
  const { mass: dm, first: dp, second: dq } = change;
  const [x, y, z] = scaleVec(1 / mass, subVec(dp, scaleVec(dm, c)));
  // δp cᵀ + c δpᵀ - c cᵀ δm in one: with w = δp - c δm/2 it is w cᵀ + c wᵀ.
  const w = subVec(dp, scaleVec(dm / 2, c));
  const second = addSym(dq, symmetricProduct(w, c), -1);
  const { ixx, iyy, izz, ixy, ixz, iyz } = momentsOf(tensorToBody(a, traceMinus(second)));
  return [dm, x, y, z, ixx, iyy, izz, ixy, ixz, iyz];
}

/** By results the rows, by the ten numbers of the account the columns. */
function derivatives(total: Account, geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>): number[][] {
  const { mass, first } = total;
  const a = airframeToBody(geometry.axes, geometry.incidence);
  const centre: AirframeVec = [first[0] / mass, first[1] / mass, first[2] / mass];
  const columns = Array.from({ length: ACCOUNT_LENGTH }, (_, j) => {
    const unit = Array.from({ length: ACCOUNT_LENGTH }, (_, i) => (i === j ? 1 : 0));
    return response(fromNumbers(unit), mass, centre, a);
  });
  return RESULTS.map((_, i) => columns.map((column) => column[i] ?? NaN));
}

/**
 * The uncertainty of the result of an account, from sums alone. `total` is the account that `uncertainty` belongs to, both about the
 * geometry's reference point.
 */
export function uncertaintyOf(
  uncertainty: AccountUncertainty,
  total: Account,
  geometry: Pick<AirframeGeometry, 'axes' | 'incidence' | 'mac'>,
): MassUncertainty {
  const massShare = uncertainty.mass === 0 ? null : uncertainty.massWithSigma / uncertainty.mass;
  const mass = Math.sqrt(uncertainty.covariance[0] ?? NaN);
  if (!(total.mass > 0)) return { mass, massShare, properties: null };
  const covariance = propagate(derivatives(total, geometry), covarianceMatrix(uncertainty));
  const between = (p: (typeof RESULTS)[number], q: (typeof RESULTS)[number]): number =>
    covariance[RESULTS.indexOf(p)]?.[RESULTS.indexOf(q)] ?? NaN;
  const sigma = (p: (typeof RESULTS)[number]): number => Math.sqrt(between(p, p));
  const cgCovariance = {
    xx: between('x', 'x'),
    yy: between('y', 'y'),
    zz: between('z', 'z'),
    xy: between('x', 'y'),
    xz: between('x', 'z'),
    yz: between('y', 'z'),
  };
  const chordwise =
    (['x', 'y', 'z'] as const)[arrow('aft', geometry.axes).findIndex((part) => part !== 0)] ?? 'x';
  return {
    mass,
    massShare,
    properties: {
      cg: { x: sigma('x'), y: sigma('y'), z: sigma('z') },
      cgCovariance,
      cgMassCovariance: [between('mass', 'x'), between('mass', 'y'), between('mass', 'z')],
      percentMac: geometry.mac > 0 ? (100 * sigma(chordwise)) / geometry.mac : null,
      inertia: {
        ixx: sigma('ixx'),
        iyy: sigma('iyy'),
        izz: sigma('izz'),
        ixy: sigma('ixy'),
        ixz: sigma('ixz'),
        iyz: sigma('iyz'),
      },
      covariance,
    },
  };
}
