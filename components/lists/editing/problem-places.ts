import { type EditProblem } from '@/lib/contracts/list-edits';
import { addedRows, type Edits, itemOf, keyOf, rowKey } from '@/lib/editing/edits';
import { type CellProblem } from '@/lib/editing/read-row';

/** Problems that the server found, by the keys of the rows that they are in; those of no edited row are left out. */
export function byKey(
  problems: readonly EditProblem[],
  edits: Edits,
): ReadonlyMap<string, readonly CellProblem[]> {
  if (problems.length === 0) return NONE;
  const keys = new Map<string, string[]>();
  for (const edit of edits.values()) {
    const item = itemOf(edit);
    keys.set(item, [...(keys.get(item) ?? []), keyOf(edit)]);
  }
  const found = new Map<string, CellProblem[]>();
  for (const { item, column, message } of problems) {
    for (const key of item === null ? [] : (keys.get(item) ?? []))
      found.set(key, [...(found.get(key) ?? []), { column, message }]);
  }
  return found;
}

const NONE: ReadonlyMap<string, readonly CellProblem[]> = new Map();

export interface ProblemPlace {
  readonly key: string;
  /** Null: in the row as a whole. */
  readonly column: string | null;
}

/** Every problem in the order of the list: rows of the base by their places, then added rows. */
export function placesOf(
  problems: ReadonlyMap<string, readonly CellProblem[]>,
  edits: Edits,
  placeOf: (item: string) => number | undefined,
): readonly ProblemPlace[] {
  const rows = [...edits.values()]
    .filter((edit) => edit.kind !== 'add' && problems.has(keyOf(edit)))
    .map((edit) => ({ key: rowKey(itemOf(edit)), place: placeOf(itemOf(edit)) ?? Infinity }))
    .sort((a, b) => a.place - b.place);
  const added = addedRows(edits).map((edit) => ({ key: keyOf(edit) }));
  return [...rows, ...added].flatMap(({ key }) =>
    (problems.get(key) ?? []).map(({ column }) => ({ key, column })),
  );
}
