import { lateralIndex } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { arrow } from '@/lib/frames/axes';
import { addVec, scaleVec } from '@/lib/numerics/vec3';

export type Range = readonly [low: number, high: number];

/** What the sheets hold, per airframe coordinate from the datum, m. */
export type Bounds = readonly [Range, Range, Range];

/** How far beyond a length or span of the airframe a mark may lie and still widen the picture. */
const REACH = 1;
/** A datum this share of the picture's size outside it is taken in. */
const NEAR = 0.2;
const MARGIN = 0.03;

interface Drawn {
  readonly place: AirframeVec;
  readonly radius: number;
}

/**
 * Bounds that hold the marks, the chord and the other `places`, even about the plane of symmetry, and the datum where it is near. A
 * mark farther from r0 than twice the longer of length and span does not widen them: one row in the wrong unit must not shrink the
 * aircraft to a dot. Where neither is known every mark counts.
 */
export function pictureBounds(
  marks: readonly Drawn[],
  places: readonly AirframeVec[],
  geometry: AirframeGeometry,
): Bounds {
  const { axes, lemac, mac, length, span, reference, lateralPlane } = geometry;
  const size = Math.max(length, span);
  const limit = size > 0 ? (1 + REACH) * size : Infinity;
  const chord = mac > 0 ? [lemac, addVec(lemac, scaleVec(mac, arrow('aft', axes)))] : [];
  const points: Drawn[] = [...places, ...chord].map((place) => ({ place, radius: 0 }));
  const along = (k: 0 | 1 | 2): Range => {
    const held = [...marks, ...points].filter(({ place }) => withinReach(place, reference, limit));
    let [low, high] = held.reduce<Range>(
      ([least, most], { place, radius }) => [
        Math.min(least, place[k] - radius),
        Math.max(most, place[k] + radius),
      ],
      [Infinity, -Infinity],
    );
    if (low > high) [low, high] = [reference[k] - 1, reference[k] + 1];
    if (k === lateralIndex(axes)) {
      const half = Math.max(high - lateralPlane, lateralPlane - low);
      [low, high] = [lateralPlane - half, lateralPlane + half];
    }
    return [low, high];
  };
  const held = [along(0), along(1), along(2)] as const;
  const largest = Math.max(...held.map(([low, high]) => high - low), 1e-3);
  const finished = ([low, high]: Range): Range => {
    const near = NEAR * largest;
    const from = low > 0 && low <= near ? 0 : low;
    const to = high < 0 && -high <= near ? 0 : high;
    // Never thinner than a sixth of the longest: a rocket on its axis still has a height.
    const thin = Math.max(0, largest / 6 - (to - from)) / 2;
    return [from - thin - MARGIN * largest, to + thin + MARGIN * largest];
  };
  return [finished(held[0]), finished(held[1]), finished(held[2])];
}

function withinReach(place: AirframeVec, reference: AirframeVec, limit: number): boolean {
  return place.every((coordinate, k) => Math.abs(coordinate - (reference[k] ?? 0)) <= limit);
}

/** Whether a place lies on the sheets. */
export function isWithin(place: AirframeVec, bounds: Bounds): boolean {
  return bounds.every(([low, high], k) => (place[k] ?? NaN) >= low && (place[k] ?? NaN) <= high);
}
