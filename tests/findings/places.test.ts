import { describe, expect, it } from 'vitest';

import { namedSide, withoutSide } from '@/lib/findings/named-side';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Vec3 } from '@/lib/numerics/vec3';
import { toSi } from '@/lib/units/convert';
import { diagonal } from '@/tests/support/mass';
import { SOUND, aircraft, found, ids } from './support';

const geometry = aircraft();
const at = (position: Vec3): Partial<Component> => ({ ...SOUND, position });

describe('findings on where a row is', () => {
  it('stop a CG that is far outside the aircraft, and warn of one outside', () => {
    const look = (position: Vec3) => ids(found([at(position)], {}, { geometry }));
    // Length 16 m fore or aft of the mean chord at x = -7, half the span 10 m across, 20 m up or down.
    for (const sound of [
      [8.9, 0, 0],
      [-23.7, 0, 0],
      [-7, 10.4, 0],
      [-7, 0, -19],
    ] as const)
      expect(look(sound)).toEqual([]);
    for (const wrong of [
      [10, 0, 0],
      [-24, 0, 0],
      [-7, 10.6, 0],
      [-7, -19.9, 0],
    ] as const)
      expect(look(wrong)).toEqual(['outside-aircraft']);
    for (const absurd of [
      [26, 0, 0],
      [-40, 0, 0],
      [-7, 21, 0],
      [-7, 0, 41],
    ] as const)
      expect(look(absurd)).toEqual(['far-outside-aircraft']);
    expect(ids(found([at([400, 0, 0])]))).toEqual([]);
  });

  it('say which length unit would put it inside', () => {
    const inch = { ...SOUND, position: [toSi(-240, 'ft'), 0, toSi(30, 'ft')] as const };
    const finding = found([inch], { lengthUnit: 'ft' }, { geometry })[0];
    expect(finding).toMatchObject({ rule: 'far-outside-aircraft', severity: 'blocker' });
    expect(finding?.message).toBe(
      '1 row lies far outside the aircraft. R1: CG at -240, 0, 30 ft; the place looks as if in in.',
    );
  });

  it('see through the frame of the list', () => {
    const pose = { origin: [-7, 0, 0], yaw: 0, pitch: 0, roll: 0 } as const;
    expect(found([at([-12, 0, 0])], { pose }, { geometry })).toEqual([]);
    expect(ids(found([at([-18, 0, 0])], { pose }, { geometry }))).toEqual(['outside-aircraft']);
  });

  it('warn of a place that is exactly the datum, but not in a frame of its own', () => {
    expect(found([at([0, 0, 0])])[0]).toMatchObject({ rule: 'on-datum', severity: 'warning' });
    expect(found([at([0, 0, 1e-3])])).toEqual([]);
    const pose = { origin: [5, 1, 0], yaw: 0, pitch: 0, roll: 0 } as const;
    expect(found([at([0, 0, 0])], { pose })).toEqual([]);
    expect(ids(found([{ ...SOUND, position: [0, 0, 0], counting: 'memo' }]))).toEqual(['memo-rows']);
  });
});

describe('the side that a name tells', () => {
  it.each([
    ['Left aileron', 'left'],
    ['Aileron, LH', 'left'],
    ['RH_fairing', 'right'],
    ['Seat row 3 right', 'right'],
    ['Cleft pin', null],
    ['Bright work', null],
    ['Right-angle drive', null],
    ['Nut, left-hand thread', null],
    ['Right-hand thread insert, left nacelle', 'left'],
    ['Left and right link', null],
    ['Rudder', null],
  ])('of %s is %s', (name, side) => {
    expect(namedSide(name)).toBe(side);
  });

  it('falls out of the name that both of a pair have', () => {
    expect(withoutSide('Left aileron, LH bracket')).toBe(withoutSide('Right aileron, RH bracket'));
    expect(withoutSide('Right aileron')).not.toBe(withoutSide('Left elevator'));
  });
});

describe('findings on sides', () => {
  const named = (description: string, y: number, more: Partial<Component> = {}): Partial<Component> => ({
    ...SOUND,
    description,
    position: [5, y, 0],
    ...more,
  });
  const good = [named('Left tip', -9), named('Right tip', 9, { mass: 10.5 })];

  it('warn of a row that lies on the other side than its name says', () => {
    expect(found(good)).toEqual([]);
    expect(found([...good, named('Left pump', 1.2)])).toMatchObject([
      {
        rule: 'side-against-name',
        severity: 'warning',
        message:
          '1 row lies on the other side than its name says. R3: “Left pump” lies 1.2 m to the right of the plane of symmetry.',
      },
    ]);
    expect(found([...good, named('Left pump', 0.01)])).toEqual([]);
    expect(found([...good, named('Left pump', 1.2, { pair: true })])).toEqual([]);
  });

  it('go by the axis words, by the plane of symmetry and by the frame of the list', () => {
    const list: Partial<ListDeclarations> = { axes: ['aft', 'left', 'up'], lengthUnit: 'm' };
    expect(ids(found([named('Left pump', 1.2)], list))).toEqual([]);
    expect(ids(found([named('Left pump', -1.2)], list))).toEqual(['side-against-name']);
    const shifted = aircraft({ lateralPlane: 2 });
    expect(ids(found([named('Left pump', 1.2)], {}, { geometry: shifted }))).toEqual([]);
    const pose = { origin: [0, -3, 0], yaw: 0, pitch: 0, roll: 0 } as const;
    expect(ids(found([named('Left pump', 1.2)], { pose }))).toEqual([]);
  });

  it('warn once of the axes where nearly all rows lie on the other side', () => {
    const all = ['a', 'b', 'c', 'd', 'e'].map((name, i) =>
      named(`Left ${name}`, 1 + i, { mass: 3 + i, moments: diagonal([1, 1, 1]) }),
    );
    const findings = found(all);
    expect(findings).toMatchObject([{ rule: 'axes-mirrored', severity: 'warning', count: 5 }]);
    expect(findings[0]?.message).toMatch(
      /^5 of 5 rows that name a side lie on the other one: check the axes\./,
    );
    const some = [...all.slice(0, 3), named('Left f', -3), named('Left g', -4, { mass: 4 })];
    expect(ids(found(some))).toEqual(['side-against-name']);
  });

  it('note a half list on the other side', () => {
    expect(ids(found([at([5, 3, 0])], { extent: 'left-half' }))).toEqual(['half-on-other-side']);
    expect(found([at([5, -3, 0])], { extent: 'left-half' })).toEqual([]);
    expect(found([at([5, 3, 0])], { extent: 'right-half' })).toEqual([]);
  });

  it('warn of a part in the middle that is mirrored', () => {
    expect(ids(found([{ ...at([5, 0, 0]), pair: true }]))).toEqual(['mirrored-on-plane']);
    expect(ids(found([at([5, 0, 0])], { extent: 'left-half' }))).toEqual(['mirrored-on-plane']);
    expect(found([{ ...at([5, 0.01, 0]), pair: true }])).toEqual([]);
    expect(found([at([5, 0, 0])])).toEqual([]);
  });

  it('warn of twins whose lateral products have one sign', () => {
    const sided = (side: 'Left' | 'Right', ixy: number, ixz = 0): Partial<Component> => ({
      mass: 10,
      description: `${side} strut`,
      position: [5, side === 'Left' ? -2 : 2, 0],
      moments: { ...diagonal([2, 2, 2]), ixy, ixz },
    });
    expect(found([sided('Left', 0.5), sided('Right', 0.5)])).toMatchObject([
      {
        rule: 'twin-products-same-sign',
        severity: 'warning',
        message:
          '1 row has a product of the same sign as its twin on the other side. R2: Ixy 0.5 kg.m2 and, of R1 on the other side, 0.5 kg.m2 (airframe axes, positive integral).',
      },
    ]);
    expect(found([sided('Left', 0.5), sided('Right', -0.5)])).toEqual([]);
    // Ixz is the same on both sides; a small product has no sign to speak of.
    expect(found([sided('Left', 0, 0.5), sided('Right', 0, 0.5)])).toEqual([]);
    expect(found([sided('Left', 0.02), sided('Right', 0.02)])).toEqual([]);
  });

  it('hold twins against each other in airframe axes: a yaw of the own axes makes a product too', () => {
    const turned = (side: 'Left' | 'Right', yaw: number): Partial<Component> => ({
      mass: 10,
      description: `${side} strut`,
      position: [5, side === 'Left' ? -2 : 2, 0],
      moments: diagonal([1, 4, 4]),
      orientation: { yaw, pitch: 0, roll: 0 },
    });
    expect(found([turned('Left', 0.4), turned('Right', -0.4)])).toEqual([]);
    expect(ids(found([turned('Left', 0.4), turned('Right', 0.4)]))).toEqual(['twin-products-same-sign']);
  });
});

describe('findings on rows that stand twice', () => {
  const pump = { ...SOUND, description: 'Pump', position: [5, -1.2, 0.4] } as const;

  it('warn of a row that repeats another', () => {
    expect(found([pump, pump])).toMatchObject([
      { rule: 'duplicate-row', severity: 'warning', rows: ['R2'], count: 1 },
    ]);
    expect(found([pump, { ...pump, position: [5, -1.2, 0.5] }])).toEqual([]);
    expect(
      found([pump, { ...pump, mass: -10, moments: diagonal([-1, -1, -1]) }], { kind: 'adjustments' }),
    ).toEqual([]);
    expect(ids(found([pump, { ...pump, counting: 'memo' }]))).toEqual(['memo-rows']);
  });

  it('note one of the same mass and place under another name', () => {
    expect(found([pump, { ...pump, description: 'Fuel pump' }])).toMatchObject([
      { rule: 'same-mass-and-place', severity: 'note' },
    ]);
    expect(found([pump, { ...pump, description: 'Fuel pump', mass: 10.001 }])).toEqual([]);
  });

  it('note one that is nearly another of its name', () => {
    const near = (mass: number, x: number) => ids(found([pump, { ...pump, mass, position: [x, -1.2, 0.4] }]));
    expect(near(10.05, 5.002)).toEqual(['near-duplicate']);
    expect(near(10.05, 5.02)).toEqual([]);
    expect(near(10.3, 5.002)).toEqual([]);
  });

  it('warn of an image that stands as a row beside its pair', () => {
    const image = { ...pump, position: [5, 1.2, 0.4] } as const;
    expect(found([{ ...pump, pair: true }, image])).toMatchObject([
      { rule: 'pair-entered-twice', severity: 'warning', rows: ['R2'] },
    ]);
    expect(ids(found([image, { ...pump, pair: true }]))).toEqual(['pair-entered-twice']);
    expect(ids(found([image, pump], { extent: 'left-half' }))).toContain('pair-entered-twice');
    expect(found([pump, image])).toEqual([]);
  });
});

describe('findings on assemblies', () => {
  const row = (item: string, mass: number, more: Partial<Component> = {}): Partial<Component> => ({
    item,
    mass,
    moments: diagonal([1, 1, 1]),
    ...more,
  });
  const children = [row('A-1', 4, { parent: 'A' }), row('A-2', 6, { parent: 'A' })];
  const memo = { counting: 'memo' } as const;
  const looks = (rows: readonly Partial<Component>[]) => ids(found(rows)).filter((id) => id !== 'memo-rows');

  it('warn of one that is counted together with its children, whichever comes first', () => {
    for (const rows of [
      [row('A', 10.4), ...children],
      [...children, row('A', 9.5)],
    ])
      expect(found(rows)).toMatchObject([
        { rule: 'parent-counted-with-children', severity: 'warning', rows: ['A'] },
      ]);
    // What is left of the assembly besides its children is a part of its own.
    expect(looks([row('A', 2), ...children])).toEqual([]);
    expect(looks([row('A', 10, memo), ...children])).toEqual([]);
    expect(looks([row('A', 10), ...children.map((child) => ({ ...child, ...memo }))])).toEqual([]);
  });

  it('warn of one that is counted nowhere', () => {
    expect(looks([row('A', 10, memo), ...children.map((child) => ({ ...child, ...memo }))])).toEqual([
      'assembly-not-counted',
    ]);
    expect(looks([row('A', 10, memo)])).toEqual([]);
  });

  it('note a total that is not that of its children, counted with their images or without', () => {
    expect(looks([row('A', 10.5, memo), ...children])).toEqual(['assembly-total-differs']);
    expect(looks([row('A', 10.1, memo), ...children])).toEqual([]);
    const off = { position: [5, 1, 0], pair: true } as const;
    const [one, two] = children;
    expect(looks([row('A', 10, { ...memo, ...off }), { ...one, ...off }, { ...two }])).toEqual([]);
  });
});
