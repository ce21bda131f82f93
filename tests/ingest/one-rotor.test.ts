import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rotorFormSchema } from '@/lib/contracts/rotor-form';
import { keepUntyped, rotorFromTexts, textsOfRotor } from '@/lib/ingest/one-rotor';
import { type Rotor } from '@/lib/rotors/rotor';
import { fromSi, radians } from '@/lib/units/convert';
import { INERTIA_UNITS } from '@/lib/units/table';

const FAN = {
  rotor: 'Fan',
  polar_inertia: '2.5',
  axis_yaw: '2',
  axis_pitch: '-3',
  sense: 'cw',
};

const said = (texts: Record<string, string>) =>
  rotorFromTexts(texts, 'kg.m2').problems.map(({ column }) => column);

describe('a rotor as typed', () => {
  it('is read as a row of its file is: angles in degrees from straight forward, blanks as the contract says', () => {
    expect(rotorFromTexts(FAN, 'kg.m2')).toEqual({
      rotor: {
        rotor: 'Fan',
        polarInertia: 2.5,
        axis: { kind: 'angles', yaw: radians(2), pitch: radians(-3), sense: 'cw' },
        gearRatio: 1,
        shaft: 'Fan',
        component: null,
        blades: null,
        polarInertiaSigma: null,
        group: null,
        note: null,
      },
      problems: [],
    });
  });

  it('is read in the unit that is declared', () => {
    for (const unit of INERTIA_UNITS) {
      const { rotor } = rotorFromTexts(FAN, unit);
      expect(fromSi(rotor?.polarInertia ?? NaN, unit)).toBeCloseTo(2.5, 12);
    }
  });

  it('names the field that is wrong', () => {
    expect(said({ ...FAN, rotor: ' ' })).toEqual(['rotor']);
    expect(said({ ...FAN, polar_inertia: '0' })).toEqual(['polar_inertia']);
    expect(said({ ...FAN, polar_inertia: '2,5' })).toEqual(['polar_inertia']);
    expect(said({ ...FAN, polar_inertia_sigma: '-1' })).toEqual(['polar_inertia_sigma']);
    expect(said({ ...FAN, axis_pitch: '60' })).toEqual(['axis_pitch']);
    expect(said({ ...FAN, axis_yaw: '' })).toEqual(['axis_yaw']);
    expect(said({ ...FAN, sense: 'rh' })).toEqual(['sense']);
    expect(said({ ...FAN, gear_ratio: '-2' })).toEqual(['gear_ratio']);
    expect(said({ ...FAN, component: 'PROP-L' })).toEqual(['component']);
    expect(said({ ...FAN, blades: '2.5' })).toEqual(['blades']);
    const arrow = { rotor: 'Fan', polar_inertia: '2.5', sense: 'rh' };
    expect(said({ ...arrow, axis_x: '0', axis_y: '0', axis_z: '0' })).toEqual(['axis_x']);
    expect(said({ ...arrow, axis_x: '0', axis_y: '', axis_z: '1' })).toEqual(['axis_y']);
  });

  it('comes from a form with its revision and reason, or with a problem at every wrong field', () => {
    const form = { ...FAN, base: '3', reason: 'new fan', was: '', inertia_unit: 'lb.ft2' };
    expect(rotorFormSchema.parse(form)).toMatchObject({ base: 3, was: null, inertiaUnit: 'lb.ft2' });
    const wrong = rotorFormSchema.safeParse({ ...form, sense: '', gear_ratio: '0' });
    expect(wrong.error?.issues.map(({ path }) => path)).toEqual([['gear_ratio'], ['sense']]);
    expect(rotorFormSchema.safeParse({ ...form, inertia_unit: '' }).success).toBe(false);
  });
});

const positive = fc.double({ min: 1e-3, max: 1e4, noNaN: true });
const anyRotor: fc.Arbitrary<Rotor> = fc.record({
  rotor: fc.constantFrom('Fan', 'Core 2'),
  polarInertia: positive,
  axis: fc.oneof(
    fc.record({
      kind: fc.constant('angles' as const),
      yaw: fc.double({ min: -1.5, max: 1.5, noNaN: true }),
      pitch: fc.double({ min: -1, max: 1, noNaN: true }),
      sense: fc.constantFrom('cw' as const, 'ccw' as const),
    }),
    fc.record({
      kind: fc.constant('arrow' as const),
      x: positive,
      y: positive,
      z: positive,
      hand: fc.constantFrom('rh' as const, 'lh' as const),
    }),
  ),
  gearRatio: positive,
  shaft: fc.constantFrom('Fan', 'N1'),
  component: fc.constantFrom(null, 'engines/FAN'),
  blades: fc.constantFrom(null, 2, 14),
  polarInertiaSigma: fc.option(positive),
  group: fc.constantFrom(null, 'Engine'),
  note: fc.constantFrom(null, 'wide chord'),
});

describe('a stored rotor', () => {
  it('comes through its form to the last bit where nothing is typed, in any unit', () => {
    fc.assert(
      fc.property(anyRotor, fc.constantFrom(...INERTIA_UNITS), (rotor, unit) => {
        const { rotor: read } = rotorFromTexts(textsOfRotor(rotor, unit), unit);
        if (read === null) throw new Error('not read');
        expect(keepUntyped(rotor, read, unit)).toEqual(rotor);
      }),
    );
  });

  it('takes what is typed', () => {
    const { rotor } = rotorFromTexts(FAN, 'kg.m2');
    const { rotor: heavier } = rotorFromTexts({ ...FAN, polar_inertia: '2.6', axis_yaw: '2.5' }, 'kg.m2');
    if (rotor === null || heavier === null) throw new Error('not read');
    expect(keepUntyped(rotor, heavier, 'kg.m2')).toEqual(heavier);
  });
});
