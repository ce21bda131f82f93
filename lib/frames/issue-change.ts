import { type Mat3, IDENTITY, applyMat, multiply, transpose } from '@/lib/numerics/mat3';
import { type Twice, addTwice, minusTwice, timesTwice } from '@/lib/numerics/twice';

import { type AxisTriple } from './axes';
import { type AirframeTwice, type Pose, listToAirframe } from './pose';
import { type AirframeVec } from './tags';

/**
 * How a place stated in one frame issue is stated in another: r' = offset + matrix r, both in airframe components, m. The matrix is
 * a rotation, or a rotation and a reflection where one issue is right-handed and the other left-handed. The offset is where the
 * first issue's datum lies in the second, to twice the precision, so that a datum moved far away and back costs nothing.
 */
export interface IssueChange {
  readonly matrix: Mat3;
  readonly offset: AirframeTwice;
}

const NOWHERE: AirframeTwice = [
  [0, 0],
  [0, 0],
  [0, 0],
];

export const NO_CHANGE: IssueChange = { matrix: IDENTITY, offset: NOWHERE };

const twice = ([x, y, z]: AirframeVec): AirframeTwice => [
  [x, 0],
  [y, 0],
  [z, 0],
];

/** M v to twice the precision. */
export function applyToTwice(matrix: Mat3, v: AirframeTwice): AirframeTwice {
  const row = ([a, b, c]: Mat3[number]): Twice =>
    addTwice(addTwice(timesTwice([a, 0], v[0]), timesTwice([b, 0], v[1])), timesTwice([c, 0], v[2]));
  return [row(matrix[0]), row(matrix[1]), row(matrix[2])];
}

const sum = (a: AirframeTwice, b: AirframeTwice): AirframeTwice => [
  addTwice(a[0], b[0]),
  addTwice(a[1], b[1]),
  addTwice(a[2], b[2]),
];

/**
 * The change from the issue before to an issue that states how it lies against it. The former frame is placed in the new one as a
 * list's frame is in its airframe: r = o + R P r_former, o the former datum in the new components.
 */
export function changeFromFormer(former: AxisTriple, lies: Pose, axes: AxisTriple): IssueChange {
  return { matrix: listToAirframe(former, lies, axes), offset: twice(lies.origin) };
}

/** First one change, then the other. */
export function followedBy(first: IssueChange, second: IssueChange): IssueChange {
  return {
    matrix: multiply(second.matrix, first.matrix),
    offset: sum(second.offset, applyToTwice(second.matrix, first.offset)),
  };
}

/** The way back: r = Mᵀ (r' - offset). */
export function reversed({ matrix, offset }: IssueChange): IssueChange {
  const back = transpose(matrix);
  const [x, y, z] = applyToTwice(back, offset);
  return { matrix: back, offset: [minusTwice(x), minusTwice(y), minusTwice(z)] };
}

/** A place as seen from a place of the other issue: offset + M r - seenFrom, to twice the precision. */
export function changedPlaceFrom(
  seenFrom: AirframeVec,
  { matrix, offset }: IssueChange,
  place: AirframeVec,
): AirframeTwice {
  const [x, y, z] = seenFrom;
  return sum(sum(offset, twice([-x, -y, -z])), applyToTwice(matrix, twice(place)));
}

/** A place from the datum of one issue as it stands from the datum of the other. */
export function changedPlace(change: IssueChange, place: AirframeVec): AirframeVec {
  const [x, y, z] = changedPlaceFrom([0, 0, 0], change, place);
  return [x[0], y[0], z[0]];
}

/** A direction in space, or a difference of places. */
export function changedArrow({ matrix }: IssueChange, arrow: AirframeVec): AirframeVec {
  return applyMat(matrix, arrow);
}
