'use client';

import {
  columnFilteringFeature,
  columnVisibilityFeature,
  createColumnHelper,
  createFilteredRowModel,
  createSortedRowModel,
  globalFilteringFeature,
  type RowData,
  rowSortingFeature,
  tableFeatures,
  useTable,
} from '@tanstack/react-table';
import { useMemo } from 'react';
import { type DataColumn } from '@/components/data-table/column';
import { columnsShown, inGroup, type TableView } from '@/components/data-table/view';

const features = tableFeatures({
  columnVisibilityFeature,
  columnFilteringFeature,
  globalFilteringFeature,
  rowSortingFeature,
  filteredRowModel: createFilteredRowModel(),
  sortedRowModel: createSortedRowModel(),
});

const collator = new Intl.Collator('en', { numeric: true });

function compare(a: unknown, b: unknown): number {
  return typeof a === 'number' && typeof b === 'number' ? a - b : collator.compare(String(a), String(b));
}

interface TableRowsOptions<Row> {
  readonly columns: readonly DataColumn<Row>[];
  readonly rows: readonly Row[];
  readonly rowId: (row: Row) => string;
  readonly view: TableView;
  /** The column that holds group paths. */
  readonly groupColumn: string | undefined;
  /** Rows come sorted and filtered by the server. */
  readonly manual: boolean;
}

/** The rows that a view shows, in its order, and the columns it shows. Empty cells sort last, both ways. */
export function useTableRows<Row extends RowData>(options: TableRowsOptions<Row>) {
  const { columns, rows, rowId, view, groupColumn, manual } = options;
  const defs = useMemo(() => {
    const helper = createColumnHelper<typeof features, Row>();
    return helper.columns(
      columns.map((column) =>
        helper.accessor((row) => column.value(row) ?? undefined, {
          id: column.id,
          sortFn: (a, b, id) => compare(a.getValue(id), b.getValue(id)),
          sortUndefined: 'last',
          filterFn: (row, id, group) => inGroup(String(row.getValue(id) ?? ''), String(group)),
          enableGlobalFilter: column.searched ?? column.kind === 'text',
        }),
      ),
    );
  }, [columns]);
  const data = useMemo(() => [...rows], [rows]);
  const { text, group } = view;
  const sortColumn = view.sort?.column;
  const descending = view.sort?.descending ?? false;
  const hidden = view.hidden.join('\n');
  const state = useMemo(
    () => ({
      sorting: sortColumn ? [{ id: sortColumn, desc: descending }] : [],
      globalFilter: text,
      columnFilters: groupColumn && group ? [{ id: groupColumn, value: group }] : [],
      columnVisibility: Object.fromEntries(hidden.split('\n').map((id) => [id, false])),
    }),
    [sortColumn, descending, text, group, hidden, groupColumn],
  );
  const table = useTable({
    features,
    columns: defs,
    data,
    state,
    getRowId: rowId,
    getColumnCanGlobalFilter: () => true,
    globalFilterFn: (row, id, text) =>
      String(row.getValue(id) ?? '')
        .toLowerCase()
        .includes(String(text).toLowerCase()),
    manualSorting: manual,
    manualFiltering: manual,
    enableMultiSort: false,
  });
  const model = table.getRowModel();
  const shown = useMemo(() => model.rows.map((row) => row.original), [model]);
  const visible = useMemo(
    () => columnsShown(columns, { shown: view.shown, hidden: view.hidden }),
    [columns, view.shown, view.hidden],
  );
  return { shown, visible };
}
