import { type AxisTriple, arrow, handedness, toForwardRightDown } from '@/lib/frames/axes';
import { listToAirframe, placeFrom, type Pose } from '@/lib/frames/pose';
import { lateralIndex, mirrorPlace } from '@/lib/frames/reflection';
import { directionWords, offsetWords } from '@/lib/frames/words';
import { type Extent } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { applyMat, transpose } from '@/lib/numerics/mat3';
import { dotVec, type Vec3 } from '@/lib/numerics/vec3';
import { degreesAsTyped, fromSi } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

/** A component of the list, placed as an example. */
export interface ExampleRow {
  readonly item: string;
  /** List axes, m. */
  readonly position: Vec3;
  readonly pair: boolean;
}

export interface TriadsInput {
  readonly airframe: Pick<AirframeGeometry, 'axes' | 'lateralPlane' | 'incidence'>;
  /** What the second frame is of, as a sentence begins with it; a list where left out. */
  readonly subject?: string;
  readonly axes: AxisTriple;
  readonly pose: Pose;
  readonly extent: Extent;
  /** Null where there is none to show. */
  readonly example: ExampleRow | null;
  readonly unit: LengthUnit;
}

/** Two triads in forward, right, down from the airframe datum, m, and all that they show in words. */
export interface Triads {
  /** Unit arrows of +x, +y, +z. */
  readonly airframeAxes: readonly Vec3[];
  readonly listAxes: readonly Vec3[];
  readonly bodyX: Vec3;
  readonly origin: Vec3;
  readonly example: Vec3 | null;
  /** What the example is called; '' without one. */
  readonly item: string;
  readonly image: Vec3 | null;
  /** How far right of the datum the plane of symmetry lies. */
  readonly plane: number;
  readonly sentences: readonly string[];
  /** What looks wrong. */
  readonly doubts: readonly string[];
}

const HANDS = { 1: 'right-handed', [-1]: 'left-handed' } as const;
const LETTERS = ['x', 'y', 'z'] as const;

/** How a list's frame lies in the airframe, for the picture and for its words. */
export function triadsOf({ airframe, subject = 'The list', ...input }: TriadsInput): Triads {
  const { axes, pose, extent, example, unit } = input;
  const ofSubject = `${subject.slice(0, 1).toLowerCase()}${subject.slice(1)}`;
  const frameName = subject === 'The list' ? 'the airframe' : 'the new frame';
  const matrix = listToAirframe(axes, pose, airframe.axes);
  const toFrd = toForwardRightDown(airframe.axes);
  const columns = transpose(matrix);
  const say = (metres: number): string => `${figure(fromSi(metres, unit))} ${unit}`;
  const place = example === null ? null : placeFrom([0, 0, 0], matrix, pose.origin, example.position);
  const lateral = lateralIndex(airframe.axes);
  const mirrored = extent !== 'whole' || (example?.pair ?? false);
  const image = place === null || !mirrored ? null : mirrorPlace(place, lateral, airframe.lateralPlane);
  const onPlane: Vec3 = [0, 1, 2].map((k) => (k === lateral ? airframe.lateralPlane : 0)) as unknown as Vec3;
  const plane = dotVec(arrow('right', airframe.axes), onPlane);
  const pointing = columns.map((column) => directionWords(column, airframe.axes));
  const at = (where: Vec3): string =>
    LETTERS.map((letter, k) => `${letter} ${figure(fromSi(where[k] ?? NaN, unit))}`).join(', ');
  const origin = offsetWords(pose.origin, airframe.axes, say);
  const [ours, theirs] = [HANDS[handedness(axes)], HANDS[handedness(airframe.axes)]];
  const right = place === null ? 0 : dotVec(arrow('right', airframe.axes), place) - plane;
  const side =
    Math.abs(right) < 1e-9 ? 'in the plane of symmetry' : right > 0 ? 'on the right' : 'on the left';
  const sentences = [
    `Of ${ofSubject}, ${LETTERS.map((letter, k) => `+${letter} points ${pointing[k] ?? ''}`).join('; ')}.`,
    ours === theirs
      ? `${subject} and ${frameName} are both ${ours}.`
      : `${subject} is ${ours}, ${frameName} ${theirs}.`,
    origin === null
      ? `${subject} counts from the datum of ${frameName}.`
      : `${subject} counts from a point ${origin} of the datum of ${frameName}.`,
    ...(example === null || place === null
      ? []
      : [
          `${example.item}, for example, at ${at(example.position)} ${unit} of ${ofSubject}, is at ${at(place)} ${unit} of ${frameName}: ${offsetWords(place, airframe.axes, say) ?? 'at its datum'}, ${side}.`,
        ]),
    ...(image === null
      ? []
      : [
          `It stands for its mirror image too, at ${LETTERS[lateral]} ${figure(fromSi(image[lateral], unit))} ${unit}, across the plane of symmetry at ${LETTERS[lateral]} ${figure(fromSi(airframe.lateralPlane, unit))} ${unit}.`,
        ]),
    ...(extent === 'whole'
      ? []
      : [
          `The list holds the ${extent === 'left-half' ? 'left' : 'right'} half; every row of it is mirrored.`,
        ]),
    `Body x points ${bodyWords(airframe.incidence)}.`,
  ];
  const wrongSide = (extent === 'left-half' && right > 1e-9) || (extent === 'right-half' && right < -1e-9);
  const doubts = wrongSide
    ? [
        `${example?.item ?? 'The example'} of this ${extent === 'left-half' ? 'left' : 'right'} half lies ${side}. Look at the axes, or at the extent.`,
      ]
    : [];
  const frd = (v: Vec3): Vec3 => applyMat(toFrd, v);
  return {
    airframeAxes: [frd([1, 0, 0]), frd([0, 1, 0]), frd([0, 0, 1])],
    listAxes: columns.map(frd),
    bodyX: [Math.cos(airframe.incidence), 0, 0 - Math.sin(airframe.incidence)],
    origin: frd(pose.origin),
    example: place && frd(place),
    item: example?.item ?? '',
    image: image && frd(image),
    plane,
    sentences,
    doubts,
  };
}

function bodyWords(incidence: number): string {
  const angle = degreesAsTyped(incidence);
  if (angle === 0) return 'forward, along the reference line';
  return `forward, ${figure(Math.abs(angle))} degrees nose-${angle > 0 ? 'up' : 'down'} of the reference line`;
}

/** Six digits at most: enough to be recognised by. */
function figure(value: number): string {
  const rounded = Number(value.toPrecision(6));
  return Math.abs(rounded) < 1e-9 ? '0' : String(rounded);
}
