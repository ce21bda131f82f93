import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type ListRow } from '@/lib/contracts/list-rows';
import { isNumberColumn } from './columns';

/** The texts of a row by column name, its own columns with them; blank cells are left out. */
export type Texts = Readonly<Record<string, string>>;

/** The edits of a draft by key: a sparse overlay, however long the list. */
export type Edits = ReadonlyMap<string, DraftEdit>;

export const rowKey = (item: string): string => `row ${item}`;
export const addedKey = (id: string): string => `new ${id}`;

/** The key that an edit stands under in its draft. */
export function keyOf(edit: DraftEdit): string {
  return edit.kind === 'add' ? addedKey(edit.id) : rowKey(edit.item);
}

/** The item of the row that an edit is of; of an added one, the item it is given so far. */
export function itemOf(edit: DraftEdit): string {
  return edit.kind === 'add' ? (edit.fields['item'] ?? '').trim() : edit.item;
}

/** A row as its list states it, as texts. */
export function textsOfRow(row: ListRow): Texts {
  return Object.fromEntries(
    Object.entries({ ...row.own, ...row.cells }).map(([name, cell]) => [name, String(cell)]),
  );
}

/** What a row says with an edit applied; null where it is removed. `base` is empty for an added one. */
export function editedTexts(base: Texts, edit: DraftEdit | undefined): Texts | null {
  if (edit === undefined) return base;
  return edit.kind === 'remove' ? null : { ...base, ...edit.fields };
}

/** Whether two texts of a column say the same: numbers by their value. */
export function saysSame(column: string, a: string, b: string): boolean {
  if (a === b) return true;
  if (a === '' || b === '' || !isNumberColumn(column)) return false;
  return PLAIN.test(a) && PLAIN.test(b) && Number(a) === Number(b);
}

const PLAIN = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/u;

/**
 * The edit of a row of the base with some fields more; null when the row then says what it said. A removed row comes back with
 * them.
 */
export function changeWith(
  item: string,
  base: Texts,
  edit: DraftEdit | undefined,
  fields: Texts,
): DraftEdit | null {
  const all = { ...(edit?.kind === 'change' ? edit.fields : {}), ...fields };
  const left = Object.entries(all).filter(([column, text]) => !saysSame(column, text, base[column] ?? ''));
  return left.length === 0 ? null : { kind: 'change', item, fields: Object.fromEntries(left) };
}

/** Added rows in their order. */
export function addedRows(edits: Edits): Extract<DraftEdit, { kind: 'add' }>[] {
  const added = [...edits.values()].filter((edit) => edit.kind === 'add');
  return added.sort((a, b) => a.place - b.place || (a.id < b.id ? -1 : 1));
}
