import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type AxisTriple, DIRECTIONS, arrow, axesProblem, handedness } from '@/lib/frames/axes';
import { carriedPose } from '@/lib/frames/carry';
import {
  changeFromFormer,
  changedArrow,
  changedPlace,
  followedBy,
  reversed,
} from '@/lib/frames/issue-change';
import { IssueChain } from '@/lib/frames/issue-chain';
import { NO_POSE, type Pose, listToAirframe, placeFrom } from '@/lib/frames/pose';
import { determinant } from '@/lib/numerics/mat3';
import { anglesOf, rotation } from '@/lib/numerics/rotation';
import { type Vec3 } from '@/lib/numerics/vec3';
import { radians } from '@/lib/units/convert';

const USUAL: AxisTriple = ['aft', 'right', 'up'];
const LEFT_HANDED: AxisTriple = ['aft', 'left', 'up'];
const FORWARD: AxisTriple = ['forward', 'right', 'down'];

const ALL_AXES = DIRECTIONS.flatMap((x) =>
  DIRECTIONS.flatMap((y) => DIRECTIONS.map((z): AxisTriple => [x, y, z])),
).filter((axes) => axesProblem(axes) === null);

const within = (limit: number) => fc.double({ min: -limit, max: limit, noNaN: true });
const place: fc.Arbitrary<Vec3> = fc.tuple(within(50), within(50), within(50));
const pose: fc.Arbitrary<Pose> = fc.record({
  origin: place,
  yaw: within(3),
  pitch: within(1.5),
  roll: within(3),
});
const axes = fc.constantFrom(...ALL_AXES);

const lies = (said: Partial<Pose>): Pose => ({ ...NO_POSE, ...said });
const close = (a: Vec3, b: Vec3, digits = 10) =>
  a.forEach((part, k) => expect(part).toBeCloseTo(b[k] ?? NaN, digits));

describe('a place of one frame issue in the next', () => {
  it('has its station moved by as much as the datum went forward', () => {
    // By hand: the new datum lies 2.5 m ahead of the old one, so the old datum is station 2.5 of the new issue.
    const change = changeFromFormer(USUAL, lies({ origin: [2.5, 0, 0] }), USUAL);
    expect(changedPlace(change, [6, -1, 1.2])).toEqual([8.5, -1, 1.2]);
  });

  it('is counted the other way where axes were turned round, and to the left where butt lines were', () => {
    const forward = changeFromFormer(USUAL, NO_POSE, FORWARD);
    expect(changedPlace(forward, [6, 1, 1.2])).toEqual([-6, 1, -1.2]);
    const left = changeFromFormer(USUAL, NO_POSE, LEFT_HANDED);
    expect(changedPlace(left, [6, 1, 1.2])).toEqual([6, -1, 1.2]);
    expect(determinant(left.matrix)).toBe(-1);
  });

  it('turns with a reference line that was laid anew', () => {
    // By hand: the old frame pitched by 90 degrees about the new y: old x points to new -z.
    const change = changeFromFormer(USUAL, lies({ pitch: radians(90) }), USUAL);
    expect(changedPlace(change, [3, 1, 0]).map((part) => part + 0)).toEqual([0, 1, -3]);
  });

  it('comes back by the way back, to the last digits of the coordinates', () => {
    fc.assert(
      fc.property(axes, pose, axes, place, (former, step, now, r) => {
        const change = changeFromFormer(former, step, now);
        close(changedPlace(reversed(change), changedPlace(change, r)), r, 11);
      }),
    );
  });

  it('comes back exactly from a datum 10 km away, however the decimals fall', () => {
    const away = changeFromFormer(USUAL, lies({ origin: [10_000.1, 0.3, -0.7] }), USUAL);
    const back = changeFromFormer(USUAL, lies({ origin: [-10_000.1, -0.3, 0.7] }), USUAL);
    expect(changedPlace(followedBy(away, back), [6.1, 0.2, 1.3])).toEqual([6.1, 0.2, 1.3]);
  });

  it('is the same by two steps as by their composition, in that order', () => {
    fc.assert(
      fc.property(axes, pose, axes, pose, axes, place, (a, first, b, second, c, r) => {
        const [ab, bc] = [changeFromFormer(a, first, b), changeFromFormer(b, second, c)];
        close(changedPlace(followedBy(ab, bc), r), changedPlace(bc, changedPlace(ab, r)), 11);
      }),
    );
  });

  it('keeps distances and turns arrows without moving them', () => {
    const change = changeFromFormer(USUAL, lies({ origin: [4, 5, 6], roll: radians(90) }), USUAL);
    expect(changedArrow(change, [0, 1, 0]).map((part) => part + 0)).toEqual([0, 0, 1]);
  });
});

describe('the issues of a program', () => {
  const chain = new IssueChain([
    { number: 3, axes: LEFT_HANDED, former: lies({ origin: [0, 0.5, 0] }) },
    { number: 1, axes: USUAL, former: null },
    { number: 2, axes: USUAL, former: lies({ origin: [2, 0, 0] }) },
  ]);

  it('lead from any of them to any other, forward and back', () => {
    const there = chain.between(1, 3);
    const back = chain.between(3, 1);
    if (there === null || back === null) throw new Error('every step is stated');
    expect(changedPlace(there, [6, 1, 1])).toEqual([8, -0.5, 1]);
    expect(changedPlace(back, [8, -0.5, 1])).toEqual([6, 1, 1]);
    expect(chain.between(2, 2)).toEqual({ matrix: expect.anything(), offset: expect.anything() });
    expect(changedPlace(chain.between(2, 2) ?? there, [1, 2, 3])).toEqual([1, 2, 3]);
  });

  it('do not lead across one that does not say how it lies, and name it', () => {
    const broken = new IssueChain([
      { number: 1, axes: USUAL, former: null },
      { number: 2, axes: USUAL, former: null },
      { number: 3, axes: USUAL, former: NO_POSE },
    ]);
    expect(broken.between(1, 3)).toBeNull();
    expect(broken.gapBetween(3, 1)).toBe(2);
    expect(broken.between(2, 3)).not.toBeNull();
    expect(broken.gapBetween(2, 3)).toBeNull();
  });

  it('are those there are', () => {
    expect(() => chain.between(1, 9)).toThrow('no frame issue 9');
  });
});

describe('a list frame carried to another issue', () => {
  it('is where it was, with the same axis words, whatever the hands of list and issues', () => {
    fc.assert(
      fc.property(axes, pose, axes, pose, axes, place, (list, at, former, step, now, r) => {
        const change = changeFromFormer(former, step, now);
        const carried = carriedPose(list, at, change, former, now);
        const before = placeFrom([0, 0, 0], listToAirframe(list, at, former), at.origin, r);
        const after = placeFrom([0, 0, 0], listToAirframe(list, carried, now), carried.origin, r);
        close(after, changedPlace(change, before), 10);
      }),
    );
  });

  it('gets no angle from rounding where only the datum moved', () => {
    const change = changeFromFormer(USUAL, lies({ origin: [2.5, 0, 0] }), LEFT_HANDED);
    expect(carriedPose(FORWARD, lies({ origin: [1, 0.25, 0] }), change, USUAL, LEFT_HANDED)).toEqual({
      origin: [3.5, -0.25, 0],
      yaw: 0,
      pitch: 0,
      roll: 0,
    });
  });
});

describe('yaw, pitch and roll of a rotation', () => {
  it('make it again, at a pitch of 90 degrees too', () => {
    fc.assert(
      fc.property(
        within(4),
        fc.oneof(within(4), fc.constantFrom(radians(90), radians(-90))),
        within(4),
        (y, p, r) => {
          const turn = rotation(y, p, r);
          const { yaw, pitch, roll } = anglesOf(turn);
          rotation(yaw, pitch, roll).forEach((row, i) => close(row, turn[i] ?? [NaN, NaN, NaN], 11));
        },
      ),
    );
  });
});

it('every frame of three directions is tried', () => {
  expect(ALL_AXES).toHaveLength(48);
  expect(ALL_AXES.filter((each) => handedness(each) === 1)).toHaveLength(24);
  expect(arrow('aft', USUAL)).toEqual([1, -0, 0].map((part) => expect.closeTo(part, 15)));
});
