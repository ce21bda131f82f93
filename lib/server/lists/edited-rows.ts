import { type Db } from '@/db/client';
import { type RowEdit } from '@/lib/contracts/list-edits';
import { type ListCells, type MassListWriter } from '@/lib/export/mass-list';
import { LIST_COLUMNS, type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type Component } from '@/lib/mass/component';
import { componentOf } from './row-codec';
import { storedRows } from './stored-rows';

/** One row of the list as it will be: its line of CSV, and the stored component where nothing was edited. */
export interface EditedRow {
  readonly item: string;
  readonly text: string;
  readonly stored: Component | null;
}

export interface EditSet {
  readonly changed: ReadonlyMap<string, Readonly<Record<string, string>>>;
  readonly removed: ReadonlySet<string>;
  readonly added: readonly Readonly<Record<string, string>>[];
}

export function editSet(edits: readonly RowEdit[]): EditSet {
  const changed = new Map<string, Readonly<Record<string, string>>>();
  const removed = new Set<string>();
  const added: Readonly<Record<string, string>>[] = [];
  for (const edit of edits) {
    if (edit.kind === 'change') changed.set(edit.item, edit.fields);
    else if (edit.kind === 'remove') removed.add(edit.item);
    else added.push(edit.fields);
  }
  return { changed, removed, added };
}

/** The rows of a revision with the edits applied, in its order, added rows last. */
export async function* editedRows(
  db: Db,
  revisionId: string,
  edits: EditSet,
  writer: MassListWriter,
): AsyncGenerator<EditedRow> {
  for await (const row of storedRows(db, revisionId)) {
    if (edits.removed.has(row.item)) continue;
    const component = componentOf(row);
    const fields = edits.changed.get(row.item);
    yield fields === undefined
      ? { item: row.item, text: writer.line(component), stored: component }
      : {
          item: row.item,
          text: lineWith(writer, writer.cells(component), component.extra, fields),
          stored: null,
        };
  }
  for (const fields of edits.added)
    yield { item: (fields['item'] ?? '').trim(), text: lineWith(writer, BLANK, {}, fields), stored: null };
}

function lineWith(
  writer: MassListWriter,
  cells: ListCells,
  own: Readonly<Record<string, string>>,
  fields: Readonly<Record<string, string>>,
): string {
  const edited = { ...cells };
  for (const column of writer.columns)
    if (Object.hasOwn(fields, column)) edited[column] = fields[column] ?? null;
  return writer.lineOf(edited, { ...own, ...fields });
}

const BLANK = Object.fromEntries(LIST_COLUMNS.map((column) => [column, null])) as Record<ListColumn, null>;
