import { arrow } from '@/lib/frames/axes';
import { airframeToBody } from '@/lib/frames/body';
import { percentMac } from '@/lib/frames/chord';
import { type IssueChange, changedArrow, changedPlace } from '@/lib/frames/issue-change';
import { lateralIndex } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { multiply } from '@/lib/numerics/mat3';
import { dotVec, normVec, scaleVec, subVec } from '@/lib/numerics/vec3';

import { type AirframeGeometry } from './geometry';

/** Lengths that differ by less, m, and directions by less, are the same: far below what anyone measures or types. */
const SAME = 1e-9;

const near = (a: AirframeVec, b: AirframeVec): boolean => normVec(subVec(a, b)) <= SAME;

/** What of one issue still stands where it stood, in another. */
export interface IssueDifferences {
  /** The change keeps the directions aft, right and up, whatever the axes are called. */
  readonly isDirectionKept: boolean;
  /** The datum is the same point of the aircraft. */
  readonly isDatumKept: boolean;
  /** The plane of symmetry is the same plane of the aircraft. */
  readonly isPlaneKept: boolean;
  /** The mean chord is the same stretch of the aircraft: what is stated in per cent of it means the same. */
  readonly isChordKept: boolean;
  /** Body axes point as they did on the aircraft: reference line and incidence as they were, or turned by as much. */
  readonly isBodyKept: boolean;
}

const lateral = ({ axes, lateralPlane }: AirframeGeometry): AirframeVec => {
  const k = lateralIndex(axes);
  const at = (index: number): number => (index === k ? lateralPlane : 0);
  return [at(0), at(1), at(2)];
};

/** Holds an issue against another, `change` leading from the one to the other. */
export function issueDifferences(
  change: IssueChange,
  from: AirframeGeometry,
  to: AirframeGeometry,
): IssueDifferences {
  const turned = (direction: 'aft' | 'right' | 'up'): AirframeVec =>
    changedArrow(change, arrow(direction, from.axes));
  const isDirectionKept = (['aft', 'right', 'up'] as const).every((direction) =>
    near(turned(direction), arrow(direction, to.axes)),
  );
  const normal = arrow('right', to.axes);
  const onPlane = subVec(changedPlace(change, lateral(from)), lateral(to));
  const across = turned('right');
  const isPlaneKept =
    (near(across, normal) || near(scaleVec(-1, across), normal)) && Math.abs(dotVec(normal, onPlane)) <= SAME;
  const isAftKept = near(turned('aft'), arrow('aft', to.axes));
  return {
    isDirectionKept,
    isDatumKept: near(changedPlace(change, [0, 0, 0]), [0, 0, 0]),
    isPlaneKept,
    isChordKept:
      isAftKept && Math.abs(from.mac - to.mac) <= SAME && near(changedPlace(change, from.lemac), to.lemac),
    isBodyKept: multiply(airframeToBody(to.axes, to.incidence), change.matrix).every((axis, k) =>
      near(axis, airframeToBody(from.axes, from.incidence)[k] ?? [NaN, NaN, NaN]),
    ),
  };
}

/** A share of the one issue's chord, in per cent, as a share of the other's: the same place along it. Null without a chord. */
export function convertedPercentMac(
  percent: number,
  change: IssueChange,
  from: AirframeGeometry,
  to: AirframeGeometry,
): number | null {
  const [x, y, z] = arrow('aft', from.axes);
  const along = (from.mac * percent) / 100;
  const place: AirframeVec = [
    from.lemac[0] + along * x,
    from.lemac[1] + along * y,
    from.lemac[2] + along * z,
  ];
  return percentMac(changedPlace(change, place), to.lemac, to.mac, to.axes);
}
