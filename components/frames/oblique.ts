import { type Vec3 } from '@/lib/numerics/vec3';

export type Point = readonly [number, number];

/** Where a unit forward, right and down goes on the sheet (y down): seen from above, ahead and to the left. */
const SHEET: readonly [Point, Point, Point] = [
  [-0.78, 0.36],
  [-0.7, -0.32],
  [0, 0.86],
];

export const SEEN_FROM = 'Seen from above, ahead and to the left.';

/** forward, right, down -> sheet, without a scale. */
export function oblique(v: Vec3): Point {
  const sum = (k: 0 | 1): number => v[0] * SHEET[0][k] + v[1] * SHEET[1][k] + v[2] * SHEET[2][k];
  return [sum(0), sum(1)];
}

export interface Sheet {
  /** forward, right, down in m -> units of the drawing. */
  readonly at: (v: Vec3) => Point;
  readonly width: number;
  readonly height: number;
}

/** A sheet on which all of these places, m, have room, with a margin for what stands about them. */
export function sheetFor(places: readonly Vec3[], width: number, margin: number): Sheet {
  const points = places.map(oblique);
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  const [left, top] = [Math.min(...xs), Math.min(...ys)];
  const [wide, high] = [Math.max(...xs) - left, Math.max(...ys) - top];
  const [room, tall] = [width - 2 * margin, 130];
  const scale = Math.min(wide > 0 ? room / wide : Infinity, high > 0 ? tall / high : Infinity);
  const by = Number.isFinite(scale) ? scale : 1;
  return {
    at: (v) => {
      const [x, y] = oblique(v);
      return [margin + (room - by * wide) / 2 + by * (x - left), margin + by * (y - top)];
    },
    width,
    height: 2 * margin + by * high,
  };
}
