import { type AxisTriple, arrow } from '@/lib/frames/axes';
import { type IssueChange, changedArrow } from '@/lib/frames/issue-change';
import { normVec, subVec } from '@/lib/numerics/vec3';

import { spinArrow } from './axis';
import { type Rotor } from './rotor';

/** Directions that differ by less are the same. */
const SAME = 1e-12;

/**
 * A rotor stated in one frame issue as it stands in another. Its arrow is a direction in space and turns with the frame; its hand is
 * that of a real hand, so it stays, even where the other issue has the other handedness. Angles are from straight forward: they stay
 * where forward, right and up are the same directions of the aircraft in both issues, and become an arrow where they are not.
 */
export function convertRotor(rotor: Rotor, change: IssueChange, from: AxisTriple, to: AxisTriple): Rotor {
  const { axis } = rotor;
  if (axis.kind === 'arrow') {
    const [x, y, z] = changedArrow(change, [axis.x, axis.y, axis.z]);
    return { ...rotor, axis: { ...axis, x, y, z } };
  }
  const isKept = (['forward', 'right', 'up'] as const).every(
    (direction) =>
      normVec(subVec(changedArrow(change, arrow(direction, from)), arrow(direction, to))) <= SAME,
  );
  if (isKept) return rotor;
  const [x, y, z] = changedArrow(change, spinArrow(axis, from));
  return { ...rotor, axis: { kind: 'arrow', x, y, z, hand: 'rh' } };
}
