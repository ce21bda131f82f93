import { type AxisTriple, arrow } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Vec3, addVec, normVec, scaleVec } from '@/lib/numerics/vec3';

import { type SpinAxis } from './rotor';

/** Angles beyond these leave "seen from behind" without a meaning, rad. */
export const YAW_LIMIT = Math.PI / 2;
export const PITCH_LIMIT = Math.PI / 3;

/** What is wrong with a spin axis, in words a person can act on; null when it is sound. */
export function spinAxisProblem(axis: SpinAxis): string | null {
  if (axis.kind === 'arrow') {
    const length = normVec([axis.x, axis.y, axis.z]);
    if (length > 0 && Number.isFinite(length)) return null;
    return 'The arrow along the shaft has no direction: give at least one of axis_x, axis_y, axis_z a finite value other than 0.';
  }
  if (!(Math.abs(axis.yaw) < YAW_LIMIT))
    return 'axis_yaw must be between -90 and 90 degrees, both excluded. Give a steeper axis as an arrow with a hand.';
  if (!(Math.abs(axis.pitch) < PITCH_LIMIT))
    return 'axis_pitch must be between -60 and 60 degrees, both excluded. Give a steeper axis as an arrow with a hand.';
  return null;
}

/** a, shortened to unit length; scaled first, so that neither a huge nor a tiny arrow is lost. */
function unit(a: Vec3): Vec3 {
  const largest = Math.max(...a.map(Math.abs));
  const scaled: Vec3 = [a[0] / largest, a[1] / largest, a[2] / largest];
  return scaleVec(1 / normVec(scaled), scaled);
}

/**
 * The unit arrow, in airframe components, about which a positive speed turns by the right hand. By angles:
 * e = cosθ cosψ forward + cosθ sinψ right + sinθ up, and clockwise seen from behind is +e. The hand is that of a real hand in space,
 * whatever the handedness of the airframe frame.
 *
 * @throws RangeError when the axis is not sound, see `spinAxisProblem`.
 */
export function spinArrow(axis: SpinAxis, airframe: AxisTriple): AirframeVec {
  const problem = spinAxisProblem(axis);
  if (problem !== null) throw new RangeError(problem);
  if (axis.kind === 'arrow') return scaleVec(axis.hand === 'rh' ? 1 : -1, unit([axis.x, axis.y, axis.z]));
  const along = (direction: 'forward' | 'right' | 'up', part: number): Vec3 =>
    scaleVec(part, arrow(direction, airframe));
  const ahead = addVec(
    addVec(
      along('forward', Math.cos(axis.pitch) * Math.cos(axis.yaw)),
      along('right', Math.cos(axis.pitch) * Math.sin(axis.yaw)),
    ),
    along('up', Math.sin(axis.pitch)),
  );
  return scaleVec(axis.sense === 'cw' ? 1 : -1, ahead);
}
