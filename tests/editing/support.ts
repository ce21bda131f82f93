import { type DraftEdit } from '@/lib/contracts/list-draft';
import { addedRows, keyOf, type Texts } from '@/lib/editing/edits';
import { type BaseRow, type Sheet } from '@/lib/editing/sheet';

export const editsOf = (...edits: DraftEdit[]): Map<string, DraftEdit> =>
  new Map(edits.map((edit) => [keyOf(edit), edit]));

export const ROWS: readonly BaseRow[] = [
  { item: 'A', texts: { item: 'A', description: 'spar', mass: '7.3', x: '100', note: 'first' } },
  { item: 'B', texts: { item: 'B', description: 'rib', mass: '2', x: '110' } },
  { item: 'C', texts: { item: 'C', description: 'skin', mass: '4', x: '120' } },
];

export const COLUMNS = ['item', 'description', 'mass', 'x'];

/** A grid over invented rows. */
export function sheetOf(edits: ReadonlyMap<string, DraftEdit> = new Map(), rows = ROWS): Sheet {
  return {
    columns: COLUMNS,
    rows: rows.length,
    rowAt: (line) => rows[line] ?? null,
    edits,
    added: addedRows(edits),
  };
}

/** Ids in the order in which they are asked for. */
export function ids(): () => string {
  let last = 0;
  return () => `n${(last += 1)}`;
}

export const area = (top: number, left: number, bottom = top, right = left) => ({ top, left, bottom, right });

export const byItem = (rows: readonly Texts[]): Map<string, Texts> =>
  new Map(rows.map((row) => [row['item'] ?? '', row]));
