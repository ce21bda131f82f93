import { multiply, transpose } from '@/lib/numerics/mat3';
import { anglesOf } from '@/lib/numerics/rotation';

import { type AxisTriple, permutation } from './axes';
import { type IssueChange, changedPlace } from './issue-change';
import { type Pose, listToAirframe } from './pose';

/** Angles less than this, rad, are what rounding leaves of none: a nanometre at 100 km. */
const NO_ANGLE = 1e-14;

const settled = (angle: number): number => (Math.abs(angle) < NO_ANGLE ? 0 : angle);

/**
 * The pose, in another issue, of a list's frame that stays where it is on the aircraft, with the same axis words: from
 * r' = offset + M (o + R P r) follow o' = offset + M o and R' = M R P P'ᵀ, a proper rotation whatever the handedness of either issue.
 */
export function carriedPose(
  axes: AxisTriple,
  pose: Pose,
  change: IssueChange,
  from: AxisTriple,
  to: AxisTriple,
): Pose {
  const lies = multiply(change.matrix, listToAirframe(axes, pose, from));
  const { yaw, pitch, roll } = anglesOf(multiply(lies, transpose(permutation(axes, to))));
  return {
    origin: changedPlace(change, pose.origin),
    yaw: settled(yaw),
    pitch: settled(pitch),
    roll: settled(roll),
  };
}
