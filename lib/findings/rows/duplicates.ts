import { normVec, subVec } from '@/lib/numerics/vec3';

import { BoundedMap, KEPT } from '../bounded-map';
import { type CheckBlock } from '../columns/check-block';
import { type KeptRow } from '../columns/kept-rows';
import { NameIndex } from '../columns/name-index';
import { PlaceIndex } from '../columns/place-index';
import { RowName } from '../columns/row-names';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { BlockBook, Book } from '../shared-books';
import { Seen, counted, inUnit } from '../watch';

/** What is kept of a row that another may repeat. */
interface Former {
  readonly item: string;
  readonly name: string;
  readonly partNumber: string | null;
  readonly group: string;
  /** -1 left, 1 right, 0 on the plane of symmetry. */
  readonly side: number;
  readonly isMirrored: boolean;
  readonly radius: number | null;
}

const KEEPS = `The name, number and group of the first ${KEPT} rows by mass and place, and the first 200 rows concerned.`;

/** Mass to six digits, place to a tenth of a millimetre, without the side. */
function massAndPlace(row: RowFacts): string {
  const { lateral } = row.placement;
  const along = (k: 0 | 1 | 2): number =>
    Math.round(1e4 * (k === lateral ? Math.abs(row.right) : row.place[k]));
  return `${row.component.mass.toPrecision(6)} ${along(0)} ${along(1)} ${along(2)}`;
}

function formerOf(row: RowFacts): Former {
  const { item, partNumber, group } = row.component;
  const side = Math.abs(row.right) < 1e-4 ? 0 : Math.sign(row.right);
  return { item, name: row.name, partNumber, group, side, isMirrored: row.isMirrored, radius: row.radius };
}

function isSameThing(a: Former, b: Former): boolean {
  const sameName = a.name === b.name || (a.partNumber !== null && a.partNumber === b.partNumber);
  return sameName && a.group === b.group && a.radius === b.radius;
}

/** The row as it is kept, and the one before it with its mass and, side apart, its place. */
interface Repeat {
  readonly now: Former;
  readonly before: Former;
}

class Repeats extends Book<Repeat | null> {
  readonly #known = new BoundedMap<Former>();
  readonly blocks = new RepeatBlocks();

  protected take(row: RowFacts): Repeat | null {
    if (!row.isCounted || row.component.mass === 0) return null;
    const key = massAndPlace(row);
    const [now, before] = [formerOf(row), this.#known.get(key)];
    if (before !== undefined) return { now, before };
    this.#known.set(key, now);
    return null;
  }
}

/** The former of a row that was kept as bytes and numbers. */
function formerOfKept(kept: KeptRow): Former {
  const { item, description, partNumber, group, right, isMirrored, mass, moments } = kept;
  const [ixx, iyy, izz] = moments;
  const square = moments.some((moment) => moment !== 0) ? (ixx + iyy + izz) / (2 * mass) : 0;
  return {
    item,
    name: description ?? item,
    partNumber,
    group,
    side: Math.abs(right) < 1e-4 ? 0 : Math.sign(right),
    isMirrored,
    radius: square > 0 ? Math.sqrt(square) : null,
  };
}

/** The same of rows that come in blocks: `found` are those of the block at hand. */
class RepeatBlocks extends BlockBook {
  found: { readonly row: RowFacts; readonly repeat: Repeat }[] = [];
  readonly #known = new PlaceIndex();

  protected take(block: CheckBlock): void {
    this.found = [];
    const { rows, counted: isCounted, place, right, placement } = block;
    const { mass: masses } = rows.numbers;
    const known = this.#known;
    const tenths = (value: number | undefined): number => Math.round(1e4 * (value ?? NaN));
    const [first, second] = [0, 1, 2].filter((k) => k !== placement.lateral);
    const [a, b] = [place[first === 1 ? 1 : 0], place[second === 1 ? 1 : 2]];
    for (let row = 0; row < rows.rows; row += 1) {
      const mass = masses[row] ?? NaN;
      if (isCounted[row] === 0 || mass === 0) continue;
      const along = tenths(a[row]);
      const up = tenths(b[row]);
      const across = tenths(Math.abs(right[row] ?? NaN));
      const before = known.find(along, up, across, mass);
      if (before === -1) {
        if (!known.isFull) known.keep(block.kept.keep(block, row), along, up, across, mass);
        continue;
      }
      const facts = block.facts(row);
      this.found.push({
        row: facts,
        repeat: { now: formerOf(facts), before: formerOfKept(block.kept.row(before)) },
      });
    }
  }
}

function watchRepeats(
  judge: (now: Former, before: Former, row: RowFacts) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return ({ books }) => {
    const seen = new Seen();
    const repeats = books.of(Repeats);
    return {
      see: (row) => {
        const repeat = repeats.enter(row);
        if (repeat === null) return;
        const what = judge(repeat.now, repeat.before, row);
        if (what !== null) seen.add(row.component.item, what);
      },
      block: (block) => {
        repeats.blocks.enter(block);
        for (const { row, repeat } of repeats.blocks.found) {
          const what = judge(repeat.now, repeat.before, row);
          if (what !== null) seen.add(row.component.item, what);
        }
      },
      report: () => seen.report(headline),
    };
  };
}

export const duplicateRow: RowRule = {
  id: 'duplicate-row',
  severity: 'warning',
  sees: 'A counted row with the name or part number, group, mass, place and inertia of a row before it.',
  why: 'The same part was probably entered twice under two keys; its mass counts twice.',
  remedy: 'Remove one of the two, or, where there are two such parts in one place, state the quantity.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchRepeats(
    (now, before, row) =>
      now.side === before.side && isSameThing(now, before)
        ? `“${now.name}”, ${inUnit(row.component.mass, row.declarations.massUnit)}, as ${before.item}`
        : null,
    (count) => counted(count, 'row repeats another', 'rows repeat others'),
  ),
};

export const sameMassAndPlace: RowRule = {
  id: 'same-mass-and-place',
  severity: 'note',
  sees: 'A counted row with the mass and the place of a row before it, under another name, number or group.',
  why: 'Two things are seldom of one mass in one place: one part may have come in from two sources.',
  remedy: 'Check that both exist.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchRepeats(
    (now, before) =>
      now.side === before.side && !isSameThing(now, before)
        ? `“${now.name}”, as ${before.item}, “${before.name}”`
        : null,
    (count) =>
      counted(count, 'row has the mass and place of another', 'rows have the mass and place of others'),
  ),
};

export const pairEnteredTwice: RowRule = {
  id: 'pair-entered-twice',
  severity: 'warning',
  sees: 'A counted row at the mirror image of another of the same mass, where one of the two already stands for both sides: marked as a pair, or in a half list.',
  why: 'The image is counted with the row that is a pair, and once more as a row of its own.',
  remedy: 'Remove one of the two rows, or clear the symmetry column so that each counts for its own side.',
  source: 'First principles',
  keeps: KEEPS,
  watch: watchRepeats(
    (now, before, row) =>
      now.side * before.side === -1 && (now.isMirrored || before.isMirrored)
        ? `“${now.name}”, ${inUnit(row.component.mass, row.declarations.massUnit)}, is the mirror image of ${before.item}`
        : null,
    (count) => counted(count, 'mirror image is counted twice', 'mirror images are counted twice'),
  ),
};

/** Two rows of one name are one thing when they agree within these shares, and m. */
const NEAR_MASS = 0.01;
const NEAR_PLACE = 0.005;

export const nearDuplicate: RowRule = {
  id: 'near-duplicate',
  severity: 'note',
  sees: 'A counted row of the name and group of a row before it, with its mass within 1 % and its CG within 5 mm, but not both the same.',
  why: 'The part may stand in the list twice, once from each of two issues of its data.',
  remedy: 'Check that both exist; if not, keep the newer.',
  source: 'Common practice, no source',
  keeps: `Name, group, mass and place of the first ${KEPT} names, and the first 200 rows concerned.`,
  watch: () => {
    const seen = new Seen();
    const known = new BoundedMap<{
      readonly item: string;
      readonly mass: number;
      readonly at: RowFacts['place'];
    }>();
    const judge = (row: RowFacts, before: { item: string; mass: number; at: RowFacts['place'] }): void => {
      const { item, mass } = row.component;
      const apart = normVec(subVec(row.place, before.at));
      const differs = Math.abs(mass / before.mass - 1);
      if (differs > NEAR_MASS || apart > NEAR_PLACE || (differs < 1e-6 && apart < 1e-4)) return;
      const { massUnit, lengthUnit } = row.declarations;
      seen.add(
        item,
        `“${row.name}”, ${inUnit(mass, massUnit)} against ${inUnit(before.mass, massUnit)} of ${before.item}, ${inUnit(apart, lengthUnit)} apart`,
      );
    };
    const names = new NameIndex();
    const name = new RowName();
    /** Of the names in blocks, by their numbers. */
    const [firstMass, firstRow] = [new Float64Array(KEPT), new Int32Array(KEPT)];
    return {
      block: (block) => {
        const { rows, counted: isCounted, place, kept } = block;
        const { mass: masses } = rows.numbers;
        for (let row = 0; row < rows.rows; row += 1) {
          const mass = masses[row] ?? NaN;
          if (isCounted[row] === 0 || mass === 0) continue;
          const group = rows.group[row] ?? 0;
          name.take(rows, row);
          const known = names.find(name.bytes, name.start, name.end, group);
          if (known === -1) {
            if (names.isFull) continue;
            const number = names.keep(name.bytes, name.start, name.end, group);
            firstMass[number] = mass;
            firstRow[number] = kept.keep(block, row);
            continue;
          }
          if (Math.abs(mass / (firstMass[known] ?? NaN) - 1) > NEAR_MASS) continue;
          const before = firstRow[known] ?? -1;
          const isNear = place.every(
            (along, k) => Math.abs((along[row] ?? NaN) - kept.place(before, k)) <= NEAR_PLACE,
          );
          if (!isNear) continue;
          const { item, mass: was, place: at } = kept.row(before);
          judge(block.facts(row), { item, mass: was, at: at as RowFacts['place'] });
        }
      },
      see: (row) => {
        const { item, mass, group } = row.component;
        if (!row.isCounted || mass === 0) return;
        const key = `${group}\n${row.name}`;
        const before = known.get(key);
        if (before === undefined) {
          known.set(key, { item, mass, at: row.place });
          return;
        }
        judge(row, before);
      },
      report: () => seen.report((count) => counted(count, 'row is nearly another', 'rows are nearly others')),
    };
  },
};
