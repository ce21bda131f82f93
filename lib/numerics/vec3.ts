/** Three components in one frame and one unit; the name or tag of the value says which. */
export type Vec3 = readonly [number, number, number];

export const ZERO_VEC: Vec3 = [0, 0, 0];

/** a + b. Both carry the same frame tag, and so does the sum. */
export function addVec<V extends Vec3>(a: V, b: V): V {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]] as Vec3 as V;
}

/** a - b. Both carry the same frame tag, and so does the difference. */
export function subVec<V extends Vec3>(a: V, b: V): V {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]] as Vec3 as V;
}

/** k a, in a's frame. */
export function scaleVec<V extends Vec3>(k: number, a: V): V {
  return [k * a[0], k * a[1], k * a[2]] as Vec3 as V;
}

export function dotVec<V extends Vec3>(a: V, b: V): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function normVec(a: Vec3): number {
  return Math.hypot(a[0], a[1], a[2]);
}
