import { mirrorPlace } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Component } from '@/lib/mass/component';
import { type Placement, isMirrored } from '@/lib/mass/place';
import { addVec } from '@/lib/numerics/vec3';

/** Where a row's pieces are, from the datum, m: as listed, then their mirror image where the row stands for one too. */
export function placesOf(
  component: Pick<Component, 'position' | 'pair'>,
  placement: Placement,
): readonly AirframeVec[] {
  const { geometry, declarations, lateral } = placement;
  const listed: AirframeVec = addVec(geometry.reference, placement.place(component));
  if (!isMirrored(component, declarations)) return [listed];
  return [listed, mirrorPlace(listed, lateral, geometry.lateralPlane)];
}
