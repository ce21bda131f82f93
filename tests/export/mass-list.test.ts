import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { massListWriter } from '@/lib/export/mass-list';
import { typedNumber } from '@/lib/export/typed-number';
import { type ScaledColumn, listScales, scaled } from '@/lib/ingest/mass-list/columns';
import { CATEGORIES, CHANGE_STATUSES, type Component, MATURITIES } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';
import { declare, fixtureBytes, fixtureExpectation, fixtureNames, readList, utf8 } from '../ingest/support';

const OWN = ['Zone', 'supplier; code', '=own'];

/** A decimal as a person types it: at most 12 significant digits. */
const typed = fc
  .tuple(fc.integer({ min: -999_999_999_999, max: 999_999_999_999 }), fc.integer({ min: -9, max: 2 }))
  .map(([digits, power]) => Number(`${digits}e${power}`) + 0);
const text = fc
  .string({
    unit: fc.oneof(
      fc.constantFrom('=', '-', "'", '"', ',', ';', '\n', ' ', 'é', '€'),
      fc.string({ minLength: 1, maxLength: 1 }),
    ),
  })
  .map((raw) => raw.replaceAll('\0', '').replaceAll('\uFEFF', '').replace(/\r\n?/gu, '\n').trim());
const optional = text.map((value) => (value === '' ? null : value));
const own = text.filter((value) => value !== '');

const declarations: fc.Arbitrary<ListDeclarations> = fc
  .record({
    mass_unit: fc.constantFrom(...MASS_UNITS),
    length_unit: fc.constantFrom(...LENGTH_UNITS),
    inertia_unit: fc.constantFrom(...INERTIA_UNITS),
    products: fc.constantFrom('positive', 'negative'),
    uncertainty: fc.constantFrom('1sigma', '2sigma', '3sigma', 'half-width'),
    kind: fc.constantFrom('components', 'adjustments'),
  })
  .map(declare);

function component(list: ListDeclarations): fc.Arbitrary<Omit<Component, 'item'>> {
  const scales = listScales(list);
  const value = (column: ScaledColumn): fc.Arbitrary<number> =>
    typed.map((number) => scaled(number, scales[column]));
  const size = (column: ScaledColumn): fc.Arbitrary<number> =>
    typed.map((number) => scaled(Math.abs(number), scales[column]));
  const sigma = (column: ScaledColumn): fc.Arbitrary<number | null> => fc.option(size(column));
  const adjustment = list.kind === 'adjustments';
  return fc.record({
    partNumber: optional,
    partRevision: optional,
    description: optional,
    group: fc.constantFrom('Ungrouped', 'Wing/Spars', 'Fuselage', '-odd/=path'),
    category: fc.constantFrom(...CATEGORIES),
    parent: fc.constantFrom(null, 'item 0'),
    counting: fc.constantFrom('counted', 'memo'),
    quantity: fc.integer({ min: 1, max: 5000 }),
    mass: size('mass').filter((mass) => mass > 0),
    position: fc.tuple(value('x'), value('y'), value('z')),
    moments: fc.record({
      ixx: size('ixx'),
      iyy: size('iyy'),
      izz: size('izz'),
      ixy: value('ixy'),
      ixz: value('ixz'),
      iyz: value('iyz'),
    }),
    orientation: fc.record({ yaw: value('yaw'), pitch: value('pitch'), roll: value('roll') }),
    pair: fc.boolean(),
    maturity: fc.constantFrom(null, ...MATURITIES),
    growth: fc.option(size('growth_percent')),
    sigma: fc
      .record({
        mass: sigma('mass_sigma'),
        x: sigma('x_sigma'),
        y: sigma('y_sigma'),
        z: sigma('z_sigma'),
        ixx: sigma('ixx_sigma'),
        iyy: sigma('iyy_sigma'),
        izz: sigma('izz_sigma'),
        ixy: sigma('ixy_sigma'),
        ixz: sigma('ixz_sigma'),
        iyz: sigma('iyz_sigma'),
      })
      .map((all) => (Object.values(all).every((one) => one === null) ? null : all)),
    source: optional,
    sourceDate: optional,
    note: optional,
    changeRef: adjustment ? optional : fc.constant(null),
    status: adjustment ? fc.constantFrom(...CHANGE_STATUSES) : fc.constant('approved' as const),
    extra: fc
      .record({ Zone: own, 'supplier; code': own, '=own': own }, { requiredKeys: [] })
      .map((members): Record<string, string> => ({ ...members })),
  });
}

function write(list: ListDeclarations, rows: readonly Component[], columns: readonly string[]): string {
  const writer = massListWriter(list, columns);
  return writer.header + rows.map((row) => writer.line(row)).join('');
}

describe('a mass list written back to CSV', () => {
  it('reads as the same components, to the last bit, in any units and signs', async () => {
    const lists = declarations.chain((list) =>
      fc.array(component(list), { minLength: 1, maxLength: 8 }).map((rows) => ({
        list,
        rows: rows.map((row, index): Component => ({
          ...row,
          item: `item ${index}`,
          parent: index === 0 ? null : row.parent,
        })),
      })),
    );
    await fc.assert(
      fc.asyncProperty(lists, async ({ list, rows }) => {
        const read = await readList(utf8(write(list, rows, OWN)), list);
        expect(read.problems).toEqual([]);
        expect(read.components).toEqual(rows);
        expect(read.unknownColumns).toEqual(OWN);
      }),
      { seed: 60, numRuns: 300 },
    );
  });

  it.each(fixtureNames('lists/valid'))(
    'of the fixture %s reads the same, and is the same written again',
    async (name) => {
      const { declarations: body } = fixtureExpectation<{ declarations: unknown }>('lists/valid', name);
      const list = declare(body);
      const first = await readList(fixtureBytes('lists/valid', name), list);
      const csv = write(list, first.components, first.unknownColumns);
      const second = await readList(utf8(csv), list);
      expect(second.problems).toEqual([]);
      expect(second.components).toEqual(first.components);
      expect(write(list, second.components, second.unknownColumns)).toBe(csv);
    },
  );

  it('has the digits that were typed and the sign that the list declares', async () => {
    const list = declare({
      mass_unit: 'lb',
      length_unit: 'in',
      inertia_unit: 'slug.ft2',
      products: 'negative',
    });
    const { components } = await readList(
      utf8(
        'item,mass,x,y,z,ixx,ixy,yaw,growth_percent,ixx_sigma\nA,12.3,99.9,-0.1,1e-7,359.9,-0.3,359.9,7,0.7\n',
      ),
      list,
    );
    const [header = '', line = ''] = write(list, components, []).split('\r\n');
    const cells = line.split(',');
    const at = (column: string): string | undefined => cells[header.split(',').indexOf(column)];
    expect(['mass', 'x', 'y', 'z', 'ixx', 'ixy', 'yaw', 'growth_percent', 'ixx_sigma'].map(at)).toEqual([
      '12.3',
      '99.9',
      '-0.1',
      '1e-7',
      '359.9',
      '-0.3',
      '359.9',
      '7',
      '0.7',
    ]);
    expect(components[0]?.moments.ixy).toBeGreaterThan(0);
    expect(header).not.toContain('change_ref');
  });

  it('finds the typed number for every unit, and a number within rounding where none was typed', () => {
    const scales = listScales(declare({ mass_unit: 'slug', length_unit: 'in', inertia_unit: 'lbf.in.s2' }));
    fc.assert(
      fc.property(
        fc.constantFrom<ScaledColumn>('mass', 'x', 'ixx', 'yaw', 'growth_percent'),
        typed,
        (column, number) => {
          expect(typedNumber(scaled(number, scales[column]), scales[column])).toBe(number);
        },
      ),
      { seed: 61, numRuns: 2000 },
    );
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1e9, noNaN: true }), (value) => {
        const back = scaled(typedNumber(value, scales.x), scales.x);
        expect(Math.abs(back - value)).toBeLessThanOrEqual(4e-16 * value);
      }),
      { seed: 62, numRuns: 2000 },
    );
  });
});
