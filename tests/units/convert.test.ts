import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  asTyped,
  degrees,
  degreesAsTyped,
  fromSi,
  radians,
  radiansPerSecond,
  rpm,
  toSi,
} from '@/lib/units/convert';
import { OUTPUT_UNITS, parseUnit, unitLabel } from '@/lib/units/names';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS, type Unit } from '@/lib/units/table';

const units: Unit[] = [...MASS_UNITS, ...LENGTH_UNITS, ...INERTIA_UNITS];

/** A number of at most `digits` digits, as a person would type it. */
const typedNumber = fc
  .tuple(fc.integer({ min: -999_999_999, max: 999_999_999 }), fc.integer({ min: 0, max: 6 }))
  .map(([digits, places]) => Number(`${digits}e-${places}`));

describe('conversion', () => {
  it.each(units)('shows a value in %s again as it was typed', (unit) => {
    fc.assert(
      fc.property(typedNumber, (value) => {
        expect(asTyped(toSi(value, unit), unit)).toBe(value);
      }),
    );
  });

  it('there and back is within two roundings', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-9, max: 1e9, noNaN: true }),
        fc.constantFrom(...units),
        (value, unit) => {
          expect(Math.abs(fromSi(toSi(value, unit), unit) / value - 1)).toBeLessThanOrEqual(
            2 * Number.EPSILON,
          );
        },
      ),
    );
  });

  it('shows angles again as they were typed', () => {
    fc.assert(
      fc.property(typedNumber, (value) => {
        expect(degreesAsTyped(radians(value))).toBe(value);
      }),
    );
    expect(radians(180)).toBe(Math.PI);
    expect(degrees(Math.PI / 2)).toBe(90);
  });

  it('has 60 rpm as one turn a second', () => {
    expect(radiansPerSecond(60)).toBeCloseTo(2 * Math.PI, 14);
    expect(rpm(radiansPerSecond(1200))).toBeCloseTo(1200, 12);
  });
});

describe('unit names', () => {
  it('are read in any case and never guessed', () => {
    expect(parseUnit(' Slug.FT2 ', INERTIA_UNITS)).toBe('slug.ft2');
    expect(parseUnit('', MASS_UNITS)).toBeNull();
    expect(parseUnit('lbs', MASS_UNITS)).toBeNull();
    expect(parseUnit('kg', LENGTH_UNITS)).toBeNull();
  });

  it('are set in print with raised exponents', () => {
    expect(unitLabel('lbf.ft.s2')).toBe('lbf·ft·s²');
    expect(unitLabel('kg.m2/s')).toBe('kg·m²/s');
    expect(unitLabel('kg')).toBe('kg');
  });

  it('of results are SI or lb, in, slug.ft2, slug.ft2/s', () => {
    const { mass, length, inertia, angularMomentum } = OUTPUT_UNITS.si;
    for (const unit of [mass, length, inertia, angularMomentum]) expect(toSi(1, unit)).toBe(1);
    expect(OUTPUT_UNITS.us).toEqual({
      mass: 'lb',
      length: 'in',
      inertia: 'slug.ft2',
      angularMomentum: 'slug.ft2/s',
    });
  });
});
