import { describe, expect, it } from 'vitest';
import { frameDoubts, type TypedIssue } from '@/components/settings/frame-doubts';
import { NO_POSE } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';

const FIRST: AirframeGeometry = {
  axes: ['aft', 'right', 'up'],
  lateralPlane: 0,
  incidence: 0,
  reference: [6.5, 0, 1],
  lemac: [6, 0, 1],
  mac: 2,
  span: 18,
  length: 15,
};
const FORMER = { number: 1, geometry: FIRST };
const MOVED = { ...NO_POSE, origin: [100, 0, 0] } as const;
const issue = (said: Partial<TypedIssue>): TypedIssue => ({ ...FIRST, ...said });

describe('the form of a next frame issue', () => {
  it('has nothing to doubt where chord and plane are the same on the aircraft', () => {
    expect(frameDoubts(FORMER, NO_POSE, issue({}), 'm')).toEqual([]);
    expect(frameDoubts(FORMER, MOVED, issue({ lemac: [106, 0, 1], reference: [106.5, 0, 1] }), 'm')).toEqual(
      [],
    );
  });

  it('says where the former LEMAC is when the datum moved and the chord was left as it stood', () => {
    const [chord, ...others] = frameDoubts(FORMER, MOVED, issue({}), 'm');
    expect(chord).toContain('LEMAC is at x 106, y 0, z 1 m of the new frame');
    expect(others).toEqual([]);
    expect(frameDoubts(FORMER, MOVED, issue({}), 'mm').join(' ')).toContain('x 106000, y 0, z 1000 mm');
  });

  it('says so when the point of the sums was left behind, unless it is left blank', () => {
    expect(frameDoubts(FORMER, MOVED, issue({ lemac: [106, 0, 1] }), 'm').join(' ')).toContain('blank');
    expect(frameDoubts(FORMER, MOVED, issue({ lemac: [106, 0, 1], reference: null }), 'm')).toEqual([]);
  });

  it('says so when the plane of symmetry or the body axes would be others of the aircraft', () => {
    const aside = { ...NO_POSE, origin: [0, 0.5, 0] } as const;
    const kept = issue({ lemac: [6, 0.5, 1], lateralPlane: 0.5 });
    expect(frameDoubts(FORMER, aside, kept, 'm')).toEqual([]);
    expect(frameDoubts(FORMER, aside, { ...kept, lateralPlane: 0 }, 'm').join(' ')).toContain(
      'another plane',
    );
    const level = { ...NO_POSE, pitch: 0.05 };
    expect(frameDoubts(FORMER, level, issue({}), 'm').join(' ')).toContain('Body axes');
    expect(frameDoubts(FORMER, level, issue({ incidence: 0.05 }), 'm').join(' ')).not.toContain('Body axes');
    const turned = { ...NO_POSE, yaw: Math.PI / 2 };
    expect(frameDoubts(FORMER, turned, issue({}), 'm').join(' ')).toContain('another plane');
  });
});
