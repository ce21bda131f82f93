import { describe, expect, it } from 'vitest';
import { type AxisTriple } from '@/lib/frames/axes';
import { accountOfComponent, Placement } from '@/lib/mass/place';
import { onSheet, viewAxes } from '@/lib/three-views/views';
import { placesOf } from '@/lib/three-views/places';
import { rocket } from '@/tests/references/nesc';
import { declare, fixtureBytes, fixtureExpectation, readList } from '@/tests/ingest/support';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

const AFT_RIGHT_UP: AxisTriple = ['aft', 'right', 'up'];
const AFT_LEFT_UP: AxisTriple = ['aft', 'left', 'up'];

describe('places of components in the three views', () => {
  it('puts the components of the published two-stage rocket at their stations', async () => {
    // NASA/TM-2015-218675, two-stage rocket package, README.html (restated in tests/references/nesc.ts): solid cylinders from 10 to 35 m
    // and from 0 to 10 m aft of the nose, so that their CGs are in the middle; the payload is a point at the nose.
    const name = 'two-stage-rocket-liftoff';
    const { declarations: said } = fixtureExpectation<{ declarations: unknown }>('lists/valid', name);
    const list = declare(said);
    const { components } = await readList(fixtureBytes('lists/valid', name), list);
    const axes = list.axes;
    const placement = new Placement(list, geometry({ axes, reference: [17, 0, 0] }));
    const side = viewAxes('side', axes);
    const across = components.map((row) => placesOf(row, placement).map((place) => onSheet(place, side)));
    const middle = ({ from, to }: { from: number; to: number }) => (from + to) / 2;
    expect(across).toEqual([
      [[middle(rocket.stage1), 0]],
      [[middle(rocket.stage2), 0]],
      [[rocket.payload.x, 0]],
    ]);
  });

  it('draws the right side on the right side of the sheet in a left-handed frame too', () => {
    // Two metres right of the plane of symmetry and three up: y = 2 in one frame, y = -2 in the other.
    for (const [axes, y] of [
      [AFT_RIGHT_UP, 2],
      [AFT_LEFT_UP, -2],
    ] as const) {
      const placement = new Placement(declarations({ axes }), geometry({ axes }));
      const [place] = placesOf(aComponent({ position: [5, y, 3] }), placement);
      if (place === undefined) throw new Error('no place');
      expect(onSheet(place, viewAxes('plan', axes))).toEqual([5, 2]);
      // Seen from ahead, the right side of the aircraft is at the reader's left.
      expect(onSheet(place, viewAxes('front', axes))).toEqual([-2, 3]);
      expect(onSheet(place, viewAxes('side', axes))).toEqual([5, 3]);
    }
  });

  it('has forward to the left and up at the top, whichever way the coordinates count', () => {
    const axes: AxisTriple = ['down', 'forward', 'left'];
    const placement = new Placement(declarations({ axes }), geometry({ axes }));
    const at = (position: readonly [number, number, number]) => {
      const [place] = placesOf(aComponent({ position }), placement);
      if (place === undefined) throw new Error('no place');
      return onSheet(place, viewAxes('side', axes));
    };
    const [ahead, behind] = [at([0, 4, 0]), at([0, -4, 0])];
    expect(ahead[0]).toBeLessThan(behind[0]);
    expect(at([-1, 0, 0])[1]).toBeGreaterThan(at([1, 0, 0])[1]);
  });

  it('puts a pair even about the plane of symmetry, in a list that has its own frame', () => {
    const lateralPlane = 0.3;
    const frame = geometry({ axes: AFT_RIGHT_UP, lateralPlane, reference: [8, 0, 1] });
    const list = declarations({
      axes: ['forward', 'left', 'up'],
      pose: { origin: [7, -1.2, 0.4], yaw: 0.2, pitch: -0.1, roll: 0.3 },
    });
    const row = aComponent({ position: [1.1, 0.7, -0.2], pair: true, mass: 12 });
    const [listed, image, ...more] = placesOf(row, new Placement(list, frame));
    if (listed === undefined || image === undefined) throw new Error('a pair has two places');
    expect(more).toEqual([]);
    expect((listed[1] + image[1]) / 2).toBeCloseTo(lateralPlane, 12);
    expect([image[0], image[2]]).toEqual([listed[0], listed[2]]);
    // Independent: the account of the pair has its CG half-way between the two.
    const account = accountOfComponent(row, list, frame);
    const cg = account.first.map((moment, k) => moment / account.mass + (frame.reference[k] ?? NaN));
    cg.forEach((value, k) => expect(value).toBeCloseTo(((listed[k] ?? NaN) + (image[k] ?? NaN)) / 2, 12));
  });

  it('puts every row of a half list on both sides, a pair in it no more than that', () => {
    const placement = new Placement(
      declarations({ axes: AFT_RIGHT_UP, extent: 'left-half' }),
      geometry({ axes: AFT_RIGHT_UP }),
    );
    for (const pair of [false, true])
      expect(placesOf(aComponent({ position: [1, -2, 3], pair }), placement)).toEqual([
        [1, -2, 3],
        [1, 2, 3],
      ]);
  });
});
