import { type AirframeToBody, airframeToBody, tensorToBody } from '@/lib/frames/body';
import { momentsOf } from '@/lib/frames/products';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Sym3, traceMinus } from '@/lib/numerics/sym3';
import { subVec } from '@/lib/numerics/vec3';

import { type Account, readAccount } from '../account';
import { type AirframeGeometry } from '../geometry';
import { type TenNumbers } from './ten';

/** What the parts of a whole are measured against: made once, used for every part. */
export interface Whole {
  /** kg, above zero. */
  readonly mass: number;
  /** CG as seen from the geometry's r0, airframe components, m. */
  readonly cg: AirframeVec;
  readonly toBody: AirframeToBody;
}

/** Null for a mass of zero or less: it has no CG for its parts to be about. */
export function wholeOf(account: Account, { axes, incidence }: AirframeGeometry): Whole | null {
  const reading = account.mass > 0 ? readAccount(account) : null;
  if (reading === null) return null;
  return { mass: account.mass, cg: reading.place, toBody: airframeToBody(axes, incidence) };
}

/**
 * A part's contribution to the mass, to the CG and to the tensor about the CG of the whole, body axes. Every one adds up over the
 * parts: masses to the mass; Ixx, ... and Ixy, ... to the moments and positive products of the whole, because a part's second moment
 * about the common CG, Q - p cᵀ - c pᵀ + m c cᵀ, is its own plus what its distance gives it (Huygens and Steiner's parallel axes);
 * x, y, z are the levers m (r - c) / M of the part about the CG of the whole, which add up to zero: the CG is where they balance.
 */
export function contributionOf(part: Account, whole: Whole): TenNumbers {
  const { cg, toBody } = whole;
  const inertia = momentsOf(tensorToBody(toBody, traceMinus(secondMomentAbout(part, cg))));
  const [x, y, z] = leverOf(part, whole, cg);
  return { mass: part.mass, x, y, z, ...inertia };
}

/**
 * m (r - o) / M, m: what a part adds to the place of the CG as seen from `origin` (from r0, airframe components). Over all parts it
 * adds up to c - o, whatever the origin.
 */
export function leverOf(part: Account, { mass }: Pick<Whole, 'mass'>, origin: AirframeVec): AirframeVec {
  const [px, py, pz] = part.first;
  const m = part.mass;
  return [(px - m * origin[0]) / mass, (py - m * origin[1]) / mass, (pz - m * origin[2]) / mass];
}

/** Q - p cᵀ - c pᵀ + m c cᵀ: the second moment of an account about a place c as seen from r0, kg.m2. */
function secondMomentAbout({ mass, first, second: q }: Account, c: AirframeVec): Sym3 {
  const p = first;
  // With p' = p - m c the two halves of what is taken away are p' cᵀ and c pᵀ: near the place both are small.
  const near = subVec(p, [mass * c[0], mass * c[1], mass * c[2]]);
  const away = (i: 0 | 1 | 2, j: 0 | 1 | 2): number => near[i] * c[j] + c[i] * p[j];
  return {
    xx: q.xx - away(0, 0),
    yy: q.yy - away(1, 1),
    zz: q.zz - away(2, 2),
    xy: q.xy - away(0, 1),
    xz: q.xz - away(0, 2),
    yz: q.yz - away(1, 2),
  };
}
