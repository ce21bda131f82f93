import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  type Account,
  AccountSum,
  fromNumbers,
  scaleAccount,
  toNumbers,
  toNumbersWithRest,
  NOTHING,
} from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { Placement, piecesOf } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { type GrowthAllowances, NO_GROWTH, groupBranches, rollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { type Subtotal, SubtotalBook } from '@/lib/mass/subtotals';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, diagonal, geometry, properties } from '@/tests/support/mass';

const frame = geometry({ axes: ['aft', 'right', 'up'], reference: [12, 0, 1], lemac: [11, 0, 0.5], mac: 2 });
const placement = new Placement(declarations({ axes: ['aft', 'right', 'up'] }), frame);
const ALLOWANCES: GrowthAllowances = { E: 0.15, C: 0.05, A: 0 };

function booked(rows: readonly Component[]): Subtotal[] {
  const book = new SubtotalBook(placement);
  for (const row of rows) book.add(row);
  return book.subtotals();
}

function summed(accounts: readonly Account[]): Account {
  const sum = new AccountSum();
  for (const account of accounts) sum.add(account);
  return sum.account;
}

function expectSame(a: Account, b: Account): void {
  const size = Math.max(...toNumbers(b).map(Math.abs));
  toNumbers(a).forEach((value, i) =>
    expect(Math.abs(value - (toNumbers(b)[i] ?? NaN))).toBeLessThanOrEqual(1e-14 * size),
  );
}

describe('the subtotals of a list', () => {
  it('add up to every counted row, and to no memo row', () => {
    fc.assert(
      fc.property(fc.array(anyComponent, { minLength: 1, maxLength: 30 }), (rows) => {
        const counted = rows.filter((row) => row.counting === 'counted');
        const subtotals = booked(rows);
        expectSame(
          summed(subtotals.map(({ basic }) => basic)),
          summed(counted.map((row) => placement.account(row))),
        );
        const total = (key: 'rows' | 'pieces' | 'memoRows'): number =>
          subtotals.reduce((sum, part) => sum + part[key], 0);
        expect(total('rows')).toBe(counted.length);
        expect(total('memoRows')).toBe(rows.length - counted.length);
        expect(total('pieces')).toBe(
          counted.reduce((sum, row) => sum + piecesOf(row, placement.declarations), 0),
        );
      }),
    );
  });

  it('are one per group, category, maturity and status', () => {
    const subtotals = booked([
      aComponent({ item: '1', group: 'Wing/Spars' }),
      aComponent({ item: '2', group: 'Wing/Spars' }),
      aComponent({ item: '3', group: 'Wing/Spars', maturity: 'C' }),
      aComponent({ item: '4', group: 'Wing/Spars', category: 'operating' }),
      aComponent({ item: '5', group: 'Wing/Spars', status: 'pending' }),
      aComponent({ item: '6', group: 'Wing' }),
    ]);
    expect(subtotals.map(({ rows }) => rows)).toEqual([2, 1, 1, 1, 1]);
  });

  it('come back from storage as the ten numbers they were, and what rounding left out of them', () => {
    for (const { basic } of booked([aComponent({ mass: 3.3, position: [1, 2, 3] })]))
      expect(fromNumbers(JSON.parse(JSON.stringify(toNumbersWithRest(basic))))).toEqual(basic);
    expect(toNumbersWithRest(fromNumbers(toNumbers(NOTHING)))).toHaveLength(10);
    expect(() => fromNumbers([1, 2, 3])).toThrow(/ten finite numbers/);
  });
});

describe('a roll-up', () => {
  it('grows each row by what it states, or else by the allowance of its maturity', () => {
    fc.assert(
      fc.property(fc.array(anyComponent, { minLength: 1, maxLength: 30 }), (rows) => {
        const grown = rows
          .filter((row) => row.counting === 'counted')
          .map((row) => {
            const growth = row.growth ?? (row.maturity === null ? 0 : ALLOWANCES[row.maturity]);
            return scaleAccount(1 + growth, placement.account(row));
          });
        const whole = rollUp(booked(rows), [], frame, ALLOWANCES);
        const expected = resultOf(summed(grown), frame);
        expect(Math.abs(whole.predicted.mass - expected.mass)).toBeLessThanOrEqual(1e-14 * expected.mass);
        if (expected.properties === null) {
          expect(whole.predicted.properties).toBeNull();
          return;
        }
        const [a, b] = [properties(whole.predicted).inertia, expected.properties.inertia];
        // Places lie up to 60 m from r0, so second moments carry up to that squared of rounding.
        for (const key of ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const)
          expect(Math.abs(a[key] - b[key])).toBeLessThanOrEqual(1e-11 * expected.mass);
      }),
    );
  });

  it('moves the CG when parts grow unevenly: by hand, 1 kg at 0 m and 1 kg growing by half at 5 m', () => {
    const whole = rollUp(
      booked([aComponent({ item: '1' }), aComponent({ item: '2', position: [5, 0, 0], growth: 0.5 })]),
      [],
      frame,
      NO_GROWTH,
    );
    expect(properties(whole.basic).cg[0]).toBeCloseTo(2.5, 14);
    expect(whole.predicted.mass).toBe(2.5);
    expect(properties(whole.predicted).cg[0]).toBeCloseTo(3, 14);
    // Iyy: reduced mass times distance squared.
    expect(properties(whole.predicted).inertia.iyy).toBeCloseTo(((1 * 1.5) / 2.5) * 25, 12);
    expect(whole.ungrownMass).toBe(1);
  });

  it('takes approved rows only, unless told otherwise, and the categories it is told', () => {
    const subtotals = booked([
      aComponent({ item: '1', mass: 100 }),
      aComponent({ item: '2', mass: 10, status: 'pending' }),
      aComponent({ item: '3', mass: 1, category: 'payload' }),
    ]);
    expect(rollUp(subtotals, [], frame, NO_GROWTH).basic.mass).toBe(101);
    expect(rollUp(subtotals, [], frame, NO_GROWTH, { statuses: ['approved', 'pending'] }).basic.mass).toBe(
      111,
    );
    expect(rollUp(subtotals, [], frame, NO_GROWTH, { categories: ['empty'] }).basic.mass).toBe(100);
  });

  it('adds named items on board, which do not grow', () => {
    const rows = [aComponent({ mass: 100, position: [12, 0, 1], growth: 0.1 })];
    const items = [
      { name: 'pilot', mass: 80, position: [4, -0.5, 1] as const },
      { name: 'crate', mass: 20, position: [14, 0, 1] as const, moments: diagonal([3, 4, 5]) },
    ];
    const whole = rollUp(booked(rows), items, frame, NO_GROWTH);
    expect(whole.basic.mass).toBe(200);
    expect(whole.predicted.mass).toBeCloseTo(210, 12);
    expect(whole.onBoard.mass).toBe(100);
    expect(properties(whole.basic).cg[0]).toBeCloseTo((1200 + 320 + 280) / 200, 13);
    const alone = properties(rollUp([], items.slice(1), frame, NO_GROWTH).basic);
    expect(alone.inertia.ixx).toBeCloseTo(3, 13);
    expect(alone.inertia.izz).toBeCloseTo(5, 13);
  });

  it('states the CG in per cent of the chord: by hand, 12 m on a chord from 11 m to 13 m is 50', () => {
    const whole = rollUp(booked([aComponent({ position: [12, 3, 1] })]), [], frame, NO_GROWTH);
    expect(properties(whole.basic).percentMac).toBe(50);
  });

  it('shows mass and moment of what only takes away, and no CG', () => {
    const whole = rollUp(
      booked([
        aComponent({ mass: 5, group: 'A' }),
        aComponent({ mass: -2, position: [3, 1, 0], group: 'B' }),
      ]),
      [],
      frame,
      NO_GROWTH,
    );
    const [a, b] = whole.groups;
    expect(a?.basic.properties).not.toBeNull();
    expect(b?.basic.mass).toBe(-2);
    expect([...(b?.basic.moment ?? [])].map((part) => part + 0)).toEqual([-6, -2, 0]);
    expect(b?.basic.properties).toBeNull();
  });

  it('of a point far from r0 has a CG and no moments at all', () => {
    const whole = rollUp(
      booked([aComponent({ mass: 0.7, position: [31.7, 5.3, -2.9] })]),
      [],
      frame,
      NO_GROWTH,
    );
    expect(Object.values(properties(whole.basic).inertia).map((moment) => moment + 0)).toEqual([
      0, 0, 0, 0, 0, 0,
    ]);
    expect(properties(whole.basic).radii).toEqual({ x: 0, y: 0, z: 0 });
  });

  it('of nothing has no mass and no CG', () => {
    const whole = rollUp([], [], frame, ALLOWANCES);
    expect(whole.basic).toEqual({ mass: 0, moment: [0, 0, 0], properties: null });
    expect(whole.groups).toEqual([]);
  });

  it('has radii of gyration that give the moments back: I = m k²', () => {
    fc.assert(
      fc.property(anyComponent, (row) => {
        const { mass, properties: found } = resultOf(placement.account(row), frame);
        if (found?.radii == null) throw new Error('A real body has radii of gyration.');
        const { radii, inertia } = found;
        for (const [k, moment] of [
          [radii.x, inertia.ixx],
          [radii.y, inertia.iyy],
          [radii.z, inertia.izz],
        ] as const)
          expect(Math.abs(mass * k ** 2 - moment)).toBeLessThanOrEqual(1e-14 * moment);
      }),
    );
  });
});

describe('groups', () => {
  const subtotals = booked([
    aComponent({ item: '1', mass: 1, group: 'Wing tips' }),
    aComponent({ item: '2', mass: 2, group: 'Wing/Spars' }),
    aComponent({ item: '3', mass: 4, group: 'Wing/Ribs', position: [1, 0, 0] }),
    aComponent({ item: '4', mass: 8, group: 'Wing', counting: 'memo' }),
    aComponent({ item: '5', mass: 16, group: 'Fuselage/Frames/Aft' }),
  ]);
  const { groups } = rollUp(subtotals, [], frame, NO_GROWTH);

  it('stand in the order of their paths, level by level', () => {
    expect(groups.map(({ group }) => group)).toEqual([
      'Fuselage/Frames/Aft',
      'Wing',
      'Wing/Ribs',
      'Wing/Spars',
      'Wing tips',
    ]);
  });

  it('gather under every path above them', () => {
    const branches = groupBranches(groups, frame);
    expect(branches.map(({ group, basic, rows, memoRows }) => [group, basic.mass, rows, memoRows])).toEqual([
      ['Fuselage', 16, 1, 0],
      ['Fuselage/Frames', 16, 1, 0],
      ['Fuselage/Frames/Aft', 16, 1, 0],
      ['Wing', 6, 2, 1],
      ['Wing/Ribs', 4, 1, 0],
      ['Wing/Spars', 2, 1, 0],
      ['Wing tips', 1, 1, 0],
    ]);
    const wing = branches.find(({ group }) => group === 'Wing');
    expect(wing?.basic.properties?.cg[0]).toBeCloseTo(4 / 6, 14);
  });
});

describe('a stateless roll-up', () => {
  it('is what a configuration of the same rows is, whatever r0', () => {
    fc.assert(
      fc.property(fc.array(anyComponent, { minLength: 1, maxLength: 20 }), (rows) => {
        const list = declarations({ axes: ['aft', 'left', 'up'] });
        const stateless = new StatelessRollUp(list);
        const about = geometry({ axes: ['aft', 'left', 'up'], reference: [5, 1, 0] });
        const book = new SubtotalBook(new Placement(list, about));
        for (const row of rows) {
          stateless.add(row);
          book.add(row);
        }
        const [a, b] = [stateless.result(), rollUp(book.subtotals(), [], about, NO_GROWTH)];
        expect(a.rows).toBe(b.rows);
        expect(a.pieces).toBe(b.pieces);
        if (b.basic.properties === null) {
          expect(a.basic.properties).toBeNull();
          return;
        }
        const [p, q] = [properties(a.basic), b.basic.properties];
        p.cg.forEach((part, k) => expect(part).toBeCloseTo(q.cg[k] ?? NaN, 11));
        for (const key of ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const)
          expect(Math.abs(p.inertia[key] - q.inertia[key])).toBeLessThanOrEqual(1e-11 * b.basic.mass);
      }),
    );
  });

  it('has the first row as its reference point, and the list’s own axes', () => {
    const stateless = new StatelessRollUp(declarations({ axes: ['forward', 'left', 'up'] }));
    stateless.add(aComponent({ position: [10000, 2, 3] }));
    expect(stateless.geometry.reference).toEqual([10000, 2, 3]);
    expect(stateless.geometry.axes).toEqual(['forward', 'left', 'up']);
    expect(properties(stateless.result().basic).percentMac).toBeNull();
  });

  it('of no rows has no mass', () => {
    expect(new StatelessRollUp(declarations()).result().basic.mass).toBe(0);
  });
});
