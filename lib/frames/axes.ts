/** Where an axis points on the aircraft. */
export type Direction = 'aft' | 'forward' | 'right' | 'left' | 'up' | 'down';
export const DIRECTIONS: readonly Direction[] = ['aft', 'forward', 'right', 'left', 'up', 'down'];

/** The directions of +x, +y, +z. */
export type AxisTriple = readonly [Direction, Direction, Direction];
