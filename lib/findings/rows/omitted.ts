import { type Vec3 } from '@/lib/numerics/vec3';

import { BoundedMap } from '../bounded-map';
import { type RowRule } from '../rule';
import { counted, inUnit, shown } from '../watch';

const GROUPS = 1000;

/** What rows without moments could add to tr S of the list, as a share, before it is worth saying. */
const OMITTED = 0.02;

interface Masses {
  /** Of all counted rows, and of those without own moments, kg. */
  all: number;
  bare: number;
  bareRows: number;
  /** Σ m r and Σ m r², kg.m and kg.m2, of one side, in list components from the list's first row. */
  first: [number, number, number];
  second: number;
}

const nothing = (): Masses => ({ all: 0, bare: 0, bareRows: 0, first: [0, 0, 0], second: 0 });

/** Σ m |r - c|², kg.m2. */
function aboutCentre({ all, first, second }: Masses): number {
  return all > 0 ? Math.max(second - first.reduce((sum, each) => sum + each * each, 0) / all, 0) : 0;
}

export const omittedInertia: RowRule = {
  id: 'omitted-inertia',
  severity: 'note',
  sees: 'Groups whose rows without own moments could, were each as large as the scatter of its group, add more than 2 % to the second moment of the list.',
  why: 'A row without moments is a point. No part is likely to be larger than its group, so that this is about the most that is missing.',
  remedy: 'Give moments to the heaviest of these rows, from the drawing or from a box of their size.',
  source: 'First principles: what is left out of tr S is Σ m k², here with k² the scatter of the group',
  keeps: `For each of the first ${GROUPS} groups five sums.`,
  watch: ({ placement: { declarations } }) => {
    const groups = new BoundedMap<Masses>(GROUPS);
    const whole = nothing();
    let origin: Vec3 | null = null;
    let own = 0;
    /** By the number of a group in blocks. */
    const numbered: Masses[] = [];
    const take = (sums: Masses, all: number, x: number, y: number, z: number, isBare: boolean): void => {
      sums.all += all;
      sums.first[0] += all * x;
      sums.first[1] += all * y;
      sums.first[2] += all * z;
      sums.second += all * (x ** 2 + y ** 2 + z ** 2);
      if (!isBare) return;
      sums.bare += all;
      sums.bareRows += 1;
    };
    return {
      block: ({ rows, counted: isCounted }) => {
        const { mass, quantity, x, y, z, ixx, iyy, izz } = rows.numbers;
        for (let row = 0; row < rows.rows; row += 1) {
          const one = mass[row] ?? NaN;
          if (isCounted[row] === 0 || one <= 0) continue;
          const group = rows.group[row] ?? 0;
          origin ??= [x[row] ?? NaN, y[row] ?? NaN, z[row] ?? NaN];
          const alongX = (x[row] ?? NaN) - origin[0];
          const alongY = (y[row] ?? NaN) - origin[1];
          const alongZ = (z[row] ?? NaN) - origin[2];
          const pieces = quantity[row] ?? NaN;
          own += (pieces * ((ixx[row] ?? NaN) + (iyy[row] ?? NaN) + (izz[row] ?? NaN))) / 2;
          let sums = numbered[group];
          if (sums === undefined) {
            const path = rows.groups[group] ?? '';
            sums = groups.get(path) ?? nothing();
            groups.set(path, sums);
            numbered[group] = sums;
          }
          const isBare = rows.hasMoments[row] === 0;
          take(sums, one * pieces, alongX, alongY, alongZ, isBare);
          take(whole, one * pieces, alongX, alongY, alongZ, isBare);
        }
      },
      see: (row) => {
        const { mass, position, moments, group, quantity } = row.component;
        if (!row.isCounted || mass <= 0) return;
        origin ??= position;
        const all = mass * quantity;
        const at: Vec3 = [position[0] - origin[0], position[1] - origin[1], position[2] - origin[2]];
        own += (quantity * (moments.ixx + moments.iyy + moments.izz)) / 2;
        const sums = groups.get(group) ?? nothing();
        groups.set(group, sums);
        for (const each of [sums, whole]) take(each, all, at[0], at[1], at[2], !row.hasOwnMoments);
      },
      report: () => {
        const total = aboutCentre(whole) + own;
        let [omitted, bare, rows] = [0, 0, 0];
        let most: { readonly group: string; readonly share: number } | null = null;
        for (const [group, sums] of groups.entries()) {
          if (sums.bare === 0) continue;
          const share = (sums.bare * aboutCentre(sums)) / sums.all;
          omitted += share;
          bare += sums.bare;
          rows += sums.bareRows;
          if (most === null || share > most.share) most = { group, share };
        }
        if (most === null || omitted <= OMITTED * total) return null;
        return {
          message: `${counted(rows, 'row without own moments', 'rows without own moments')}, ${inUnit(bare, declarations.massUnit)}, could add up to ${shown((100 * omitted) / total)} % to the second moment of the list. Most in ${most.group}.`,
          rows: [],
          count: rows,
        };
      },
    };
  },
};
