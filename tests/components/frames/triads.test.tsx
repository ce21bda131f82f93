import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';

import { TriadSketch } from '@/components/frames/triad-sketch';
import { oblique } from '@/components/frames/oblique';
import { type TriadsInput, triadsOf } from '@/components/frames/triads';
import { TypedListSketch } from '@/components/lists/list-sketch';
import { NO_POSE } from '@/lib/frames/pose';
import { determinant } from '@/lib/numerics/mat3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { radians } from '@/lib/units/convert';

const input = (said: Partial<TriadsInput> = {}): TriadsInput => ({
  airframe: { axes: ['aft', 'right', 'up'], lateralPlane: 0, incidence: 0 },
  axes: ['aft', 'right', 'up'],
  pose: NO_POSE,
  extent: 'whole',
  example: null,
  unit: 'm',
  ...said,
});
const sentences = (said: Partial<TriadsInput>): readonly string[] => triadsOf(input(said)).sentences;
const markup = (said: Partial<TriadsInput>): string =>
  renderToStaticMarkup(<TriadSketch triads={triadsOf(input(said))} />);

describe('the words of a list frame', () => {
  it('say where +x, +y and +z of the list point on the aircraft', () => {
    expect(sentences({ axes: ['forward', 'left', 'up'] })[0]).toBe(
      'Of the list, +x points forward; +y points left; +z points up.',
    );
  });

  it('say it of turned frames too, with the angle', () => {
    // By hand: yawed by 90 degrees about z up, list x (aft) points to airframe +y, right, and list y to -x, forward.
    expect(sentences({ pose: { ...NO_POSE, yaw: radians(90) } })[0]).toBe(
      'Of the list, +x points right; +y points forward; +z points up.',
    );
    // Pitched by 12 degrees about y right: x turns from aft towards -z, down.
    expect(sentences({ pose: { ...NO_POSE, pitch: radians(12) } })[0]).toBe(
      'Of the list, +x points aft, 12.0 degrees towards down; +y points right; +z points up, 12.0 degrees towards aft.',
    );
  });

  it('name both hands', () => {
    expect(sentences({})[1]).toBe('The list and the airframe are both right-handed.');
    expect(sentences({ axes: ['aft', 'left', 'up'] })[1]).toBe(
      'The list is left-handed, the airframe right-handed.',
    );
    const airframe = { axes: ['aft', 'left', 'up'], lateralPlane: 0, incidence: 0 } as const;
    expect(sentences({ airframe })[1]).toBe('The list is right-handed, the airframe left-handed.');
  });

  it('place the origin and the example in both frames, and the example on its side', () => {
    const told = sentences({
      axes: ['forward', 'left', 'up'],
      pose: { ...NO_POSE, origin: [10, 0, 1] },
      example: { item: 'fin', position: [-2, 0.5, 3], pair: false },
    });
    // By hand: 10 aft + 2 aft, 0.5 left, 1 + 3 up.
    expect(told[2]).toBe('The list counts from a point 10 m aft and 1 m up of the datum of the airframe.');
    expect(told[3]).toBe(
      'fin, for example, at x -2, y 0.5, z 3 m of the list, is at x 12, y -0.5, z 4 m of the airframe: 12 m aft, 4 m up and 0.5 m left, on the left.',
    );
  });

  it('tell in the unit of the list', () => {
    const told = sentences({ unit: 'in', example: { item: 'clip', position: [0.254, 0, 0], pair: false } });
    expect(told[3]).toContain('at x 10, y 0, z 0 in of the list');
    expect(told[3]).toContain('in the plane of symmetry');
  });

  it('show the mirror image of pairs and half lists across the plane of symmetry of the airframe', () => {
    const airframe = { axes: ['aft', 'right', 'up'], lateralPlane: 0.1, incidence: 0 } as const;
    const example = { item: 'rib', position: [6, -2, 1], pair: false } as const;
    const half = sentences({ airframe, extent: 'left-half', example });
    expect(half).toContain(
      'It stands for its mirror image too, at y 2.2 m, across the plane of symmetry at y 0.1 m.',
    );
    expect(half).toContain('The list holds the left half; every row of it is mirrored.');
    expect(sentences({ airframe, example: { ...example, pair: true } })).toContain(half[4]);
    expect(triadsOf(input({ airframe, example })).image).toBeNull();
  });

  it('doubt a left half whose example lies on the right', () => {
    const example = { item: 'rib', position: [6, 2, 1], pair: false } as const;
    const { doubts } = triadsOf(input({ extent: 'left-half', example }));
    expect(doubts).toEqual(['rib of this left half lies on the right. Look at the axes, or at the extent.']);
    expect(triadsOf(input({ extent: 'left-half', example, axes: ['aft', 'left', 'up'] })).doubts).toEqual([]);
    expect(markup({ extent: 'left-half', example })).toContain(doubts[0]);
  });

  it('tell the incidence of body x', () => {
    const airframe = { axes: ['aft', 'right', 'up'], lateralPlane: 0, incidence: radians(-1.5) } as const;
    expect(sentences({ airframe }).at(-1)).toBe(
      'Body x points forward, 1.5 degrees nose-down of the reference line.',
    );
  });
});

describe('the picture of a list frame', () => {
  it('is seen from above, ahead and to the left, as it says: what points there points at the eye', () => {
    // Of a right-handed set seen from outside the corner of its positive axes, the three turn against the clock.
    const turn = (a: Vec3, b: Vec3): number => {
      const [[ax, ay], [bx, by]] = [oblique(a), oblique(b)];
      return -(ax * by - ay * bx);
    };
    const [ahead, left, above]: [Vec3, Vec3, Vec3] = [
      [1, 0, 0],
      [0, -1, 0],
      [0, 0, -1],
    ];
    expect(determinant([ahead, left, above])).toBe(1);
    for (const [a, b] of [
      [ahead, left],
      [left, above],
      [above, ahead],
    ] as const)
      expect(turn(a, b)).toBeGreaterThan(0);
  });

  it('says the same in its text alternative, names the example, and draws an image only where something is mirrored', () => {
    const example = { item: 'rib', position: [6, -2, 1], pair: true } as const;
    const pair = markup({ example });
    expect(pair).toMatch(/role="img" aria-label="[^"]*\+x points aft[^"]*mirror image/);
    expect(pair.match(/<circle/g)?.length).toBe(4);
    expect(markup({ example: { ...example, pair: false } }).match(/<circle/g)?.length).toBe(3);
    expect(pair).toContain('>rib</text>');
    expect(pair).toContain('>x aft</text>');
    expect(markup({ axes: ['forward', 'left', 'up'], pose: { ...NO_POSE, origin: [9, 0, 0] } })).toContain(
      '>y left</text>',
    );
  });

  it('draws a datum 10 km away nearer, and says so', () => {
    const far = { pose: { ...NO_POSE, origin: [10_000, 0, 0] as const } };
    const example = { item: 'rib', position: [6, -2, 1], pair: false } as const;
    expect(markup({ ...far, example })).toContain('far away, drawn nearer');
    expect(markup({ example })).not.toContain('drawn nearer');
  });

  it('follows what is typed, and waits while the axes span no space', () => {
    const frame = { axes: ['aft', 'right', 'up'], lateralPlane: 0, incidence: 0 } as const;
    const texts = { axis_x: 'forward', axis_y: 'left', axis_z: 'up', origin_x: '100', length_unit: 'in' };
    const typed = renderToStaticMarkup(<TypedListSketch texts={texts} frame={frame} example={null} />);
    expect(typed).toContain('+y points left');
    expect(typed).toContain('100 in aft');
    expect(
      renderToStaticMarkup(
        <TypedListSketch texts={{ ...texts, axis_y: 'aft' }} frame={frame} example={null} />,
      ),
    ).toBe('');
    expect(
      renderToStaticMarkup(
        <TypedListSketch texts={{ ...texts, origin_x: '1e' }} frame={frame} example={null} />,
      ),
    ).toContain('counts from the datum');
  });
});
