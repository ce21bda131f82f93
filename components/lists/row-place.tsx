import { type Definition } from '@/components/ui/definition-list';
import { type ListRow } from '@/lib/contracts/list-rows';
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
  { axes, lateralPlane }: Pick<AirframeGeometry, 'axes' | 'lateralPlane'>,
): Definition[] {
  const { x, y, z, symmetry } = row.cells;
  if (typeof x !== 'number' || typeof y !== 'number' || typeof z !== 'number') return [];
  const { lengthUnit, pose } = declarations;
  const place = placeFrom([0, 0, 0], listToAirframe(declarations.axes, pose, axes), pose.origin, [
    toSi(x, lengthUnit),
    toSi(y, lengthUnit),
    toSi(z, lengthUnit),
  ]);
  const mirrored = isMirrored({ pair: symmetry === 'pair' }, declarations);
  const lateral = lateralIndex(axes);
  const image = mirrorPlace(place, lateral, lateralPlane);
  return axes.map((direction, k) => ({
    term: `${'xyz'.charAt(k)} ${direction}`,
    value: (
      <span className="num">
        {metres(place, k)} m{mirrored && k === lateral ? ` and ${metres(image, k)} m` : ''}
      </span>
    ),
  }));
}

function metres(place: AirframeVec, k: number): string {
  return (place[k] ?? 0).toFixed(4);
}
