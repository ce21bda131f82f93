import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { driverLines } from '@/components/drivers/driver-lines';
import { DriversSection } from '@/components/drivers/drivers-section';
import { EffectPanel } from '@/components/drivers/effect-panel';
import { effectsOf, typedMove } from '@/components/drivers/effects';
import { type Drivers, driversAsked, withDrivers } from '@/lib/drivers/drivers';
import { AccountSum, toNumbersWithRest } from '@/lib/mass/account';
import { Placement } from '@/lib/mass/place';
import { INCH } from '@/lib/units/table';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

const aircraft = geometry({ axes: ['aft', 'right', 'up'], reference: [12, 0, 1], lemac: [11, 0, 1], mac: 2 });
const placement = new Placement(declarations({ axes: ['aft', 'right', 'up'] }), aircraft);
const rows = [
  aComponent({ item: 'hull', mass: 30, position: [12, 0, 1] }),
  aComponent({ item: 'tail', mass: 10, position: [20, 0, 3] }),
];
const sum = new AccountSum();
for (const row of rows) sum.add(placement.account(row));

const DRIVERS: Drivers = {
  number: 'ixz',
  by: 'rows',
  geometry: aircraft,
  whole: toNumbersWithRest(sum.account),
  parts: [...rows].reverse().map((row) => ({
    key: `list/${row.item}`,
    name: row.item,
    description: null,
    group: row.group,
    list: { code: 'list', revision: 3 },
    rows: 1,
    pieces: toNumbersWithRest(placement.account(row)),
    image: null,
  })),
  of: 2,
  sum: 120,
  gross: 120,
};
const [TAIL] = DRIVERS.parts;
if (TAIL === undefined) throw new Error('no part');

describe('the effect of a part', () => {
  it('gives the whole without it and with it moved: two points, closed form', () => {
    // CG at x = 14, z = 1.5. Body x forward, z down. Ixz = ∫ x z dm = m1 m2 / M dx dz = 7.5 * 8 * 2 = 120. From the definitions.
    const { now, removed, moved } = effectsOf(DRIVERS, TAIL, [-4, 0, 0]);
    expect(now.ten?.ixz).toBeCloseTo(120, 12);
    expect(now.percentMac).toBeCloseTo(150, 12);
    expect(removed.ten).toMatchObject({ mass: 30, x: 12, z: 1, ixz: 0, iyy: 0 });
    expect(moved?.ten?.x).toBeCloseTo(13, 12);
    expect(moved?.ten?.ixz).toBeCloseTo(60, 12);
    expect(moved?.percentMac).toBeCloseTo(100, 12);
  });

  it('has nothing to say of a move that is no number', () => {
    expect(effectsOf(DRIVERS, TAIL, null).moved).toBeNull();
    expect(typedMove('-0,25', 'm')).toBe(-0.25);
    expect(typedMove(' 10 ', 'in')).toBeCloseTo(10 * INCH, 15);
    expect(typedMove('', 'm')).toBe(0);
    for (const wrong of ['1.2.3', 'aft', '1e999', '0x10']) expect(typedMove(wrong, 'm')).toBeNull();
  });

  it('stands beside what is, with differences, units and the sign convention', () => {
    const markup = renderToStaticMarkup(
      <EffectPanel
        drivers={DRIVERS}
        part={TAIL}
        units={OUTPUT_UNITS.si}
        by={['-4', '', 'x']}
        onBy={() => undefined}
        onClose={() => undefined}
        href={null}
      />,
    );
    expect(markup).toContain('positive integrals');
    expect(markup).toContain('This is not a number');
    expect(markup).toContain('kg·m²');
    expect(markup).toContain('% MAC');
  });
});

describe('the parts of a whole', () => {
  it('show what they contribute, signed, with their share of all contributions without signs', () => {
    const lines = driverLines(DRIVERS);
    // Of the 120 the tail has 10 * 6 * 1.5 = 90, the hull 30 * 2 * 0.5 = 30.
    expect(lines.map(({ value }) => Math.round(1e9 * value) / 1e9)).toEqual([90, 30]);
    expect(lines.map(({ share }) => Math.round(1e9 * share) / 1e9)).toEqual([0.75, 0.25]);
  });

  it('are left out of print and say what the numbers are', () => {
    const markup = renderToStaticMarkup(
      <DriversSection
        drivers={null}
        asked={{ number: 'ixz', by: 'rows' }}
        units={OUTPUT_UNITS.us}
        hrefOf={(asked) => `?${withDrivers(new URLSearchParams(), asked).toString()}`}
        listsHref="/lists"
        of="Empty"
      />,
    );
    expect(markup).toContain('no-print');
    expect(markup).toContain('positive integral');
    expect(markup).toContain('?number=iyz');
    expect(markup).toContain('?number=ixz&amp;by=groups');
  });

  it('are asked for by the address, which leaves no trace of what is as at first', () => {
    const address = (query: string) => driversAsked(Object.fromEntries(new URLSearchParams(query)));
    expect(address('')).toEqual({ number: 'mass', by: 'rows' });
    expect(address('number=speed&by=colour')).toEqual({ number: 'mass', by: 'rows' });
    expect(address('number=iyy&by=branches')).toEqual({ number: 'iyy', by: 'branches' });
    expect(withDrivers(new URLSearchParams(), { number: 'mass', by: 'rows' }).toString()).toBe('');
  });
});
