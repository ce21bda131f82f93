import { type AirframeVec } from '@/lib/frames/tags';
import { type Component } from '@/lib/mass/component';
import { type Placement } from '@/lib/mass/place';

/** Where a row's pieces are, from the datum, m: as listed, then their mirror image where the row stands for one too. */
export function placesOf(
  component: Pick<Component, 'position' | 'pair'>,
  placement: Pick<Placement, 'places'>,
): readonly AirframeVec[] {
  return placement.places(component);
}
