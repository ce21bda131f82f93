import { type AxisTriple } from '@/lib/frames/axes';
import { changeFromFormer, changedPlace } from '@/lib/frames/issue-change';
import { type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { issueDifferences } from '@/lib/mass/issue-differences';
import { normVec, subVec } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

/** What the form of a next issue holds, SI; `reference` is null where it is left to the quarter chord. */
export interface TypedIssue extends Pick<
  AirframeGeometry,
  'axes' | 'lateralPlane' | 'incidence' | 'lemac' | 'mac' | 'span' | 'length'
> {
  readonly axes: AxisTriple;
  readonly reference: AirframeGeometry['reference'] | null;
}

/**
 * What a next issue, as it is typed, would move on the aircraft. Its form begins with the figures of the issue before, which belong to
 * other places as soon as the datum moves, and an issue is never changed once it is made.
 */
export function frameDoubts(
  former: { readonly number: number; readonly geometry: AirframeGeometry },
  lies: Pose,
  typed: TypedIssue,
  unit: LengthUnit,
): string[] {
  const from = former.geometry;
  const change = changeFromFormer(from.axes, lies, typed.axes);
  const to: AirframeGeometry = { ...typed, reference: typed.reference ?? typed.lemac };
  const { isChordKept, isPlaneKept, isBodyKept } = issueDifferences(change, from, to);
  const lemac = changedPlace(change, from.lemac)
    .map((part, k) => `${'xyz'.charAt(k)} ${Number(fromSi(part, unit).toPrecision(9))}`)
    .join(', ');
  const isFar = typed.reference !== null && normVec(subVec(typed.reference, typed.lemac)) > typed.length;
  return [
    ...(isChordKept
      ? []
      : [
          `The mean chord below is not that of issue ${former.number}, whose LEMAC is at ${lemac} ${unit} of the new frame. Per cent of the chord would mean another place.`,
        ]),
    ...(isPlaneKept
      ? []
      : [
          `The plane of symmetry below is another plane of the aircraft than that of issue ${former.number}.`,
        ]),
    ...(isBodyKept
      ? []
      : [
          `Body axes, turned by the incidence below from the new reference line, would point elsewhere on the aircraft than those of issue ${former.number}: moments and products would be about other axes.`,
        ]),
    ...(isFar
      ? [
          'The point about which sums are kept is farther from LEMAC than the aircraft is long. Leave it blank for the quarter chord.',
        ]
      : []),
  ];
}
