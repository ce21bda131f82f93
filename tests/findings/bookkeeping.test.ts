import { describe, expect, it } from 'vitest';

import { type FormerSubtotal } from '@/lib/findings/context';
import { type Component, type ComponentSigma } from '@/lib/mass/component';
import { Placement } from '@/lib/mass/place';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { toSi } from '@/lib/units/convert';
import { declarations, diagonal } from '@/tests/support/mass';
import { SOUND, aircraft, found, ids, keptRows, ruled } from './support';

describe('findings on what a row says of itself', () => {
  it('note rows without maturity or group, with their share of the mass', () => {
    const findings = found([SOUND, { ...SOUND, mass: 30, maturity: null }, { ...SOUND, group: 'Ungrouped' }]);
    expect(findings).toMatchObject([
      {
        rule: 'no-maturity',
        severity: 'note',
        message: '1 row states no maturity: 30 kg, 60 % of the list. R2: 30 kg.',
      },
      { rule: 'no-group', severity: 'note', rows: ['R3'] },
    ]);
    expect(ids(found([SOUND, { ...SOUND, maturity: null, counting: 'memo' }]))).toEqual(['memo-rows']);
  });

  it('note weighed rows with growth and estimated ones without', () => {
    const rows = (maturity: 'E' | 'C' | 'A', growth: number | null) =>
      ids(found([{ ...SOUND, maturity, growth }]));
    expect(rows('A', 0.02)).toEqual(['actual-with-growth']);
    expect(rows('A', 0)).toEqual([]);
    expect(rows('A', null)).toEqual([]);
    expect(rows('E', 0)).toEqual(['estimated-without-growth']);
    expect(rows('E', 0.01)).toEqual([]);
    expect(rows('E', null)).toEqual([]);
    expect(rows('C', 0)).toEqual([]);
  });

  it('warn of a σ larger than its value', () => {
    const none: ComponentSigma = {
      mass: null,
      x: null,
      y: null,
      z: null,
      ixx: null,
      iyy: null,
      izz: null,
      ixy: null,
      ixz: null,
      iyz: null,
    };
    const rows = (sigma: Partial<ComponentSigma>) => found([{ ...SOUND, sigma: { ...none, ...sigma } }]);
    expect(rows({ mass: 10.1 })).toMatchObject([
      {
        rule: 'sigma-beyond-value',
        severity: 'warning',
        message: '1 row has a σ larger than its value. R1: mass 10 kg, σ 10.1 kg.',
      },
    ]);
    expect(ids(rows({ iyy: 1.5 }))).toEqual(['sigma-beyond-value']);
    expect(rows({ mass: 9.9, iyy: 0.9 })).toEqual([]);
    // A place may be 0, and a product may be smaller than what is known of it.
    expect(rows({ y: 0.1, ixy: 0.3 })).toEqual([]);
  });

  it('note adjustments that a submission leaves out', () => {
    const change = (status: Component['status']): Partial<Component> => ({
      ...SOUND,
      status,
      changeRef: 'CR-7',
    });
    const list = { kind: 'adjustments' } as const;
    expect(found([change('approved')], list)).toEqual([]);
    expect(found([change('approved'), change('pending'), change('potential')], list)).toMatchObject([
      {
        rule: 'adjustments-left-out',
        severity: 'note',
        message: '2 adjustments are left out, 20 kg in sum. First, R2: pending, 10 kg, change CR-7.',
      },
    ]);
  });
});

describe('findings against the revision before', () => {
  const geometry = aircraft({ reference: [-7, 0, 1] });
  const subtotals = (rows: readonly Partial<Component>[]): FormerSubtotal[] => {
    const book = new SubtotalBook(new Placement(declarations(), geometry));
    for (const row of keptRows(rows)) book.add(row);
    return book.subtotals();
  };
  const list = Array.from({ length: 12 }, (_, i) => ({
    mass: 10 + i,
    moments: diagonal([1, 1, 1]),
    position: [-5 - 0.5 * i, 1 + 0.1 * i, -1 - 0.05 * i] as const,
    pair: i % 2 === 0,
    group: i < 4 ? 'Wing' : 'Body',
  }));
  const former = subtotals(list);
  const now = (
    change: (row: (typeof list)[number], i: number) => Partial<Component>,
    massUnit: 'kg' | 'lb' = 'kg',
  ) =>
    found(
      list.map((row, i) => ({ ...row, ...change(row, i) })),
      { massUnit, lengthUnit: 'in' },
      { former, geometry },
    );

  it('say nothing of a first revision nor of one that changed little', () => {
    expect(found(list, {}, { geometry })).toEqual([]);
    expect(now(() => ({}))).toEqual([]);
    expect(now((row) => ({ mass: 1.09 * row.mass }))).toEqual([]);
  });

  it('warn of a list that jumped in mass, and say where', () => {
    const findings = now((row) => ({ mass: row.group === 'Wing' ? 2 * row.mass : row.mass }));
    expect(findings).toMatchObject([{ rule: 'mass-jump', severity: 'warning' }]);
    // 15.5 kg a row in the mean, half of them pairs: 186 + 90 = 276 kg, of which the wing 46 + 22 = 68 kg.
    expect(findings[0]?.message).toBe(
      'The list weighs 344 kg, its revision before 276 kg: +24.64 %. Most in Wing: +68 kg.',
    );
    expect(ids(now((_, i) => (i === 0 ? { mass: -40, moments: diagonal([-1, -1, -1]) } : {})))).toContain(
      'mass-jump',
    );
  });

  it('warn of a list in another mass unit instead', () => {
    const findings = now((row) => ({ mass: row.mass / toSi(1, 'lb') }));
    expect(findings).toMatchObject([{ rule: 'list-mass-slip', severity: 'warning' }]);
    expect(findings[0]?.message).toMatch(/: the masses look as if in lb\.$/);
    expect(ids(now((row) => ({ mass: 2.4 * row.mass })))).toEqual(['mass-jump']);
  });

  it('warn of a list in another length unit', () => {
    const scaled = (factor: number) =>
      found(
        list.map(({ position: [x, y, z], ...row }) => ({
          ...row,
          position: [factor * x, factor * y, factor * z] as const,
        })),
        { lengthUnit: 'in' },
        { former, geometry },
      );
    expect(ruled(scaled(1 / 12), 'list-length-slip')?.message).toMatch(/: the places look as if in ft\.$/);
    expect(ruled(scaled(25.4), 'list-length-slip')?.message).toMatch(/: the places look as if in mm\.$/);
    expect(ruled(scaled(1 / 25.4), 'list-length-slip')?.message).toMatch(
      /as if converted from mm once too often/,
    );
    expect(ids(scaled(1.2))).not.toContain('list-length-slip');
  });
});
