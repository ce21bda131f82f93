import { type Db } from '@/db/client';
import { toNumbers } from '@/lib/mass/account';
import { CATEGORIES, type Category } from '@/lib/mass/component';
import { placementIn } from '@/lib/mass/converted-placement';
import { componentOf } from '@/lib/server/lists/row-codec';
import { storedRows } from '@/lib/server/lists/stored-rows';
import { type SourceRevision } from '@/lib/server/three-views/sources';

/** The counted, approved rows of a revision as accounts about the geometry's r0: ten numbers a row, one row after another. */
export interface RowAccounts {
  /** Names its row in the list. */
  readonly items: readonly string[];
  readonly categories: readonly Category[];
  readonly numbers: Float64Array;
}

type PlacedRevision = Pick<SourceRevision, 'id' | 'declarations' | 'conversion'>;

/** A revision never changes, so its rows once placed stay right: those last asked for are kept, this many bytes in all. */
const KEPT_BYTES = 96 * 2 ** 20;
const BYTES_PER_ROW = 128;

const kept = new Map<string, { readonly rows: Promise<RowAccounts>; bytes: number }>();

/** Reads and places every row of a revision in the issue that its conversion leads to, or takes what was placed there before. */
export function rowAccounts(db: Db, revision: PlacedRevision): Promise<RowAccounts> {
  const { to, change } = revision.conversion;
  const key = JSON.stringify([revision.id, to.axes, to.reference, to.lateralPlane, change]);
  const known = kept.get(key);
  if (known !== undefined) {
    // The map keeps the order of use: the first is the longest unused.
    kept.delete(key);
    kept.set(key, known);
    return known.rows;
  }
  const rows = placeRows(db, revision).then(
    (placed) => {
      keep(key, placed);
      return placed;
    },
    (error: unknown) => {
      kept.delete(key);
      throw error;
    },
  );
  kept.set(key, { rows, bytes: 0 });
  return rows;
}

function keep(key: string, placed: RowAccounts): void {
  const entry = kept.get(key);
  if (entry === undefined) return;
  entry.bytes = placed.items.length * BYTES_PER_ROW;
  let total = [...kept.values()].reduce((sum, { bytes }) => sum + bytes, 0);
  for (const [oldest, { bytes }] of kept) {
    if (total <= KEPT_BYTES) return;
    kept.delete(oldest);
    total -= bytes;
  }
}

async function placeRows(db: Db, { id, declarations, conversion }: PlacedRevision): Promise<RowAccounts> {
  const placement = placementIn(declarations, conversion);
  const items: string[] = [];
  const categories: Category[] = [];
  let numbers = new Float64Array(10 * 1024);
  for await (const row of storedRows(db, id)) {
    if (row.counting !== 'counted' || row.status !== 'approved') continue;
    const at = 10 * items.length;
    if (at === numbers.length) {
      const longer = new Float64Array(2 * numbers.length);
      longer.set(numbers);
      numbers = longer;
    }
    numbers.set(toNumbers(placement.account(componentOf(row))), at);
    items.push(row.item);
    categories.push(CATEGORIES[CATEGORIES.indexOf(row.category)] ?? row.category);
  }
  return {
    items,
    categories,
    numbers: numbers.slice(0, 10 * items.length),
  };
}
