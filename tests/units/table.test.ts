import { describe, expect, it } from 'vitest';

import { toSi } from '@/lib/units/convert';
import { FOOT, INCH, POUND, STANDARD_GRAVITY } from '@/lib/units/table';
import { cannonball } from '@/tests/references/nesc';
import { FACTORS_TO_SI, RATIOS } from '@/tests/references/units';

describe('the factor table', () => {
  it.each(FACTORS_TO_SI)('has 1 $unit as NIST SP 811 defines it', ({ unit, si }) => {
    // The reference prints 13 to 16 digits.
    expect(Math.abs(toSi(1, unit) / si - 1)).toBeLessThanOrEqual(1e-12);
  });

  it.each(RATIOS)('has $ratio $other in a $one (NIST SP 811)', ({ one, other, ratio }) => {
    expect(Math.abs(toSi(1, one) / toSi(1, other) / ratio - 1)).toBeLessThanOrEqual(1e-15);
  });

  it('takes the definitions as they stand: NIST SP 811, appendix B', () => {
    expect([POUND, INCH, FOOT, STANDARD_GRAVITY]).toEqual([0.45359237, 0.0254, 0.3048, 9.80665]);
    expect(12 * INCH).toBeCloseTo(FOOT, 15);
  });

  it('divides grams and millimetres by whole numbers, so that no digit is lost', () => {
    expect(toSi(3, 'mm')).toBe(0.003);
    expect(toSi(7, 'g')).toBe(0.007);
    expect(toSi(9, 'g.mm2')).toBe(9e-9);
  });

  it('has lbf.ft.s2 as another name of slug.ft2, and lbf.in.s2 as a twelfth of it', () => {
    expect(toSi(1, 'lbf.ft.s2')).toBe(toSi(1, 'slug.ft2'));
    expect(12 * toSi(1, 'lbf.in.s2')).toBeCloseTo(toSi(1, 'slug.ft2'), 14);
  });

  it('shows the published unit slip of the NESC cannonball: 3.6 is slug.in2, not slug.ft2', () => {
    const { publishedMoment, publishedUnit, rightUnit, rightMoment, massSlug, radiusInches } = cannonball;
    const closedForm = 0.4 * toSi(massSlug, 'slug') * toSi(radiusInches, 'in') ** 2;
    expect(toSi(publishedMoment, rightUnit)).toBeCloseTo(closedForm, 14);
    expect(toSi(rightMoment, 'slug.ft2')).toBeCloseTo(closedForm, 14);
    // As published, the radius of gyration is 1.9 ft in a ball of a quarter foot.
    const gyration = Math.sqrt(toSi(publishedMoment, publishedUnit) / toSi(massSlug, 'slug'));
    expect(gyration / toSi(1, 'ft')).toBeCloseTo(1.897, 3);
  });
});
