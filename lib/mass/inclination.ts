import { type Principal } from './principal';

/**
 * Angle of the principal x axis from body x in the plane of symmetry, rad: positive when the principal axis points above body x
 * (nose up; body z is down). The trade's inclination of the principal axis.
 */
export function principalInclination({ axes }: Principal): number {
  const [x, , z] = axes[0];
  return Math.atan2(-z, x);
}
