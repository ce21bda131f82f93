'use client';

import { type RowData } from '@tanstack/react-table';
import { type ReactNode, useMemo } from 'react';
import { type CellValue, type DataColumn } from '@/components/data-table/column';
import { Grid } from '@/components/data-table/grid';
import { Inspector } from '@/components/data-table/inspector';
import { groupedLines, groupPaths, plainLines } from '@/components/data-table/lines';
import { Toolbar } from '@/components/data-table/toolbar';
import { useTableRows } from '@/components/data-table/use-table-rows';
import { PLAIN_VIEW, type TableView } from '@/components/data-table/view';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';

export interface DataTableProps<Row extends RowData> {
  /** What the table holds, for its readers and as the name of its export. */
  readonly caption: string;
  /** Stable between renders. The first stays in sight and can't be hidden. */
  readonly columns: readonly DataColumn<Row>[];
  readonly rows: readonly Row[];
  readonly rowId: (row: Row) => string;
  /** What a reader has made of it; the table itself keeps nothing of it. See useUrlView. */
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
  /** What is counted, e.g. "rows" (the default) or "components". */
  readonly of?: string;
  /** The text column that holds group paths: gives the group filter and subtotals. */
  readonly groupColumn?: string;
  /** Rows come sorted and filtered by the server; `totals` then says what stands in the foot. */
  readonly manual?: boolean;
  readonly totals?: Readonly<Record<string, CellValue>>;
  /** What opens beside the table for a row: a click, or Enter. */
  readonly inspector?: (row: Row) => ReactNode;
  /** Said while rows are on their way, e.g. "Loading revision 6". */
  readonly loading?: string | null;
  /** What failed and how to try again. Stands instead of rows, never with an empty list. */
  readonly failure?: { readonly message: string; readonly retry: () => void } | null;
  /** Stands in place of a table without rows: an EmptyPlace. */
  readonly empty?: ReactNode;
  /** File name of the CSV export; without it there is none. */
  readonly exportName?: string;
  /** Buttons of the page beside those of the table. */
  readonly actions?: ReactNode;
}

/** Rows by the hundred thousand: sorted, filtered, totalled, walked by keys, copied and exported in full precision. */
export function DataTable<Row extends RowData>(props: DataTableProps<Row>) {
  const { caption, columns, rows, rowId, view, onView, of = 'rows', groupColumn, manual = false } = props;
  const { loading, failure, inspector, totals, exportName, actions, empty } = props;
  const { shown, visible } = useTableRows({ columns, rows, rowId, view, groupColumn, manual });
  const group = useMemo(() => columns.find((column) => column.id === groupColumn), [columns, groupColumn]);
  const groups = useMemo(
    () => (group ? groupPaths(rows.map((row) => String(group.value(row) ?? ''))) : []),
    [group, rows],
  );
  const lines = useMemo(
    () =>
      view.subtotals && group
        ? groupedLines(shown, rowId, (row) => String(group.value(row) ?? ''))
        : plainLines(shown, rowId),
    [shown, group, rowId, view.subtotals],
  );
  const open = inspector && view.open !== null ? rows.find((row) => rowId(row) === view.open) : undefined;

  if (failure) {
    return (
      <Banner
        severity="blocker"
        word="Failed"
        live
        action={<Button onClick={failure.retry}>Try again</Button>}
      >
        <p>{failure.message}</p>
      </Banner>
    );
  }
  if (!loading && rows.length === 0 && !manual && empty) return <>{empty}</>;

  return (
    <div className="grid min-w-0 gap-2">
      <Toolbar
        columns={columns}
        visible={visible}
        view={view}
        onView={onView}
        groups={groups}
        shown={shown}
        total={rows.length}
        of={of}
        exportName={exportName}
        actions={actions}
      />
      <div className={open ? 'grid min-w-0 gap-4 lg:grid-cols-[minmax(0,1fr)_360px]' : 'grid min-w-0'}>
        <Grid
          caption={caption}
          columns={visible}
          lines={lines}
          shown={shown}
          total={rows.length}
          of={of}
          view={view}
          onView={onView}
          loading={loading ?? null}
          totals={totals}
          opens={inspector !== undefined}
          onPlain={() => onView({ ...PLAIN_VIEW, hidden: view.hidden })}
        />
        {open && inspector ? (
          <Inspector onClose={() => onView({ ...view, open: null })}>{inspector(open)}</Inspector>
        ) : null}
      </div>
    </div>
  );
}
