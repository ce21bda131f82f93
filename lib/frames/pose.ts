import { type Mat3, multiply } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import { CompensatedSum } from '@/lib/numerics/sums';
import { type Twice } from '@/lib/numerics/twice';

import { type AxisTriple, permutation } from './axes';
import { type AirframeVec, type In, type ListVec } from './tags';

/** The pose of a list's own frame in the airframe: r_airframe = o + R P r_list (o in airframe components, m; angles in rad). */
export interface Pose {
  readonly origin: readonly [number, number, number];
  readonly yaw: number;
  readonly pitch: number;
  readonly roll: number;
}

/** A place in airframe components to twice the precision of a double. */
export type AirframeTwice = In<'airframe', readonly [Twice, Twice, Twice]>;

/** A list frame that is the airframe frame, but for the axis words. */
export const NO_POSE: Pose = { origin: [0, 0, 0], yaw: 0, pitch: 0, roll: 0 };

/** R P: from list components to airframe components. */
export function listToAirframe(axes: AxisTriple, pose: Pose, airframe: AxisTriple): Mat3 {
  return multiply(rotation(pose.yaw, pose.pitch, pose.roll), permutation(axes, airframe));
}

/**
 * o + R P r - r0: a place of a list as seen from r0, to twice the precision, so that a datum 10 km away costs nothing but the digits
 * of the coordinates themselves.
 */
export function exactPlaceFrom(
  r0: AirframeVec,
  matrix: Mat3,
  origin: AirframeVec,
  r: ListVec,
): AirframeTwice {
  const component = (k: 0 | 1 | 2): Twice => {
    const sum = new CompensatedSum();
    sum.add(origin[k]);
    sum.add(-r0[k]);
    sum.addProduct(matrix[k][0], r[0]);
    sum.addProduct(matrix[k][1], r[1]);
    sum.addProduct(matrix[k][2], r[2]);
    return [sum.value, sum.rest];
  };
  return [component(0), component(1), component(2)];
}

/** The same, rounded once. */
export function placeFrom(r0: AirframeVec, matrix: Mat3, origin: AirframeVec, r: ListVec): AirframeVec {
  const [x, y, z] = exactPlaceFrom(r0, matrix, origin, r);
  return [x[0], y[0], z[0]];
}
