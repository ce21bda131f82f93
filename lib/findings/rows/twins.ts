import { tensorOf } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { type Placement } from '@/lib/mass/place';
import { type Sym3, congruence, halfTraceMinus } from '@/lib/numerics/sym3';
import { INERTIA_UNITS, MASS_UNITS } from '@/lib/units/table';

import { BoundedMap, KEPT } from '../bounded-map';
import { type CheckBlock } from '../columns/check-block';
import { type KeptRow } from '../columns/kept-rows';
import { NameIndex } from '../columns/name-index';
import { RowName } from '../columns/row-names';
import { ASK_THE_TEXT, NAMES_NO_SIDE } from '../columns/side-in-bytes';
import { withoutSide } from '../named-side';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { BlockBook, Book } from '../shared-books';
import { slipOfTwo, slipWords, slipsOfOneThing } from '../unit-slips';
import { Seen, counted, inUnit } from '../watch';

/*
 * Rows that should be alike: those of one part number, and the left and the right one of a pair by their names.
 */

/** What is kept of the first of two rows that should be alike. */
interface Twin {
  readonly item: string;
  readonly side: RowFacts['side'];
  readonly right: number;
  readonly mass: number;
  readonly own: Component['moments'];
  readonly orientation: Component['orientation'];
}

const KEEPS = `Mass, moments and side of the first ${KEPT} part numbers or names, and the first 200 rows concerned.`;

function twinOf(row: RowFacts): Twin {
  const { item, mass, moments, orientation } = row.component;
  return { item, side: row.side, right: row.right, mass, own: moments, orientation };
}

const sumOf = ({ own }: Twin): number => own.ixx + own.iyy + own.izz;

/** S of a row in airframe components, kg.m2. */
function secondOf(twin: Twin, placement: Placement): Sym3 {
  return congruence(placement.ownAxes(twin), halfTraceMinus(tensorOf(twin.own)));
}

/** False where a row's own axes are the list's, the list's are the airframe's but for their words, and no product is stated. */
function canHaveProducts({ own, orientation }: Twin, { declarations: { pose } }: Placement): boolean {
  const turns = [orientation.yaw, orientation.pitch, orientation.roll, pose.yaw, pose.pitch, pose.roll];
  return own.ixy !== 0 || own.ixz !== 0 || own.iyz !== 0 || turns.some((turn) => turn !== 0);
}

/** The row as it is kept, and the first of its part number, and of its name without the side; undefined where there is none. */
interface Twins {
  readonly now: Twin;
  readonly byNumber: Twin | undefined;
  readonly byName: Twin | undefined;
}

class TwinBook extends Book<Twins | null> {
  readonly blocks = new TwinBlocks();
  readonly #numbers = new BoundedMap<Twin>();
  readonly #names = new BoundedMap<Twin>();

  protected take(row: RowFacts): Twins | null {
    const { partNumber, partRevision, group, mass } = row.component;
    if (!row.isCounted || mass === 0 || (partNumber === null && row.side === null)) return null;
    const now = twinOf(row);
    const first = (known: BoundedMap<Twin>, key: string): Twin | undefined => {
      const before = known.get(key);
      if (before === undefined) known.set(key, now);
      return before;
    };
    return {
      now,
      byNumber:
        partNumber === null ? undefined : first(this.#numbers, `${partNumber}\n${partRevision ?? ''}`),
      byName: row.side === null ? undefined : first(this.#names, `${group}\n${withoutSide(row.name)}`),
    };
  }
}

/** A twin that was kept as bytes and numbers. */
function twinOfKept({ item, side, right, mass, moments, turn }: KeptRow): Twin {
  const [ixx, iyy, izz, ixy, ixz, iyz] = moments;
  const [yaw, pitch, roll] = turn;
  return {
    item,
    side,
    right,
    mass,
    own: { ixx, iyy, izz, ixy, ixz, iyz },
    orientation: { yaw, pitch, roll },
  };
}

/** The same of rows that come in blocks: `found` are those of the block at hand whose twin is not plainly like them. */
class TwinBlocks extends BlockBook {
  found: { readonly row: RowFacts; readonly twins: Twins }[] = [];
  readonly #numbers = new FirstRows();
  readonly #names = new FirstRows();
  readonly #name = new RowName();
  #slips: Slips | null = null;

  protected take(block: CheckBlock): void {
    this.found = [];
    const { rows, counted: isCounted, side, kept, facts } = block;
    const slips = (this.#slips ??= slipsOf(block));
    const { start, end } = rows.texts.part_number;
    const { mass } = rows.numbers;
    for (let row = 0; row < rows.rows; row += 1) {
      if (isCounted[row] === 0 || mass[row] === 0) continue;
      const hasNumber = start[row] !== end[row];
      const told = side[row] === ASK_THE_TEXT ? facts(row).side !== null : side[row] !== NAMES_NO_SIDE;
      const byNumber = hasNumber ? this.#byNumber(block, row) : -1;
      const byName = told ? this.#byName(block, row) : -1;
      const isPlain =
        (byNumber === -1 || this.#numbers.isAlike(block, row, byNumber, true, slips)) &&
        (byName === -1 ||
          (this.#names.isAlike(block, row, byName, false, slips) &&
            !mayBeMirrored(block, row, this.#names.row(byName))));
      if (isPlain) continue;
      const twin = (rowsOf: FirstRows, known: number): Twin | undefined =>
        known === -1 ? undefined : twinOfKept(kept.row(rowsOf.row(known)));
      const twins = {
        now: twinOf(facts(row)),
        byNumber: twin(this.#numbers, byNumber),
        byName: twin(this.#names, byName),
      };
      this.found.push({ row: facts(row), twins });
    }
  }

  #byNumber(block: CheckBlock, row: number): number {
    this.#name.takeNumber(block.rows, row);
    return this.#numbers.find(this.#name, block, row, 0);
  }

  #byName(block: CheckBlock, row: number): number {
    const name = this.#name;
    if (!name.takeWithoutSide(block.rows, row)) name.takeText(withoutSide(block.facts(row).name));
    return this.#names.find(name, block, row, block.rows.group[row] ?? 0);
  }
}

/** The first row of each name, with what most rows are compared by close at hand. */
class FirstRows {
  readonly #index = new NameIndex();
  readonly #mass = new Float64Array(KEPT);
  readonly #sum = new Float64Array(KEPT);
  readonly #rows = new Int32Array(KEPT);

  /** The number of the name, or -1: then the row is its first, and kept as such. */
  find({ bytes, start, end }: RowName, block: CheckBlock, row: number, ofClass: number): number {
    const known = this.#index.find(bytes, start, end, ofClass);
    if (known !== -1 || this.#index.isFull) return known;
    const number = this.#index.keep(bytes, start, end, ofClass);
    this.#mass[number] = block.rows.numbers.mass[row] ?? NaN;
    this.#sum[number] = sumAt(block.rows, row);
    this.#rows[number] = block.kept.keep(block, row);
    return -1;
  }

  /** The number under which the first row was kept. */
  row(number: number): number {
    return this.#rows[number] ?? -1;
  }

  /**
   * Whether nothing is to be said of a row beside the first of its name, as far as mass and moments go: no factor of a unit lies
   * between them and, where they should be one part (`isOnePart`), the masses are one.
   */
  isAlike({ rows }: CheckBlock, row: number, number: number, isOnePart: boolean, slips: Slips): boolean {
    const ratio = (rows.numbers.mass[row] ?? NaN) / (this.#mass[number] ?? NaN);
    const apart = Math.abs(ratio - 1);
    if (apart > AT_FACTOR) {
      if (isOnePart && apart > SAME_PART / 2) return false;
      if (mayBeSlip(ratio, slips.mass)) return false;
      if (apart > 2 * SAME_MASS) return true;
    }
    const sum = sumAt(rows, row);
    const former = this.#sum[number] ?? NaN;
    return (
      sum === 0 ||
      former === 0 ||
      Math.abs(sum / former - 1) < SAME_PART ||
      !mayBeSlip(sum / former, slips.inertia)
    );
  }
}

/** The factors by which two figures for one thing may differ. */
interface Slips {
  readonly mass: readonly number[];
  readonly inertia: readonly number[];
}

function slipsOf({ placement: { declarations } }: CheckBlock): Slips {
  const { massUnit, inertiaUnit } = declarations;
  return {
    mass: slipsOfOneThing(massUnit, MASS_UNITS).map(({ factor }) => factor),
    inertia: slipsOfOneThing(inertiaUnit, INERTIA_UNITS, 1.2).map(({ factor }) => factor),
  };
}

/** Whether a ratio, or its reverse, is one of the factors or nearly so. */
function mayBeSlip(ratio: number, factors: readonly number[]): boolean {
  for (const factor of factors) {
    const off = ratio / factor;
    const reverse = 1 / (ratio * factor);
    if (Math.abs(off - 1) < 2 * AT_FACTOR || Math.abs(reverse - 1) < 2 * AT_FACTOR) return true;
  }
  return false;
}

const sumAt = ({ numbers: { ixx, iyy, izz } }: CheckBlock['rows'], row: number): number =>
  (ixx[row] ?? NaN) + (iyy[row] ?? NaN) + (izz[row] ?? NaN);

/** Whether a row and a kept one may be mirror images with products. */
function mayBeMirrored({ rows, kept, right, side }: CheckBlock, row: number, id: number): boolean {
  if (rows.hasMoments[row] === 0 || (right[row] ?? NaN) * kept.right(id) >= 0) return false;
  return side[row] === ASK_THE_TEXT || kept.side(id) === ASK_THE_TEXT || side[row] !== kept.side(id);
}

/** Shows `judge` each counted row with mass together with the first of its part number, then with its twin by name. */
function watchTwins(
  by: readonly ('byNumber' | 'byName')[],
  judgeOf: (list: WatchedList) => (now: Twin, before: Twin) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const seen = new Seen();
    const book = list.books.of(TwinBook);
    const judge = judgeOf(list);
    const look = (row: RowFacts, twins: Twins): void => {
      let what: string | null = null;
      for (const kind of by) {
        const before = twins[kind];
        if (before !== undefined) what ??= judge(twins.now, before);
      }
      if (what !== null) seen.add(row.component.item, what);
    };
    return {
      see: (row) => {
        const twins = book.enter(row);
        if (twins !== null) look(row, twins);
      },
      block: (block) => {
        book.blocks.enter(block);
        for (const { row, twins } of book.blocks.found) look(row, twins);
      },
      report: () => seen.report(headline),
    };
  };
}

/** Two figures for one thing agree with a factor of the table within this share. */
const AT_FACTOR = 0.005;
/** Moments are compared where the masses are the same within this share. */
const SAME_MASS = 0.02;

export const massUnitSlip: RowRule = {
  id: 'mass-unit-slip',
  severity: 'warning',
  sees: 'A counted row whose mass is off by the factor of a unit (lb to kg, g to kg, slug to lb ...), within 0.5 %, against a row of the same part number or against its twin on the other side.',
  why: 'Alike parts weigh the same: one of the two figures is probably in another unit than the list declares.',
  remedy: 'Check both masses against their source and put them into the unit that the list declares.',
  source: 'NIST SP 811 (2008), appendix B, for the factors',
  keeps: KEEPS,
  watch: watchTwins(
    ['byNumber', 'byName'],
    ({ placement: { declarations } }) => {
      const { massUnit } = declarations;
      const slips = slipsOfOneThing(massUnit, MASS_UNITS);
      return (now, before) => {
        const found = slipOfTwo(now.mass / before.mass, slips, AT_FACTOR);
        if (found === null) return null;
        const whose = found.of === 'now' ? 'this one looks' : `${before.item} looks`;
        return `${inUnit(now.mass, massUnit)}, ${before.item} ${inUnit(before.mass, massUnit)}: ${whose} ${slipWords(found.slip)}`;
      };
    },
    (count) =>
      counted(
        count,
        'row is off in mass by the factor of a unit',
        'rows are off in mass by the factor of a unit',
      ),
  ),
};

export const inertiaUnitSlip: RowRule = {
  id: 'inertia-unit-slip',
  severity: 'warning',
  sees: 'A counted row whose moments are off by the factor of an inertia unit (32.174, 144, 12, 4633.06 ...), within 0.5 %, against a row of the same part number and mass or against its twin on the other side.',
  why: 'Alike parts have the same inertia: one of the two figures is probably in another unit than the list declares.',
  remedy:
    'Check both sets of moments against their source and put them into the unit that the list declares.',
  source: 'NIST SP 811 (2008), appendix B, for the factors',
  keeps: KEEPS,
  watch: watchTwins(
    ['byNumber', 'byName'],
    ({ placement: { declarations } }) => {
      const { inertiaUnit } = declarations;
      const slips = slipsOfOneThing(inertiaUnit, INERTIA_UNITS, 1.2);
      return (now, before) => {
        const [sum, former] = [sumOf(now), sumOf(before)];
        if (Math.abs(now.mass / before.mass - 1) > SAME_MASS || sum === 0 || former === 0) return null;
        const found = slipOfTwo(sum / former, slips, AT_FACTOR);
        if (found === null) return null;
        const whose = found.of === 'now' ? 'these look' : `those of ${before.item} look`;
        return `Ixx + Iyy + Izz ${inUnit(sum, inertiaUnit)}, of ${before.item} ${inUnit(former, inertiaUnit)}: ${whose} ${slipWords(found.slip)}`;
      };
    },
    (count) =>
      counted(
        count,
        'row is off in inertia by the factor of a unit',
        'rows are off in inertia by the factor of a unit',
      ),
  ),
};

/** Masses of one part number may differ by this share: tolerances and weighings. */
const SAME_PART = 0.1;

export const samePartDiffers: RowRule = {
  id: 'same-part-differs',
  severity: 'note',
  sees: 'A counted row whose mass differs by more than 10 % from that of the first row of the same part number and revision.',
  why: 'One part number is one drawing: one of the figures is old, or of another part.',
  remedy: 'Check both masses against their source.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchTwins(
    ['byNumber'],
    ({
      placement: {
        declarations: { massUnit },
      },
    }) =>
      (now, before) => {
        if (now.mass * before.mass < 0 || Math.abs(now.mass / before.mass - 1) <= SAME_PART) return null;
        return `${inUnit(now.mass, massUnit)}, ${before.item} ${inUnit(before.mass, massUnit)}`;
      },
    (count) =>
      counted(
        count,
        'row weighs otherwise than its part number elsewhere',
        'rows weigh otherwise than their part number elsewhere',
      ),
  ),
};

/** A product smaller than this share of tr S says nothing about its sign. */
const SMALL = 0.01;
/** Twins have products of one size within this share. */
const ALIKE = 0.2;

/** The products that change sign in the mirror, by the lateral axis, with their names in airframe axes. */
const LATERAL = {
  0: ['xy', 'xz'],
  1: ['xy', 'yz'],
  2: ['xz', 'yz'],
} as const;

export const mirrorProducts: RowRule = {
  id: 'twin-products-same-sign',
  severity: 'warning',
  sees: 'The left and the right one of a pair, by their names and places, with the same sign of a product of inertia that a mirror image turns: those with the lateral axis, Ixy and Iyz where y is lateral.',
  why: 'In a mirror image ∫xy dm and ∫yz dm change sign. Two equal signs add up where they should cancel, and show an asymmetry that is not there.',
  remedy:
    'Check the signs of the two rows’ products and the sign convention of each source; the row’s own axes count too.',
  source: 'First principles: F S Fᵀ with F the reflection across the plane of symmetry',
  keeps: KEEPS,
  watch: watchTwins(
    ['byName'],
    ({ placement }) =>
      (now, before) => {
        if (now.side === before.side || now.right * before.right >= 0) return null;
        if (!canHaveProducts(now, placement) || !canHaveProducts(before, placement)) return null;
        if (Math.abs(now.mass / before.mass - 1) > ALIKE) return null;
        const [one, other] = [secondOf(now, placement), secondOf(before, placement)];
        for (const key of LATERAL[placement.lateral]) {
          const [a, b] = [one[key], other[key]];
          const least = (SMALL * Math.min(sumOf(now), sumOf(before))) / 2;
          if (Math.min(Math.abs(a), Math.abs(b)) <= least || a * b < 0) continue;
          if (Math.abs(a - b) > ALIKE * Math.max(Math.abs(a), Math.abs(b))) continue;
          const { inertiaUnit } = placement.declarations;
          return `I${key} ${inUnit(a, inertiaUnit)} and, of ${before.item} on the other side, ${inUnit(b, inertiaUnit)} (airframe axes, positive integral)`;
        }
        return null;
      },
    (count) =>
      counted(
        count,
        'row has a product of the same sign as its twin on the other side',
        'rows have a product of the same sign as their twins on the other side',
      ),
  ),
};
