import { describe, expect, it } from 'vitest';

import { ROWS_NAMED, type Finding } from '@/lib/findings/finding';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { toSi } from '@/lib/units/convert';
import { IMPOSSIBLE, PUBLISHED } from '@/tests/references/aircraft';
import { rocket } from '@/tests/references/nesc';
import { solidCylinder } from '@/tests/references/solids';
import { diagonal } from '@/tests/support/mass';
import { SOUND, found, ids, ruled } from './support';

const slugs = toSi(1, 'slug.ft2');

describe('findings on moments', () => {
  it.each(PUBLISHED)('say nothing of the $name ($source)', ({ weight, ixx, iyy, izz, ixz }) => {
    const moments = { ...diagonal([ixx, iyy, izz], slugs), ixz: slugs * ixz };
    expect(found([{ mass: toSi(weight, 'lb'), moments }], { inertiaUnit: 'slug.ft2' })).toEqual([]);
  });

  it.each(IMPOSSIBLE)('stop the published $name ($source)', ({ ixx, iyy, izz }) => {
    const findings = found([SOUND, { mass: 10, moments: diagonal([ixx, iyy, izz], slugs) }], {
      inertiaUnit: 'slug.ft2',
    });
    expect(ids(findings)).toEqual(['impossible-tensor']);
    const least = (ixx + iyy - izz) / 2;
    expect(findings[0]).toEqual({
      rule: 'impossible-tensor',
      severity: 'blocker',
      message: `1 row states moments that no body can have. R2: least principal second moment ${Number(least.toPrecision(4))} slug.ft2.`,
      rows: ['R2'],
      count: 1,
    });
  });

  it('stop the payload of the NESC rocket, which has Ixx alone, and not its stages', () => {
    const { radius, stage1, payload } = rocket;
    const findings = found([
      { mass: stage1.dry, moments: diagonal(solidCylinder(radius, stage1.to - stage1.from), stage1.dry) },
      { mass: payload.mass, moments: diagonal([payload.ixx, 0, 0]) },
    ]);
    expect(ruled(findings, 'impossible-tensor')?.rows).toEqual(['R2']);
    expect(ids(findings)).toEqual(['impossible-tensor']);
  });

  it('only note what the printed digits can explain', () => {
    // A plate printed to two places: 0.12 + 0.34 against 0.47.
    const findings = found([{ mass: 1, moments: diagonal([0.12, 0.34, 0.47]) }]);
    expect(ids(findings)).toEqual(['tensor-within-rounding']);
    expect(findings[0]?.severity).toBe('note');
    expect(ids(found([{ mass: 1, moments: diagonal([0.12, 0.34, 0.49]) }]))).toEqual(['impossible-tensor']);
  });

  it.each([
    ['ixy', 'Ixy', 'Izz'],
    ['ixz', 'Ixz', 'Iyy'],
    ['iyz', 'Iyz', 'Ixx'],
  ] as const)('name a product %s beyond its bound', (key, product, moment) => {
    const at = (value: number): Finding[] =>
      found([{ mass: 1, moments: { ...diagonal([40, 40, 40]), [key]: value } }]);
    expect(ids(at(20))).toEqual([]);
    expect(ids(at(-20))).toEqual([]);
    for (const value of [30, -30]) {
      const finding = ruled(at(value), 'product-bounds');
      expect(finding?.severity).toBe('blocker');
      expect(finding?.message).toContain(`2|${product}| is 60 and ${moment} 40 kg.m2`);
    }
  });

  it('judge a removal by what it takes away', () => {
    const list: Partial<ListDeclarations> = { kind: 'adjustments' };
    expect(found([{ mass: -5, moments: diagonal([-1, -2, -2.5]) }], list)).toEqual([]);
    expect(ids(found([{ mass: -5, moments: diagonal([1, 2, 2.5]) }], list))).toEqual(['impossible-tensor']);
    const withProduct = { ...diagonal([-4, -4, -4]), ixy: 3 };
    expect(ids(found([{ mass: -5, moments: withProduct }], list))).toEqual([
      'impossible-tensor',
      'product-bounds',
    ]);
  });

  it('leave memo rows alone: they are in no result', () => {
    const memo = { counting: 'memo', mass: 1, moments: diagonal([1, 1, 9]) } as const;
    expect(ids(found([memo]))).toEqual(['memo-rows']);
  });
});

describe('findings on mass', () => {
  it('stop moments without mass, and note a row with neither', () => {
    const findings = found([SOUND, { mass: 0, moments: diagonal([1, 1, 1]) }, { mass: 0 }]);
    expect(ruled(findings, 'massless-tensor')?.rows).toEqual(['R2']);
    expect(ruled(findings, 'massless-tensor')?.severity).toBe('blocker');
    expect(ruled(findings, 'massless-row')?.rows).toEqual(['R3']);
    expect(ruled(findings, 'massless-row')?.severity).toBe('note');
  });

  it('warn of negative mass in a list of components, in the list’s unit', () => {
    const removal = { mass: -toSi(12, 'lb'), moments: diagonal([-1, -1, -1]) };
    expect(found([removal], { massUnit: 'lb' })[0]).toMatchObject({
      rule: 'negative-mass-in-components',
      severity: 'warning',
      message: '1 row of a component list has negative mass. R1: mass -12 lb.',
    });
    expect(found([removal], { kind: 'adjustments' })).toEqual([]);
  });

  it('warn of a heavy row without moments, heaviest first', () => {
    const findings = found([
      { mass: 10 },
      { mass: 1000, moments: diagonal([1, 1, 1]) },
      { mass: 60 },
      { mass: 1 },
      { mass: 500, counting: 'memo' },
    ]);
    expect(ruled(findings, 'heavy-point')).toEqual({
      rule: 'heavy-point',
      severity: 'warning',
      message: '2 heavy rows state no moments of their own. Heaviest, R3: 60 kg, 5.602 % of the list.',
      rows: ['R3', 'R1'],
      count: 2,
    });
  });

  it('do not call a row heavy that a long list outgrows, nor forget one that stays heavy', () => {
    const light = Array.from({ length: 5000 }, () => ({ mass: 1 }));
    const findings = found([{ mass: 24 }, ...light, { mass: 30 }]);
    expect(ruled(findings, 'heavy-point')?.rows).toEqual([`R5002`]);
  });

  it('count all pieces of a row, and the removed ones by what they weigh', () => {
    const base = { mass: 1000, moments: diagonal([9, 9, 9]) };
    expect(ruled(found([base, { mass: 2, quantity: 2 }]), 'heavy-point')).toBeUndefined();
    expect(ruled(found([base, { mass: 2, quantity: 2, pair: true }]), 'heavy-point')?.rows).toEqual(['R2']);
    expect(ruled(found([base, { mass: -8 }], { kind: 'adjustments' }), 'heavy-point')?.rows).toEqual(['R2']);
  });
});

describe('findings on counting', () => {
  it('note memo rows and their parent', () => {
    const findings = found([SOUND, { ...SOUND, counting: 'memo', parent: 'R1' }]);
    expect(findings).toEqual([
      {
        rule: 'memo-rows',
        severity: 'note',
        message: '1 memo row is not summed. R2: memo, parent R1.',
        rows: ['R2'],
        count: 1,
      },
    ]);
  });

  it('warn of a pair in a half list', () => {
    const pair = { ...SOUND, pair: true, position: [3, -1, 0] } as const;
    expect(ids(found([pair], { extent: 'left-half' }))).toEqual(['pair-in-half-list']);
    expect(found([pair])).toEqual([]);
  });
});

describe('findings on many rows', () => {
  it('name the first 200 and count them all', () => {
    const findings = found(Array.from({ length: 1000 }, () => ({ ...SOUND, counting: 'memo' as const })));
    expect(findings[0]?.count).toBe(1000);
    expect(findings[0]?.rows).toHaveLength(ROWS_NAMED);
    expect(findings[0]?.rows[199]).toBe('R200');
    expect(findings[0]?.message).toBe('1000 memo rows are not summed. First, R1: memo.');
  });

  it('stand blockers first', () => {
    const findings = found([
      { ...SOUND, counting: 'memo' },
      { mass: 500 },
      { mass: 1, moments: diagonal([1, 1, 9]) },
    ]);
    expect(findings.map(({ severity }) => severity)).toEqual(['blocker', 'warning', 'note']);
  });
});
