import { fromSi } from '@/lib/units/convert';
import { INERTIA_UNITS, type InertiaUnit } from '@/lib/units/table';

import { BoundedMap } from '../bounded-map';
import { type CheckBlock } from '../columns/check-block';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { Scatter, outside } from '../scatter';
import { BlockBook, Book } from '../shared-books';
import { type UnitSlip, slipWords, unitSlips } from '../unit-slips';
import { Seen, counted, inUnit, shown } from '../watch';
import { type Core, GROUPS, KEEPS, PlaceBook, type Spread } from './neighbours';
import { leastTrace } from './size';

/*
 * The moments of rows against those of the other rows of their group, and against the room that the group takes.
 */

/** Radii of gyration outside the core by less than this factor are nothing to speak of. */
const FAR_RADIUS = 2.5;
/** As dense as a solid ball of titanium: what is denser than that is small beyond doubt. */
const SMALL_BODY = 3;

interface Sized {
  readonly item: string;
  readonly mass: number;
  readonly radius: number;
}

/** Half the diagonal of the box that holds the CGs of a group, m. */
function reachOf(spread: Spread): number {
  const sides = spread.map(({ ends }) => {
    const values = ends.map(({ value }) => value);
    return Math.max(...values) - Math.min(...values);
  });
  return Math.hypot(...sides) / 2;
}

/** What is said of a row whose radius is far outside its group's: the unit that would explain it, null where none does. */
interface Misfit {
  readonly of: Sized;
  readonly core: Core;
  readonly reach: number;
  readonly slip: UnitSlip<InertiaUnit> | null;
}

/** The radii of gyration of the rows of each group. */
class SizeBook extends Book<Scatter<Sized> | null> {
  readonly groups = new BoundedMap<Scatter<Sized>>(GROUPS);
  readonly blocks: SizeBlockBook = new SizeBlockBook(this);

  protected take(row: RowFacts): Scatter<Sized> | null {
    const { item, group, mass } = row.component;
    const { radius } = row;
    if (!row.isCounted || radius === null) return null;
    const scatter = this.scatterOf(group);
    scatter.add(Math.log(radius), { item, mass, radius });
    return scatter;
  }

  scatterOf(group: string): Scatter<Sized> {
    const scatter = this.groups.get(group) ?? new Scatter<Sized>();
    this.groups.set(group, scatter);
    return scatter;
  }
}

/** The same of rows that come in blocks. */
class SizeBlockBook extends BlockBook {
  readonly #numbered: Scatter<Sized>[] = [];

  constructor(private readonly book: SizeBook) {
    super();
  }

  protected take({ rows, counted: isCounted }: CheckBlock): void {
    const { mass: masses, ixx, iyy, izz } = rows.numbers;
    for (let row = 0; row < rows.rows; row += 1) {
      const mass = masses[row] ?? NaN;
      if (isCounted[row] === 0 || mass === 0 || rows.hasMoments[row] === 0) continue;
      const square = ((ixx[row] ?? NaN) + (iyy[row] ?? NaN) + (izz[row] ?? NaN)) / (2 * mass);
      if (!(square > 0)) continue;
      const radius = Math.sqrt(square);
      const group = rows.group[row] ?? 0;
      const scatter = (this.#numbered[group] ??= this.book.scatterOf(rows.groups[group] ?? ''));
      const value = Math.log(radius);
      if (!scatter.pass(value)) scatter.add(value, { item: rows.text('item', row) ?? '', mass, radius });
    }
  }
}

/** As small as a solid ball of metal, or larger than the whole group reaches. */
function isAbsurd({ mass, radius }: Sized, [, high]: Core, reach: number): boolean {
  return Math.log(radius) > high
    ? radius > reach
    : Math.abs(mass) * radius ** 2 < SMALL_BODY * leastTrace(Math.abs(mass));
}

function misfitsOf(sizes: SizeBook, places: PlaceBook, slips: readonly UnitSlip<InertiaUnit>[]): Misfit[] {
  return [...sizes.groups.entries()].flatMap(([group, { core, ends }]) => {
    const spread = places.groups.get(group);
    if (core === null || spread === undefined) return [];
    const reach = reachOf(spread);
    return ends.flatMap(({ of, value }): Misfit[] => {
      if (outside(value, core) <= Math.log(FAR_RADIUS) || !isAbsurd(of, core, reach)) return [];
      const slip = slips.find(({ factor }) => outside(value - Math.log(factor) / 2, core) === 0);
      return [{ of, core, reach, slip: slip ?? null }];
    });
  });
}

/** Watches the sizes of the rows of each group; `words` says of a misfit what is to be said, or null. */
function watchSizes(
  words: (misfit: Misfit, list: WatchedList) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const [places, sizes] = [list.books.of(PlaceBook), list.books.of(SizeBook)];
    const { inertiaUnit } = list.placement.declarations;
    const slips = unitSlips(inertiaUnit, INERTIA_UNITS, FAR_RADIUS ** 2).filter(({ isTwice }) => !isTwice);
    return {
      see: (row) => {
        places.enter(row);
        sizes.enter(row);
      },
      block: (block) => {
        places.blocks.enter(block);
        sizes.blocks.enter(block);
      },
      report: () => {
        const seen = new Seen();
        for (const misfit of misfitsOf(sizes, places, slips)) {
          const what = words(misfit, list);
          if (what !== null) seen.add(misfit.of.item, what);
        }
        return seen.report(headline);
      },
    };
  };
}

function radiusWords({ of, core }: Misfit, list: WatchedList): string {
  const { lengthUnit } = list.placement.declarations;
  const [low, high] = [fromSi(Math.exp(core[0]), lengthUnit), Math.exp(core[1])];
  return `radius of gyration ${inUnit(of.radius, lengthUnit)}, most of its group ${shown(low)} to ${inUnit(high, lengthUnit)}`;
}

export const inertiaScale: RowRule = {
  id: 'inertia-scale',
  severity: 'warning',
  sees: 'A counted row whose radius of gyration is in the range of its group in another inertia unit (32.174, 144, 12, 4633.06, 1e6 ...), and as stated is 2.5 times outside it: larger than the whole group reaches, or as small as a solid ball of metal. Groups of ten rows with moments and more.',
  why: 'No part is larger than its group reaches. The moments, or the mass, are probably in another unit than the list declares.',
  remedy:
    'Check the moments and the mass against their source and put them into the units that the list declares.',
  source: 'Common practice, no source; factors from NIST SP 811 (2008), appendix B',
  keeps: KEEPS,
  watch: watchSizes(
    (misfit, list) =>
      misfit.slip === null
        ? null
        : `${radiusWords(misfit, list)}; the moments look ${slipWords(misfit.slip)}`,
    (count) =>
      counted(
        count,
        'row has moments of another size than its group',
        'rows have moments of another size than their groups',
      ),
  ),
};

export const largerThanGroup: RowRule = {
  id: 'larger-than-group',
  severity: 'warning',
  sees: 'A counted row whose radius of gyration is larger than half the diagonal of the box that holds the CGs of its group, and more than 2.5 times that of most of its rows, with no unit to explain it. Groups of ten rows with moments and more.',
  why: 'No body inside the extent of the group has such moments: a digit, the mass, the wrong group, or moments that are not about the CG.',
  remedy: 'Check the moments, the mass and the group of the row.',
  source: 'First principles: ∫ρ² dm ≤ m R² for a body within R of its CG (Bhatia and Davis 2000)',
  keeps: KEEPS,
  watch: watchSizes(
    (misfit, list) => {
      if (misfit.slip !== null || Math.log(misfit.of.radius) < misfit.core[1]) return null;
      const { lengthUnit } = list.placement.declarations;
      return `${radiusWords(misfit, list)}, which reaches ${inUnit(misfit.reach, lengthUnit)} from its middle`;
    },
    (count) =>
      counted(
        count,
        'row has moments that need more room than its group takes',
        'rows have moments that need more room than their groups take',
      ),
  ),
};
