import { describe, expect, it } from 'vitest';

import { type BookedRow, type Removal } from '@/lib/findings/removals/removal';
import { findingsOnRemovals } from '@/lib/findings/removals/rules';
import { type Component } from '@/lib/mass/component';
import { accountOfComponent } from '@/lib/mass/place';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';
import { ids } from './support';

const ROW: Partial<Component> = { mass: 10, position: [4, 1, -0.5], moments: diagonal([0.2, 0.3, 0.4]) };
const AWAY: Partial<Component> = { ...ROW, mass: -10, moments: diagonal([-0.2, -0.3, -0.4]) };

const booked = (name: string, row: Partial<Component>, growth = 0.02): BookedRow => ({
  name,
  growth,
  account: accountOfComponent(aComponent(row), declarations(), geometry()),
});

const pair = (removal: Partial<Component>, from: Partial<Component> | null = ROW): Removal => ({
  removal: booked('changes/S1', removal),
  from: from === null ? null : booked('body/A1', from),
});

describe('findings on removals', () => {
  it('say nothing of one that takes away just what is there, or a piece of it', () => {
    expect(findingsOnRemovals([pair(AWAY)])).toEqual([]);
    expect(findingsOnRemovals([pair(AWAY, { ...ROW, quantity: 4 })])).toEqual([]);
    const slice = { ...ROW, mass: -1, moments: diagonal([-0.01, -0.01, -0.01]) };
    expect(findingsOnRemovals([pair(slice)])).toEqual([]);
  });

  it('warn of growth that is not the row’s', () => {
    const grown = (growth: number): Removal => ({
      ...pair(AWAY),
      removal: booked('changes/S1', AWAY, growth),
    });
    expect(findingsOnRemovals([grown(0)])).toMatchObject([
      {
        rule: 'removal-growth-differs',
        severity: 'warning',
        message:
          '1 removal grows otherwise than the row it takes away. First, changes/S1: growth 0 %, body/A1 2 %.',
        rows: ['changes/S1'],
      },
    ]);
    expect(findingsOnRemovals([grown(0.02 + 1e-9)])).toEqual([]);
  });

  it('warn of one that takes more than is there, takes it elsewhere, or leaves what cannot be', () => {
    const more = findingsOnRemovals([pair({ ...AWAY, mass: -10.02 })]);
    expect(more).toMatchObject([{ rule: 'removal-exceeds-row', severity: 'warning' }]);
    expect(more[0]?.message).toMatch(
      /takes 10\.02 kg \(22\.09 lb\) of body\/A1, which has 10 kg \(22\.05 lb\)\.$/,
    );
    expect(ids(findingsOnRemovals([pair({ ...AWAY, mass: -10.009 })]))).toEqual([]);
    const elsewhere = findingsOnRemovals([pair({ ...AWAY, position: [4, 1, -0.49] })]);
    expect(elsewhere[0]?.message).toMatch(
      /takes all of body\/A1 from a place 0\.01 m \(0\.3937 in\) away\.$/,
    );
    expect(findingsOnRemovals([pair({ ...AWAY, position: [4, 1, -0.496] })])).toEqual([]);
    const half = (moment: number) =>
      findingsOnRemovals([pair({ ...ROW, mass: -5, moments: diagonal([-moment, -moment, -moment]) })]);
    expect(ids(half(0.3))).toEqual(['removal-exceeds-row']);
    expect(half(0.09)).toEqual([]);
  });

  it('note one that names no row', () => {
    expect(findingsOnRemovals([pair(AWAY, null)])).toMatchObject([
      { rule: 'removal-without-row', severity: 'note', count: 1 },
    ]);
  });
});
