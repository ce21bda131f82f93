import { type Component } from '@/lib/mass/component';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { LENGTH_UNITS } from '@/lib/units/table';

import { BoundedMap } from '../bounded-map';
import { type CheckBlock } from '../columns/check-block';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { Scatter, outside } from '../scatter';
import { BlockBook, Book } from '../shared-books';
import { slipWords, unitSlips } from '../unit-slips';
import { Seen, counted, inUnit, shown } from '../watch';

/*
 * Rows against their neighbours, the other rows of their group: where the three lowest and the three highest of a quantity are set
 * aside, what remains is the group's core.
 */

/** Groups that are watched; a list with more has its later groups unwatched. */
export const GROUPS = 1000;
export const KEEPS = `For each of the first ${GROUPS} groups the four lowest and four highest rows of each quantity.`;

type Axis = 0 | 1 | 2;
const AXES: readonly Axis[] = [0, 1, 2];
const NAMES = ['x', 'y', 'z'] as const;

type Placed = Pick<Component, 'item' | 'position'>;
export type Spread = readonly [Scatter<Placed>, Scatter<Placed>, Scatter<Placed>];

/** Outside the core by this many times its width, and by this much at least, m, a row is not where its group is. */
const WIDTHS = 4;
const LEAST = 1;

interface Stray {
  readonly row: Placed;
  readonly axis: Axis;
  readonly cores: readonly [Core, Core, Core];
}
export type Core = readonly [number, number];

function limitOf([low, high]: Core): number {
  return Math.max(WIDTHS * (high - low), LEAST);
}

function straysOf(spread: Spread): Stray[] {
  const [x, y, z] = [spread[0].core, spread[1].core, spread[2].core];
  if (x === null || y === null || z === null) return [];
  const cores = [x, y, z] as const;
  const found = new Map<string, Stray>();
  for (const axis of AXES)
    for (const { value, of } of spread[axis].ends)
      if (outside(value, cores[axis]) > limitOf(cores[axis]) && !found.has(of.item))
        found.set(of.item, { row: of, axis, cores });
  return [...found.values()];
}

/** True where a place is in the group's core or no farther from it than the core is wide. */
function fits(position: Vec3, cores: Stray['cores']): boolean {
  return AXES.every((k) => {
    const [low, high] = cores[k];
    return outside(position[k], cores[k]) <= Math.max(high - low, LEAST / 4);
  });
}

const withAxis = (position: Vec3, axis: Axis, value: number): Vec3 => [
  axis === 0 ? value : position[0],
  axis === 1 ? value : position[1],
  axis === 2 ? value : position[2],
];

/** What single slip would put a stray where its group is, in words; null when none does. */
function slipOf({ row: { position }, axis, cores }: Stray, list: WatchedList): string | null {
  const { lengthUnit, axes } = list.placement.declarations;
  const isLateral = axes[axis] === 'left' || axes[axis] === 'right';
  if (!isLateral && fits(withAxis(position, axis, -position[axis]), cores))
    return `with the other sign of ${NAMES[axis]} it is where they are`;
  for (const slip of unitSlips(lengthUnit, LENGTH_UNITS)) {
    const scaled: Vec3 = [position[0] / slip.factor, position[1] / slip.factor, position[2] / slip.factor];
    if (fits(scaled, cores)) return `its place looks ${slipWords(slip)}`;
    if (fits(withAxis(position, axis, scaled[axis]), cores))
      return `its ${NAMES[axis]} looks ${slipWords(slip)}`;
  }
  return null;
}

function strayWords({ row, axis, cores }: Stray, list: WatchedList): string {
  const { lengthUnit } = list.placement.declarations;
  const [low, high] = cores[axis];
  return `${NAMES[axis]} ${inUnit(row.position[axis], lengthUnit)}, most of its group ${shown(fromSi(low, lengthUnit))} to ${inUnit(high, lengthUnit)}`;
}

/** Where the rows of each group are. */
export class PlaceBook extends Book<Spread | null> {
  readonly groups = new BoundedMap<Spread>(GROUPS);
  readonly blocks = new PlaceBlockBook(this);

  protected take({ isCounted, component: { item, group, position, mass } }: RowFacts): Spread | null {
    if (!isCounted || mass === 0) return null;
    const spread = this.spreadOf(group);
    for (const axis of AXES) spread[axis].add(position[axis], { item, position });
    return spread;
  }

  spreadOf(group: string): Spread {
    const spread: Spread = this.groups.get(group) ?? [new Scatter(), new Scatter(), new Scatter()];
    this.groups.set(group, spread);
    return spread;
  }
}

/** The same of rows that come in blocks. */
export class PlaceBlockBook extends BlockBook {
  readonly #numbered: Spread[] = [];

  constructor(private readonly book: PlaceBook) {
    super();
  }

  protected take({ rows, counted: isCounted }: CheckBlock): void {
    const { mass, x, y, z } = rows.numbers;
    for (let row = 0; row < rows.rows; row += 1) {
      if (isCounted[row] === 0 || mass[row] === 0) continue;
      const spread = this.#spreadOf(rows, rows.group[row] ?? 0);
      const isInX = spread[0].pass(x[row] ?? NaN);
      const isInY = spread[1].pass(y[row] ?? NaN);
      const isInZ = spread[2].pass(z[row] ?? NaN);
      if (isInX && isInY && isInZ) continue;
      const position: Vec3 = [x[row] ?? NaN, y[row] ?? NaN, z[row] ?? NaN];
      const of = { item: rows.text('item', row) ?? '', position };
      if (!isInX) spread[0].add(position[0], of);
      if (!isInY) spread[1].add(position[1], of);
      if (!isInZ) spread[2].add(position[2], of);
    }
  }

  #spreadOf(rows: CheckBlock['rows'], group: number): Spread {
    const known = this.#numbered[group];
    if (known !== undefined) return known;
    const spread = this.book.spreadOf(rows.groups[group] ?? '');
    this.#numbered[group] = spread;
    return spread;
  }
}

/** Watches where the rows of each group are; `words` says of a stray what is to be said, or null. */
function watchPlaces(
  words: (stray: Stray, list: WatchedList) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const book = list.books.of(PlaceBook);
    return {
      see: (row) => {
        book.enter(row);
      },
      block: (block) => book.blocks.enter(block),
      report: () => {
        const seen = new Seen();
        for (const [, spread] of book.groups.entries())
          for (const stray of straysOf(spread)) {
            const what = words(stray, list);
            if (what !== null) seen.add(stray.row.item, what);
          }
        return seen.report(headline);
      },
    };
  };
}

export const placeSlip: RowRule = {
  id: 'place-slip',
  severity: 'warning',
  sees: 'A counted row far from its group that the other sign of a coordinate, or another length unit (25.4, 12, 3.2808, 1000 ...), puts where its group is. Groups of ten rows and more; the lateral sign is judged by names.',
  why: 'One slip explains the place, and its neighbours contradict it.',
  remedy: 'Check the sign and the unit of the coordinate against the source.',
  source: 'Common practice, no source; factors from NIST SP 811 (2008), appendix B',
  keeps: KEEPS,
  watch: watchPlaces(
    (stray, list) => {
      const slip = slipOf(stray, list);
      return slip === null ? null : `${strayWords(stray, list)}; ${slip}`;
    },
    (count) =>
      counted(
        count,
        'row is away from its group by a sign or a unit',
        'rows are away from their groups by a sign or a unit',
      ),
  ),
};

export const outsideGroup: RowRule = {
  id: 'outside-group',
  severity: 'note',
  sees: 'A counted row farther from its group than four times the width that most of the group takes, and than 1 m. Groups of ten rows and more.',
  why: 'Its coordinate may be wrong, or its group.',
  remedy: 'Check the place and the group of the row.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchPlaces(
    (stray, list) => (slipOf(stray, list) === null ? strayWords(stray, list) : null),
    (count) => counted(count, 'row is far from its group', 'rows are far from their groups'),
  ),
};
