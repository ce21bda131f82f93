import { describe, expect, it } from 'vitest';

import {
  type AxisTriple,
  DIRECTIONS,
  arrow,
  axesProblem,
  handedness,
  parseAxes,
  permutation,
} from '@/lib/frames/axes';
import { applyMat } from '@/lib/numerics/mat3';

describe('axis directions', () => {
  it('stations aft, butt lines right, waterlines up are right-handed; butt lines left are left-handed (common practice, no source)', () => {
    expect(handedness(['aft', 'right', 'up'])).toBe(1);
    expect(handedness(['forward', 'right', 'down'])).toBe(1);
    expect(handedness(['aft', 'left', 'up'])).toBe(-1);
    expect(handedness(['right', 'aft', 'up'])).toBe(-1);
  });

  it('span space in 48 of 216 ways, half of them right-handed', () => {
    const triples = DIRECTIONS.flatMap((x) =>
      DIRECTIONS.flatMap((y) => DIRECTIONS.map((z): AxisTriple => [x, y, z])),
    ).filter((axes) => axesProblem(axes) === null);
    expect(triples).toHaveLength(48);
    expect(triples.filter((axes) => handedness(axes) === 1)).toHaveLength(24);
  });

  it('that do not span space are refused, naming what is missing', () => {
    expect(axesProblem(['aft', 'forward', 'up'])).toBe(
      'The axes aft, forward, up do not span space: none of them points right or left.',
    );
    expect(axesProblem(['aft', 'right', 'right'])).toMatch(/none of them points up or down/);
    expect(() => handedness(['up', 'right', 'down'])).toThrow(/none of them points aft or forward/);
  });

  it('are parsed from words in any case, and unknown words are refused by name', () => {
    expect(parseAxes('Aft, RIGHT ,up')).toEqual(['aft', 'right', 'up']);
    expect(() => parseAxes('aft,starboard,up')).toThrow(/"starboard" is not an axis direction/);
    expect(() => parseAxes('aft,right')).toThrow(/there are 2/);
  });

  it('permute components with their signs', () => {
    const p = permutation(['aft', 'right', 'up'], ['forward', 'right', 'down']);
    expect(applyMat(p, [1, 2, 3])).toEqual([-1, 2, -3]);
    const q = permutation(['left', 'up', 'forward'], ['aft', 'right', 'up']);
    expect(applyMat(q, [1, 2, 3])).toEqual([-3, -1, 2]);
  });

  it('know where a direction points in other axes', () => {
    expect(arrow('aft', ['aft', 'left', 'up']).map((part) => part + 0)).toEqual([1, 0, 0]);
    expect(arrow('right', ['aft', 'left', 'up']).map((part) => part + 0)).toEqual([0, -1, 0]);
    expect(arrow('up', ['forward', 'right', 'down']).map((part) => part + 0)).toEqual([0, 0, -1]);
  });
});
