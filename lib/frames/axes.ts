import { type Mat3, applyMat, determinant, multiply, transpose } from '@/lib/numerics/mat3';
import { type Vec3 } from '@/lib/numerics/vec3';

/** Where an axis points on the aircraft. */
export type Direction = 'aft' | 'forward' | 'right' | 'left' | 'up' | 'down';
export const DIRECTIONS: readonly Direction[] = ['aft', 'forward', 'right', 'left', 'up', 'down'];

/** The directions of +x, +y, +z. */
export type AxisTriple = readonly [Direction, Direction, Direction];

/** Stations aft, butt lines right, waterlines up: the usual airframe frame. */
export const USUAL_AXES: AxisTriple = ['aft', 'right', 'up'];

/** Each direction in the components forward, right, down: a right-handed set. */
const ARROWS: Readonly<Record<Direction, Vec3>> = {
  forward: [1, 0, 0],
  aft: [-1, 0, 0],
  right: [0, 1, 0],
  left: [0, -1, 0],
  down: [0, 0, 1],
  up: [0, 0, -1],
};

const isDirection = (word: string): word is Direction => DIRECTIONS.some((direction) => direction === word);

/** What is wrong with three axis directions, in words a person can act on; null when they span space. */
export function axesProblem(axes: readonly string[]): string | null {
  if (axes.length !== 3)
    return `Three axis directions are needed, as in aft,right,up; there are ${axes.length}.`;
  const unknown = axes.find((word) => !isDirection(word));
  if (unknown !== undefined)
    return `"${unknown}" is not an axis direction. Use ${DIRECTIONS.slice(0, -1).join(', ')} or ${DIRECTIONS.at(-1)}.`;
  const lines = [
    ['aft', 'forward'],
    ['right', 'left'],
    ['up', 'down'],
  ];
  const missing = lines.find((line) => !axes.some((word) => line.includes(word)));
  return missing === undefined
    ? null
    : `The axes ${axes.join(', ')} do not span space: none of them points ${missing.join(' or ')}.`;
}

/**
 * Three axis words as written, as in `aft,right,up`.
 *
 * @throws RangeError naming the word that is no direction, or the direction that is missing.
 */
export function parseAxes(text: string): AxisTriple {
  const words = text.split(',').map((word) => word.trim().toLowerCase());
  const problem = axesProblem(words);
  if (problem !== null) throw new RangeError(problem);
  const [x, y, z] = words.filter(isDirection);
  if (x === undefined || y === undefined || z === undefined) throw new RangeError(`"${text}" names no axes.`);
  return [x, y, z];
}

/**
 * The signed permutation from components along `axes` to components forward, right, down.
 *
 * @throws RangeError when the three directions do not span space.
 */
export function toForwardRightDown(axes: AxisTriple): Mat3 {
  const problem = axesProblem(axes);
  if (problem !== null) throw new RangeError(problem);
  return transpose([ARROWS[axes[0]], ARROWS[axes[1]], ARROWS[axes[2]]]);
}

/** The signed permutation P from components along `from` to components along `to`. */
export function permutation(from: AxisTriple, to: AxisTriple): Mat3 {
  return multiply(transpose(toForwardRightDown(to)), toForwardRightDown(from));
}

/** +1 for right-handed axes, -1 for left-handed ones such as aft, left, up. */
export function handedness(axes: AxisTriple): 1 | -1 {
  return determinant(toForwardRightDown(axes)) > 0 ? 1 : -1;
}

/** The unit arrow that points in `direction`, in components along `axes`. */
export function arrow(direction: Direction, axes: AxisTriple): Vec3 {
  return applyMat(transpose(toForwardRightDown(axes)), ARROWS[direction]);
}
