import { describe, expect, it } from 'vitest';

import { type RowChange, type RowFigures } from '@/lib/findings/context';
import { type Finding } from '@/lib/findings/finding';
import { RowChecks } from '@/lib/findings/look';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { toSi } from '@/lib/units/convert';
import { declarations, diagonal } from '@/tests/support/mass';
import { ids } from './support';

const BEFORE: RowFigures = { mass: 12, position: [5, -1.5, 0.8], moments: diagonal([0.4, 0.5, 0.6]) };

function found(
  now: Partial<RowFigures>,
  list: Partial<ListDeclarations> = {},
  before: RowFigures = BEFORE,
): Finding[] {
  const checks = new RowChecks(declarations(list));
  const change: RowChange = { item: 'R1', before, now: { ...before, ...now } };
  checks.seeChange(change);
  return checks.findings();
}

const scaled = (factor: number): Partial<RowFigures> => ({
  position: [5 * factor, -1.5 * factor, 0.8 * factor],
});

describe('findings on a row against itself in the revision before', () => {
  it('warn of a mass off by the factor of a unit, and of no other change', () => {
    const lb = found({ mass: 12 / toSi(1, 'lb') });
    expect(lb).toMatchObject([{ rule: 'mass-changed-by-unit', severity: 'warning', rows: ['R1'] }]);
    expect(lb[0]?.message).toMatch(/26\.46 kg, before 12 kg: it looks as if in lb\.$/);
    expect(ids(found({ mass: 12_000 }))).toEqual(['mass-changed-by-unit']);
    expect(ids(found({ mass: 12 / 32.174 }, { massUnit: 'slug' }))).toEqual(['mass-changed-by-unit']);
    // 2.2046 by 1 %, and a part that weighs half as much.
    expect(found({ mass: 26.73 })).toEqual([]);
    expect(found({ mass: 6 })).toEqual([]);
    expect(found({ mass: 26.46 }, {}, { ...BEFORE, mass: 0 })).toEqual([]);
  });

  it('warn of a place off by the factor of a unit in all coordinates', () => {
    expect(ids(found(scaled(1 / 0.3048)))).toEqual(['place-changed-by-slip']);
    expect(found(scaled(25.4), { lengthUnit: 'in' })[0]?.message).toMatch(/: it looks as if in mm\.$/);
    expect(found(scaled(3.4))).toEqual([]);
    // Farther away by the same factor, but somewhere else.
    expect(found({ position: [-5 / 0.3048, -1.5 / 0.3048, 0.8 / 0.3048] })).toEqual([]);
  });

  it('warn of one coordinate with the other sign, and note one that is lateral', () => {
    const [up] = found({ position: [5, -1.5, -0.8] });
    expect(up).toMatchObject({ rule: 'place-changed-by-slip', severity: 'warning' });
    expect(up?.message).toMatch(/CG 5, -1\.5, -0\.8 m, before 5, -1\.5, 0\.8 m: z has the other sign\.$/);
    const [across] = found({ position: [5, 1.5, 0.8] });
    expect(across).toMatchObject({ rule: 'moved-to-other-side', severity: 'note' });
    expect(across?.message).toMatch(/R1: CG 5, 1\.5, 0\.8 m, before 5, -1\.5, 0\.8 m\.$/);
    expect(ids(found({ position: [-5, -1.5, 0.8] }, { axes: ['left', 'aft', 'up'] }))).toEqual([
      'moved-to-other-side',
    ]);
    expect(found({ position: [5, 1.3, 0.8] })).toEqual([]);
    expect(found({ position: [-5, 1.5, 0.8] })).toEqual([]);
    const near = { ...BEFORE, position: [5, -0.04, 0.04] } as const;
    expect(found({ position: [5, 0.04, 0.04] }, {}, near)).toEqual([]);
    expect(found({ position: [5, -0.04, -0.04] }, {}, near)).toEqual([]);
  });

  it('warn of moments off by the factor of a unit at one mass', () => {
    const times = (factor: number) => ({ moments: diagonal([0.4 * factor, 0.5 * factor, 0.6 * factor]) });
    for (const factor of [32.17405, 4633.063, 12])
      expect(ids(found(times(factor), { inertiaUnit: 'slug.ft2' })), String(factor)).toEqual([
        'inertia-changed-by-unit',
      ]);
    expect(ids(found(times(144), { inertiaUnit: 'lb.ft2' }))).toEqual(['inertia-changed-by-unit']);
    // A supplier's exchange shows in a list in kg.m2 as well.
    expect(found(times(144))[0]?.message).toMatch(/: they look as if lb\.in2 had been taken for lb\.ft2\.$/);
    expect(found(times(30), { inertiaUnit: 'slug.ft2' })).toEqual([]);
    // A part of twice the mass may be of another size.
    expect(found({ ...times(32.17405), mass: 24 }, { inertiaUnit: 'slug.ft2' })).toEqual([]);
  });
});
