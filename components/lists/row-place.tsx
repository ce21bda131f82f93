import { type Definition } from '@/components/ui/definition-list';
import { type ListRow } from '@/lib/contracts/list-rows';
import { type FrameInForce } from '@/components/lists/frame-in-force';
import { type AxisTriple } from '@/lib/frames/axes';
import { changedPlace } from '@/lib/frames/issue-change';
import { listToAirframe, placeFrom } from '@/lib/frames/pose';
import { lateralIndex, mirrorPlace } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { isMirrored } from '@/lib/mass/place';
import { toSi } from '@/lib/units/convert';

/** Where a row's CG lies from the airframe datum, m, and its mirror image where it has one. */
export function placeInAirframe(
  row: ListRow,
  declarations: ListDeclarations,
  frame: Pick<AirframeGeometry, 'axes' | 'lateralPlane'>,
): Definition[] {
  return coordinates(placesOfRow(row, declarations, frame), frame.axes);
}

/** The same from the datum of the issue in force: the same points of the aircraft. */
export function placeInForce(
  row: ListRow,
  declarations: ListDeclarations,
  frame: Pick<AirframeGeometry, 'axes' | 'lateralPlane'>,
  { axes, change }: Pick<FrameInForce, 'axes' | 'change'>,
): Definition[] {
  const places = placesOfRow(row, declarations, frame).map((place) => changedPlace(change, place));
  return coordinates(places, axes);
}

function placesOfRow(
  row: ListRow,
  declarations: ListDeclarations,
  { axes, lateralPlane }: Pick<AirframeGeometry, 'axes' | 'lateralPlane'>,
): readonly AirframeVec[] {
  const { x, y, z, symmetry } = row.cells;
  if (typeof x !== 'number' || typeof y !== 'number' || typeof z !== 'number') return [];
  const { lengthUnit, pose } = declarations;
  const place = placeFrom([0, 0, 0], listToAirframe(declarations.axes, pose, axes), pose.origin, [
    toSi(x, lengthUnit),
    toSi(y, lengthUnit),
    toSi(z, lengthUnit),
  ]);
  if (!isMirrored({ pair: symmetry === 'pair' }, declarations)) return [place];
  return [place, mirrorPlace(place, lateralIndex(axes), lateralPlane)];
}

/** One line for each axis; a coordinate that the image shares is told once. */
function coordinates(places: readonly AirframeVec[], axes: AxisTriple): Definition[] {
  if (places.length === 0) return [];
  return axes.map((direction, k) => {
    const texts = [...new Set(places.map((place) => `${metres(place, k)} m`))];
    return {
      term: `${'xyz'.charAt(k)} ${direction}`,
      value: <span className="num">{texts.join(' and ')}</span>,
    };
  });
}

function metres(place: AirframeVec, k: number): string {
  return (place[k] ?? 0).toFixed(4);
}
