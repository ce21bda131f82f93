import { describe, expect, it } from 'vitest';
import { changeFromFormer } from '@/lib/frames/issue-change';
import { NO_POSE, type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { issueDifferences } from '@/lib/mass/issue-differences';
import { radians } from '@/lib/units/convert';
import { geometry } from '@/tests/support/mass';

const FORMER = geometry({ axes: ['aft', 'right', 'up'], incidence: radians(1.5) });

const isBodyKept = (to: AirframeGeometry, lies: Partial<Pose>): boolean =>
  issueDifferences(changeFromFormer(FORMER.axes, { ...NO_POSE, ...lies }, to.axes), FORMER, to).isBodyKept;

describe('the body axes of a next issue', () => {
  it('point as they did where only the datum or the names of the axes are others', () => {
    expect(isBodyKept(FORMER, { origin: [100, 0, 3] })).toBe(true);
    expect(isBodyKept({ ...FORMER, axes: ['forward', 'right', 'down'] }, {})).toBe(true);
    expect(isBodyKept({ ...FORMER, axes: ['aft', 'left', 'up'] }, {})).toBe(true);
  });

  it('point elsewhere where the incidence alone changed, or the reference line alone', () => {
    expect(isBodyKept({ ...FORMER, incidence: radians(3.5) }, {})).toBe(false);
    expect(isBodyKept(FORMER, { pitch: radians(2) })).toBe(false);
    expect(isBodyKept({ ...FORMER, incidence: radians(-0.5) }, { pitch: radians(2) })).toBe(false);
  });

  it('point as they did where the incidence makes up for a reference line laid two degrees nose-down of the old one', () => {
    expect(isBodyKept({ ...FORMER, incidence: radians(3.5) }, { pitch: radians(2) })).toBe(true);
  });
});
