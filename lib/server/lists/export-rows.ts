import { type Db } from '@/db/client';
import { ownColumnsOf, rowNosOfView, rowsAt } from '@/db/queries/list-rows';
import { type ListRevision } from '@/db/queries/lists';
import {
  isFiltered,
  type ListView,
  nameOfOwn,
  type SortColumn,
  sortColumnOf,
} from '@/lib/contracts/list-view';
import { csvLine } from '@/lib/export/csv';
import { type ListCells, massListWriter } from '@/lib/export/mass-list';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { componentOf, type StoredRow } from './row-codec';
import { storedRows } from './stored-rows';
import { revisionGroups } from './revision-groups';
import { filterOf, orderOf } from './row-view';

/** The column that carries a list's marking in what leaves it. */
const MARKING = 'marking';
const BATCH = 2_000;

/**
 * The rows of a view as a CSV of the contract, in the units and signs that the revision declares, texts neutralised against
 * spreadsheet formulas. It has every column, or `columns` in their order. Each row of a marked list carries its marking.
 */
export async function* exportRows(
  db: Db,
  revision: ListRevision,
  view: ListView,
  marking: string | null,
  columns: readonly ExportColumn[] = [],
): AsyncGenerator<string> {
  const own = await ownColumnsOf(db, revision.id);
  const marked = marking === null ? {} : { [MARKING]: marking };
  const writer = massListWriter(revision.declarations, [...new Set([...own, ...Object.keys(marked)])]);
  const marks = Object.keys(marked);
  const some = columns.length > 0;
  let block = some
    ? csvLine([...columns.map((column) => nameOfOwn(column) ?? column), ...marks])
    : writer.header;
  for await (const row of rowsInOrder(db, revision, view)) {
    const component = componentOf(row);
    const cells = writer.cells(component);
    block += some
      ? csvLine([
          ...columns.map((column) => cellOf(column, cells, component.extra)),
          ...Object.values(marked),
        ])
      : writer.lineOf(cells, { ...component.extra, ...marked });
    if (block.length < 65_536) continue;
    yield block;
    block = '';
  }
  if (block !== '') yield block;
}

export type ExportColumn = Exclude<SortColumn, 'position'>;

/** The columns that an address asks for with `column`, each once; what is none is left out. */
export function exportColumnsOf(params: URLSearchParams): ExportColumn[] {
  const asked = params.getAll('column').map((text) => sortColumnOf(text));
  return [...new Set(asked)].filter((column) => column !== undefined && column !== 'position');
}

function cellOf(
  column: ExportColumn,
  cells: ListCells,
  extra: Readonly<Record<string, string>>,
): string | number | null {
  const own = nameOfOwn(column);
  if (own === null) return cells[column as ListColumn];
  return Object.hasOwn(extra, own) ? (extra[own] ?? null) : null;
}

async function* rowsInOrder(db: Db, revision: ListRevision, view: ListView): AsyncGenerator<StoredRow> {
  const order = orderOf(view, revision.declarations);
  if (!isFiltered(view) && order.column === 'position' && !order.descending) {
    yield* storedRows(db, revision.id);
    return;
  }
  const filter = filterOf(view, revision.findings, await revisionGroups(db, revision.id));
  const rowNos = await rowNosOfView(db, revision.id, filter, order);
  for (let at = 0; at < rowNos.length; at += BATCH) {
    const wanted = rowNos.slice(at, at + BATCH);
    const rows = new Map((await rowsAt(db, revision.id, wanted)).map((row) => [row.row_no, row]));
    for (const rowNo of wanted) {
      const row = rows.get(rowNo);
      if (row !== undefined) yield row;
    }
  }
}
