import { ItemIndex, hashOf } from '@/lib/ingest/blocks/item-index';

import { KEPT } from '../bounded-map';
import { type CheckBlock } from '../columns/check-block';
import { decoded, encoded } from '../columns/text-bytes';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { BlockBook, Book } from '../shared-books';
import { Seen, counted, inUnit } from '../watch';

interface Assembly {
  /** Counting and mass of all pieces of the row itself, kg; null until it has been seen. */
  own: { readonly isCounted: boolean; readonly mass: number; readonly oneSide: number } | null;
  children: number;
  countedChildren: number;
  /** Of all children, and of the counted ones, kg. */
  childrenMass: number;
  countedMass: number;
  /** Of the counted ones without their mirror images, kg. */
  countedOneSide: number;
}

interface Whole extends Assembly {
  readonly own: NonNullable<Assembly['own']>;
}

const KEEPS = `Mass and counting of the first ${KEPT} rows and parents, and the sums of their children.`;

/** Gathers rows under the parents they name. */
class AssemblyBook extends Book<true> {
  readonly #index = new ItemIndex();
  readonly #assemblies: Assembly[] = [];
  readonly blocks = new AssemblyBlockBook(this);

  protected take(row: RowFacts): true {
    const { item, parent, quantity, mass } = row.component;
    this.add(encoded(item), parent === null ? null : encoded(parent), {
      isCounted: row.isCounted,
      mass: row.totalMass,
      oneSide: quantity * mass,
    });
    return true;
  }

  add(item: Uint8Array, parent: Uint8Array | null, own: NonNullable<Assembly['own']>): void {
    const self = this.#reach(item);
    if (self !== null) self.own = own;
    const assembly = parent === null ? null : this.#reach(parent);
    if (assembly === null) return;
    assembly.children += 1;
    assembly.childrenMass += own.mass;
    if (!own.isCounted) return;
    assembly.countedChildren += 1;
    assembly.countedMass += own.mass;
    assembly.countedOneSide += own.oneSide;
  }

  /** The assemblies that stand in the list and have children, in the order in which their items first came. */
  wholes(): { readonly item: string; readonly assembly: Whole }[] {
    return this.#assemblies.flatMap((assembly, ordinal) => {
      const { own } = assembly;
      if (own === null || assembly.children === 0) return [];
      return [{ item: decoded(this.#index.bytesOf(ordinal)), assembly: { ...assembly, own } }];
    });
  }

  /** Null for one that is new when as many are known as are kept. */
  #reach(name: Uint8Array): Assembly | null {
    const hash = hashOf(name, 0, name.length);
    const isFull = this.#index.count >= KEPT;
    const known = isFull
      ? this.#index.find(name, 0, name.length, hash)
      : this.#index.add(name, 0, name.length, hash);
    if (known !== -1) return this.#assemblies[known] ?? null;
    if (isFull) return null;
    const assembly: Assembly = {
      own: null,
      children: 0,
      countedChildren: 0,
      childrenMass: 0,
      countedMass: 0,
      countedOneSide: 0,
    };
    this.#assemblies.push(assembly);
    return assembly;
  }
}

/** The same of rows that come in blocks. In a list without parents there is nothing to gather. */
class AssemblyBlockBook extends BlockBook {
  constructor(private readonly book: AssemblyBook) {
    super();
  }

  protected take({ rows, counted: isCounted, total }: CheckBlock): void {
    if (!rows.hasParents) return;
    const { quantity, mass } = rows.numbers;
    for (let row = 0; row < rows.rows; row += 1) {
      const parent = rows.textBytes('parent', row);
      this.book.add(rows.textBytes('item', row), parent.length === 0 ? null : parent, {
        isCounted: isCounted[row] === 1,
        mass: total[row] ?? NaN,
        oneSide: (quantity[row] ?? NaN) * (mass[row] ?? NaN),
      });
    }
  }
}

/** Shows `judge` each parent that stands in the list and has children. */
function watchAssemblies(
  judge: (assembly: Whole, list: WatchedList) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const book = list.books.of(AssemblyBook);
    return {
      see: (row) => {
        book.enter(row);
      },
      block: (block) => book.blocks.enter(block),
      report: () => {
        const seen = new Seen();
        for (const { item, assembly } of book.wholes()) {
          const what = judge(assembly, list);
          if (what !== null) seen.add(item, what);
        }
        return seen.report(headline);
      },
    };
  };
}

/** A parent whose mass is within this share of its children's is their sum, not one more part. */
const SAME = 0.1;

export const parentCountedWithChildren: RowRule = {
  id: 'parent-counted-with-children',
  severity: 'warning',
  sees: 'A counted assembly whose mass is, within 10 %, that of its counted children.',
  why: 'The assembly and its parts are the same mass: it is summed twice.',
  remedy: 'Set counting to memo for the assembly, or for its children.',
  source: 'First principles',
  keeps: KEEPS,
  watch: watchAssemblies(
    ({ own, countedChildren, countedMass }, { placement: { declarations } }) =>
      own.isCounted && countedChildren > 0 && own.mass !== 0 && Math.abs(countedMass / own.mass - 1) <= SAME
        ? `${inUnit(own.mass, declarations.massUnit)}, its ${counted(countedChildren, 'child', 'children')} ${inUnit(countedMass, declarations.massUnit)}`
        : null,
    (count) =>
      counted(
        count,
        'assembly is counted together with its children',
        'assemblies are counted together with their children',
      ),
  ),
};

export const assemblyNotCounted: RowRule = {
  id: 'assembly-not-counted',
  severity: 'warning',
  sees: 'An assembly that is memo and whose children are all memo too.',
  why: 'Neither the assembly nor any of its parts is in a result: its mass is missing.',
  remedy: 'Set counting to counted for the assembly, or for its children.',
  source: 'First principles',
  keeps: KEEPS,
  watch: watchAssemblies(
    ({ own, countedChildren, childrenMass }, { placement: { declarations } }) =>
      !own.isCounted && countedChildren === 0 && (own.mass !== 0 || childrenMass !== 0)
        ? `${inUnit(own.mass === 0 ? childrenMass : own.mass, declarations.massUnit)} in no result`
        : null,
    (count) =>
      counted(
        count,
        'assembly is counted neither itself nor by its children',
        'assemblies are counted neither themselves nor by their children',
      ),
  ),
};

/** How far the children's mass is from the assembly's, as a share: with or without the mirror images, whichever is nearer. */
function difference({ own, countedMass, countedOneSide }: Whole): number {
  return Math.min(Math.abs(countedMass / own.mass - 1), Math.abs(countedOneSide / own.oneSide - 1));
}

/** An assembly total may differ from its parts by this share: rounding, and the odd bolt. */
const TOTAL_DIFFERS = 0.02;

export const assemblyTotalDiffers: RowRule = {
  id: 'assembly-total-differs',
  severity: 'note',
  sees: 'A memo assembly whose mass differs by more than 2 % from that of its counted children, with their mirror images and without.',
  why: 'A part is missing, counted twice or of another issue than the assembly.',
  remedy: 'Compare the assembly’s parts list with its children here.',
  source: 'Common practice, no source',
  keeps: KEEPS,
  watch: watchAssemblies(
    (assembly, { placement: { declarations } }) => {
      const { own, countedChildren, countedMass } = assembly;
      if (own.isCounted || countedChildren === 0 || own.mass === 0) return null;
      return difference(assembly) > TOTAL_DIFFERS
        ? `${inUnit(own.mass, declarations.massUnit)}, its children ${inUnit(countedMass, declarations.massUnit)}`
        : null;
    },
    (count) =>
      counted(
        count,
        'assembly total differs from its children',
        'assembly totals differ from their children',
      ),
  ),
};
