import { describe, expect, it } from 'vitest';
import { isWithin, pictureBounds } from '@/lib/three-views/bounds';
import { groupKeys, SERIES, topGroup } from '@/lib/three-views/group-key';
import { placeLabels } from '@/lib/three-views/labels';
import { markRadius, radiusOfOne } from '@/lib/three-views/mark-size';
import { outlinesOf } from '@/lib/three-views/outlines';
import { holds, rangeOf, rangeText, regionBetween } from '@/lib/three-views/region';
import { niceBelow, niceStep, ticksWithin } from '@/lib/three-views/ticks';
import { viewAxes } from '@/lib/three-views/views';
import { type AxisTriple } from '@/lib/frames/axes';
import { geometry } from '@/tests/support/mass';

const AXES: AxisTriple = ['aft', 'right', 'up'];

describe('marks', () => {
  it('have areas in proportion to their masses, a removal as much as what it takes away', () => {
    const ofOne = radiusOfOne([400, -900, 0.1], 0.6);
    const area = (mass: number): number => Math.PI * markRadius(mass, ofOne) ** 2;
    expect(markRadius(900, ofOne)).toBeCloseTo(0.6, 12);
    for (const mass of [0.1, 3, 400]) expect(area(mass) / area(900)).toBeCloseTo(mass / 900, 12);
    expect(area(-5)).toBe(area(5));
  });

  it('are drawn large ones first, each whole in one path of its look', () => {
    const circle = { x: 1, y: 2, shape: 'circle' } as const;
    const outlines = outlinesOf(
      [
        { ...circle, radius: 0.05, look: 'a' },
        { ...circle, radius: 1, look: 'a' },
        { ...circle, radius: 0.05, look: 'b' },
        { ...circle, radius: 0.05, look: 'a' },
      ],
      0.01,
    );
    expect(outlines.map(({ look, d }) => [look, d.split('z').length - 1])).toEqual([
      ['a', 1],
      ['a', 2],
      ['b', 1],
    ]);
    expect(outlines[0]?.d).toBe('M0 2a1 1 0 1 0 2 0a1 1 0 1 0 -2 0z');
  });

  it('of cells are squares of the same area', () => {
    const [outline] = outlinesOf([{ x: 5, y: 5, radius: 2, shape: 'square', look: 'a' }], 0.01);
    const side = Number(/h([\d.]+)v/.exec(outline?.d ?? '')?.[1]);
    expect(side ** 2).toBeCloseTo(Math.PI * 4, 2);
  });
});

describe('the ruled edges', () => {
  it('count in ones, twos or fives', () => {
    expect([0.03, 0.2, 0.21, 1.2, 4.9, 73].map(niceStep)).toEqual([0.05, 0.2, 0.5, 2, 5, 100]);
    expect([0.03, 0.2, 1.2, 4.9, 83].map(niceBelow)).toEqual([0.02, 0.2, 1, 2, 50]);
  });

  it('label every whole step in range and tick between them', () => {
    const { labelled, between, step, decimals } = ticksWithin(-0.4, 6.3, 4);
    expect({ labelled, step, decimals }).toEqual({ labelled: [0, 2, 4, 6], step: 2, decimals: 0 });
    expect(between).toEqual([0.5, 1, 1.5, 2.5, 3, 3.5, 4.5, 5, 5.5]);
  });
});

describe('the bounds of the picture', () => {
  const frame = geometry({
    axes: AXES,
    reference: [8, 0, 2],
    lateralPlane: 0,
    lemac: [7.5, 0, 2],
    mac: 2,
    span: 17,
    length: 15,
  });
  const mark = (x: number, y: number, z: number) => ({ place: [x, y, z] as const, radius: 0.2 });

  it('hold every mark and are even about the plane of symmetry', () => {
    const marks = [mark(3, -7, 1), mark(16, 2, 5)];
    const bounds = pictureBounds(marks, [], frame);
    expect(marks.every(({ place }) => isWithin(place, bounds))).toBe(true);
    expect(bounds[1][0] + bounds[1][1]).toBeCloseTo(0, 12);
  });

  it('take in a datum that is near, and none that is far', () => {
    const near = pictureBounds([mark(2, 0, 1), mark(16, 0, 3)], [], frame);
    expect(isWithin([0, 0, 0], near)).toBe(true);
    const far = { ...frame, reference: [1008, 0, 2], lemac: [1007.5, 0, 2] } as const;
    expect(isWithin([0, 0, 0], pictureBounds([mark(1002, 0, 1), mark(1016, 0, 3)], [], far))).toBe(false);
  });

  it('are not widened by a row a thousand metres off, which then lies outside them', () => {
    const marks = [mark(3, 0, 1), mark(16, 0, 3)];
    expect(pictureBounds([...marks, mark(4000, 0, 1)], [], frame)).toEqual(pictureBounds(marks, [], frame));
  });
});

describe('a region', () => {
  it('drawn on a view bounds the two coordinates that the view sees, the right way round', () => {
    const axes: AxisTriple = ['forward', 'left', 'down'];
    // Two to five metres aft and one to three up: x from -5 to -2, z from -3 to -1.
    expect(regionBetween([2, 3], [5, 1], viewAxes('side', axes))).toEqual([[-5, -2], null, [-3, -1]]);
  });

  it('narrows the one before it', () => {
    const before = [[0, 10], null, [0, 4]] as const;
    expect(regionBetween([-2, 1], [3, 2], viewAxes('front', AXES), before)).toEqual([
      [0, 10],
      [-3, 2],
      [1, 2],
    ]);
    expect(regionBetween([4, 1], [12, 9], viewAxes('side', AXES), before)).toEqual([[4, 10], null, [1, 4]]);
  });

  it('holds what lies on its faces', () => {
    expect(holds([[1, 2], null, null], [2, 50, -50])).toBe(true);
    expect(holds([[1, 2], null, null], [2.001, 50, -50])).toBe(false);
  });

  it('is written in an address and read back, open ends too', () => {
    for (const range of [
      [2.5, 4],
      [-3, Infinity],
      [-Infinity, 0.125],
    ] as const)
      expect(rangeOf(rangeText(range))).toEqual(range);
    expect(rangeOf('4..2')).toEqual([2, 4]);
    for (const text of [null, '', '..', '3', '1..2..3', 'a..2', '1,5..2', 'Infinity..', '0x10..'])
      expect(rangeOf(text)).toBeNull();
  });
});

describe('groups', () => {
  it('give their colours to the heaviest and a letter to each that no other has', () => {
    const names = ['Wing', 'Body', 'Waste', 'Winglet', 'Bay', 'Tail', 'Gear', 'Oil', 'B'];
    const keys = groupKeys(new Map(names.map((name, index) => [name, 100 - index])));
    expect(keys.map(({ series }) => series)).toEqual([1, 2, 3, 4, 5, 6, SERIES, null, null]);
    expect(new Set(keys.map(({ letter }) => letter)).size).toBe(names.length);
    expect(keys.slice(0, 3).map(({ letter }) => letter)).toEqual(['W', 'B', 'A']);
  });

  it('are those of the first level', () => {
    expect(topGroup('Wing/Spars/Front')).toBe('Wing');
  });
});

describe('labels', () => {
  const sheet = { width: 200, height: 100 };
  const wish = { clear: 5, width: 40 };

  it('stand right of their marks, or left where the sheet ends', () => {
    const [near, far] = placeLabels(
      [
        { key: 'near', x: 50, y: 30, ...wish },
        { key: 'far', x: 190, y: 60, ...wish },
      ],
      [],
      sheet,
    );
    expect([near?.anchor, far?.anchor]).toEqual(['start', 'end']);
  });

  it('never lie on one another, and are left out where there is no room', () => {
    const crowd = Array.from({ length: 12 }, (_, index) => ({ key: String(index), x: 100, y: 50, ...wish }));
    const placed = placeLabels(crowd, [], sheet);
    expect(placed.length).toBe(4);
    expect(new Set(placed.map(({ x, y }) => `${x} ${y}`)).size).toBe(4);
  });
});
