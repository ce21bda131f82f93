import { applyMat } from '@/lib/numerics/mat3';
import { degrees } from '@/lib/units/convert';

import { type AxisTriple, type Direction, toForwardRightDown } from './axes';
import { type AirframeVec } from './tags';

/** An arrow this near to a direction, degrees, is said to point there. */
const ALONG = 0.05;

const PAIRS: readonly (readonly [Direction, Direction])[] = [
  ['forward', 'aft'],
  ['right', 'left'],
  ['down', 'up'],
];

interface Part {
  readonly word: Direction;
  readonly size: number;
}

/** A vector's parts along the directions of the aircraft, the largest first. */
function partsOf(v: AirframeVec, axes: AxisTriple): Part[] {
  return applyMat(toForwardRightDown(axes), v)
    .map((part, k): Part => {
      const [ahead, back] = PAIRS[k] ?? ['forward', 'aft'];
      return { word: part < 0 ? back : ahead, size: Math.abs(part) };
    })
    .sort((a, b) => b.size - a.size);
}

/** Where a unit arrow points on the aircraft: `aft`, or `aft, 12.0 degrees towards up`. */
export function directionWords(arrow: AirframeVec, axes: AxisTriple): string {
  const [main, ...others] = partsOf(arrow, axes);
  if (main === undefined) return '';
  const off = degrees(Math.acos(Math.min(1, main.size)));
  if (off < ALONG) return main.word;
  const towards = others.filter(({ size }) => degrees(Math.asin(Math.min(1, size))) >= ALONG);
  return `${main.word}, ${off.toFixed(1)} degrees towards ${towards.map(({ word }) => word).join(' and ')}`;
}

/** Where a place lies as seen from another, e.g. `3 m aft, 4 m left and 1 m up`; null where it is the same. `say` prints a length. */
export function offsetWords(
  from: AirframeVec,
  axes: AxisTriple,
  say: (metres: number) => string,
): string | null {
  const parts = partsOf(from, axes).filter(({ size }) => size > 1e-9);
  const words = parts.map(({ word, size }) => `${say(size)} ${word}`);
  const last = words.pop();
  if (last === undefined) return null;
  return words.length === 0 ? last : `${words.join(', ')} and ${last}`;
}
