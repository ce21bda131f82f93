/** Three components in one frame and one unit; the name or brand of the value says which. */
export type Vec3 = readonly [number, number, number];
