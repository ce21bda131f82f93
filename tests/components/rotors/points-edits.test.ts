import { describe, expect, it } from 'vitest';
import { asGrid, NO_EDITS, rpmText, shaftsOf } from '@/components/rotors/points-edits';
import { pointsFormSchema } from '@/lib/contracts/rotors';
import { radiansPerSecond } from '@/lib/units/convert';

const point = (code: string, propeller: number, sigma: number | null = null) => ({
  code,
  title: code,
  speeds: [
    {
      shaft: 'propeller',
      speed: radiansPerSecond(propeller),
      sigma: sigma === null ? null : radiansPerSecond(sigma),
    },
  ],
});
const SHAFTS = ['propeller', 'core'];

describe('the grid of operating points', () => {
  it('shows speeds with the digits they were typed with, and blanks where there is none', () => {
    const [line] = asGrid([point('cruise', 1550.1, 5)], NO_EDITS, SHAFTS);
    expect(line?.speeds).toEqual([
      { shaft: 'propeller', rpm: '1550.1', sigma: '5' },
      { shaft: 'core', rpm: '', sigma: '' },
    ]);
  });

  it('keeps what a person typed when a newer revision is put underneath, and takes the rest from it', () => {
    const edits = { ...NO_EDITS, cells: { cruise: { 'rpm propeller': '1600' } }, added: ['taxi'] };
    const grid = asGrid([point('cruise', 1500), point('climb', 1700)], edits, SHAFTS);
    expect(grid.map(({ code, speeds }) => [code, speeds[0]?.rpm])).toEqual([
      ['cruise', '1600'],
      ['climb', '1700'],
      ['taxi', ''],
    ]);
  });

  it('sends back to the server exactly the speeds it was given', () => {
    const points = [point('cruise', 1550.1, 5), point('taxi', -0.3)];
    const sent = pointsFormSchema.parse({
      base: '3',
      reason: 'no change',
      points: JSON.stringify(asGrid(points, NO_EDITS, ['propeller'])),
    });
    expect(sent.points).toEqual(points);
    expect(sent.base).toBe(3);
  });

  it('has a column for every shaft of a rotor or a speed, once', () => {
    expect(shaftsOf([{ shaft: 'core' }, { shaft: 'core' }], [point('cruise', 1)])).toEqual([
      'core',
      'propeller',
    ]);
    expect(rpmText(radiansPerSecond(37800))).toBe('37800');
  });

  it('is refused with the place named when a speed is no number, or an uncertainty has no speed', () => {
    const grid = (rpm: string, sigma: string) =>
      pointsFormSchema.safeParse({
        base: '1',
        reason: 'r',
        points: JSON.stringify([{ code: 'cruise', title: '', speeds: [{ shaft: 'core', rpm, sigma }] }]),
      });
    expect(grid('12,4.5', '').error?.issues[0]?.message).toContain('cruise, core: `12,4.5` is not a number');
    expect(grid('', '3').error?.issues[0]?.message).toContain(
      'cruise, core: there is an uncertainty and no speed',
    );
    expect(grid('100', '-1').error?.issues[0]?.message).toContain('zero or more');
  });
});
