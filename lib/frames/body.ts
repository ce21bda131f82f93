import { type Mat3, applyMat, multiply } from '@/lib/numerics/mat3';
import { rotationY } from '@/lib/numerics/rotation';
import { type Sym3, congruence } from '@/lib/numerics/sym3';

import { type AxisTriple, toForwardRightDown } from './axes';
import { type AirframeVec, type BodyVec, type In } from './tags';

/** The matrix from airframe to body components: its rows are the body axes in airframe components. */
export type AirframeToBody = In<'body', Mat3>;

/**
 * A, with body axes x forward, y right, z down (ANSI/AIAA R-004-1992, ISO 1151) and x turned nose-up by `incidence` (rad) from the
 * reference line: x_b = cos i forward - sin i down, z_b = sin i forward + cos i down. det A is -1 from a left-handed frame.
 */
export function airframeToBody(axes: AxisTriple, incidence: number): AirframeToBody {
  return multiply(rotationY(-incidence), toForwardRightDown(axes));
}

/** A v: an arrow or a difference of places. */
export function toBody(a: AirframeToBody, v: AirframeVec): BodyVec {
  return applyMat(a, v);
}

/** A J Aᵀ: the same for both handednesses. */
export function tensorToBody(a: AirframeToBody, tensor: In<'airframe', Sym3>): In<'body', Sym3> {
  return congruence(a, tensor);
}
