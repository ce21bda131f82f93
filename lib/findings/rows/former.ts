import { addAccounts } from '@/lib/mass/account';
import { addVec } from '@/lib/numerics/vec3';
import { LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';

import { BoundedMap } from '../bounded-map';
import { type FormerSubtotal } from '../context';
import { type RowRule, type Sighting, type Watch, type WatchedList } from '../rule';
import { slipAt, slipWords, unitSlips } from '../unit-slips';
import { inUnit, shown } from '../watch';

/*
 * A list against its revision before, by what that one's subtotals say: no row of it is read.
 */

const GROUPS = 1000;
const KEEPS = `Two sums of mass for each of the first ${GROUPS} groups, and the first moments of the list.`;

interface Amount {
  mass: number;
  rows: number;
}

/** Mass, counted rows and CG of the list now and before; a CG is in airframe components from the datum, null without mass. */
interface Change {
  readonly now: Amount & { readonly along: number | null; readonly up: number | null };
  readonly before: Amount & { readonly along: number | null; readonly up: number | null };
  readonly groups: readonly { readonly group: string; readonly change: number }[];
}

/** The two airframe components in the plane of symmetry. */
function inPlane({ placement: { lateral } }: WatchedList): readonly [0 | 1 | 2, 0 | 1 | 2] {
  if (lateral === 0) return [1, 2];
  return lateral === 1 ? [0, 2] : [0, 1];
}

function beforeOf(former: readonly FormerSubtotal[], list: WatchedList): Change['before'] {
  const rows = former.reduce((sum, part) => sum + part.rows, 0);
  const total = former.map(({ basic }) => basic).reduce(addAccounts);
  const [a, b] = inPlane(list);
  if (total.mass <= 0) return { mass: total.mass, rows, along: null, up: null };
  const { first, mass } = total;
  const cg = addVec(list.placement.geometry.reference, [first[0] / mass, first[1] / mass, first[2] / mass]);
  return { mass, rows, along: cg[a], up: cg[b] };
}

function watchChange(judge: (change: Change, list: WatchedList) => Sighting | null): RowRule['watch'] {
  return (list): Watch => {
    const { former } = list;
    if (former === undefined || former.length === 0)
      return { see: () => undefined, block: () => undefined, report: () => null };
    const [a, b] = inPlane(list);
    const groups = new BoundedMap<Amount>(GROUPS);
    const now = { mass: 0, rows: 0, along: 0, up: 0 };
    const amountOf = (group: string): Amount => {
      const sums = groups.get(group) ?? { mass: 0, rows: 0 };
      groups.set(group, sums);
      return sums;
    };
    /** By the number of a group in blocks. */
    const numbered: Amount[] = [];
    return {
      block: ({ rows, counted: isCounted, total, place }) => {
        const [along, up] = [place[a], place[b]];
        for (let row = 0; row < rows.rows; row += 1) {
          if (isCounted[row] === 0) continue;
          const mass = total[row] ?? NaN;
          now.mass += mass;
          now.rows += 1;
          now.along += mass * (along[row] ?? NaN);
          now.up += mass * (up[row] ?? NaN);
          const group = rows.group[row] ?? 0;
          const sums = (numbered[group] ??= amountOf(rows.groups[group] ?? ''));
          sums.mass += mass;
          sums.rows += 1;
        }
      },
      see: (row) => {
        if (!row.isCounted) return;
        const mass = row.totalMass;
        now.mass += mass;
        now.rows += 1;
        // Along the plane of symmetry a row and its mirror image have the same place.
        now.along += mass * row.place[a];
        now.up += mass * row.place[b];
        const sums = amountOf(row.component.group);
        sums.mass += mass;
        sums.rows += 1;
      },
      report: () => {
        const changes = new Map<string, number>(
          [...groups.entries()].map(([group, { mass }]) => [group, mass]),
        );
        for (const { group, basic } of former) changes.set(group, (changes.get(group) ?? 0) - basic.mass);
        const { mass, rows } = now;
        return judge(
          {
            now: {
              mass,
              rows,
              along: mass > 0 ? now.along / mass : null,
              up: mass > 0 ? now.up / mass : null,
            },
            before: beforeOf(former, list),
            groups: [...changes]
              .map(([group, change]) => ({ group, change }))
              .sort((p, q) => Math.abs(q.change) - Math.abs(p.change)),
          },
          list,
        );
      },
    };
  };
}

/** A list that grew or shrank by a unit's factor does so within this share: rows change between revisions. */
const AT_FACTOR = 0.03;
/** Lists of very different numbers of rows are not compared by a factor. */
const SAME_ROWS = 0.25;

function massSlip({ now, before }: Change, { placement: { declarations } }: WatchedList) {
  if (before.mass <= 0 || Math.abs(now.rows / before.rows - 1) > SAME_ROWS) return null;
  return slipAt(now.mass / before.mass, unitSlips(declarations.massUnit, MASS_UNITS), AT_FACTOR);
}

export const listMassSlip: RowRule = {
  id: 'list-mass-slip',
  severity: 'warning',
  sees: 'A list whose mass against its revision before is, within 3 %, the factor of a mass unit (2.2046, 32.174, 453.6, 1000 ...), with about as many rows.',
  why: 'The file was probably made in another mass unit than the list declares.',
  remedy: 'Check the mass unit of the file and of the list, and upload again.',
  source: 'NIST SP 811 (2008), appendix B, for the factors',
  keeps: KEEPS,
  watch: watchChange((change, list) => {
    const slip = massSlip(change, list);
    if (slip === null) return null;
    const { massUnit } = list.placement.declarations;
    const { now, before } = change;
    return {
      message: `The list weighs ${inUnit(now.mass, massUnit)}, its revision before ${inUnit(before.mass, massUnit)}: the masses look ${slipWords(slip)}.`,
      rows: [],
      count: 1,
    };
  }),
};

export const listLengthSlip: RowRule = {
  id: 'list-length-slip',
  severity: 'warning',
  sees: 'A list whose CG, along and above the datum, is at that of its revision before times the factor of a length unit (25.4, 12, 3.2808, 1000 ...), within 3 %.',
  why: 'The file was probably made in another length unit than the list declares.',
  remedy: 'Check the length unit of the file and of the list, and upload again.',
  source: 'NIST SP 811 (2008), appendix B, for the factors',
  keeps: KEEPS,
  watch: watchChange(({ now, before }, { placement: { declarations } }) => {
    const { lengthUnit, pose } = declarations;
    if (now.along === null || now.up === null || before.along === null || before.up === null) return null;
    if (pose.origin.some((each) => each !== 0)) return null;
    const [is, was] = [Math.hypot(now.along, now.up), Math.hypot(before.along, before.up)];
    const slip = was === 0 ? null : slipAt(is / was, unitSlips(lengthUnit, LENGTH_UNITS), AT_FACTOR);
    const turned = now.along * before.up - now.up * before.along;
    if (slip === null || Math.abs(turned) > AT_FACTOR * is * was) return null;
    return {
      message: `The list’s CG is ${inUnit(is, lengthUnit)} from the datum, in its revision before ${inUnit(was, lengthUnit)}: the places look ${slipWords(slip)}.`,
      rows: [],
      count: 1,
    };
  }),
};

/** A change of a list's mass by more than this share deserves a sentence. */
const JUMP = 0.1;

export const massJump: RowRule = {
  id: 'mass-jump',
  severity: 'warning',
  sees: 'A list whose mass changed by more than 10 % against its revision before.',
  why: 'A change of that size is a decision or a slip: rows lost or doubled, or another unit.',
  remedy: 'Look at the groups that changed most; say what the change is.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchChange((change, list) => {
    const { now, before, groups } = change;
    if (before.mass <= 0 || massSlip(change, list) !== null) return null;
    const share = now.mass / before.mass - 1;
    if (Math.abs(share) <= JUMP) return null;
    const { massUnit } = list.placement.declarations;
    const [most] = groups;
    const largest =
      most === undefined
        ? ''
        : ` Most in ${most.group}: ${most.change > 0 ? '+' : ''}${inUnit(most.change, massUnit)}.`;
    return {
      message: `The list weighs ${inUnit(now.mass, massUnit)}, its revision before ${inUnit(before.mass, massUnit)}: ${share > 0 ? '+' : ''}${shown(100 * share)} %.${largest}`,
      rows: [],
      count: 1,
    };
  }),
};
