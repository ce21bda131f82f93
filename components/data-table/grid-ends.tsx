'use client';

import { useMemo } from 'react';
import { CellContent } from '@/components/data-table/cell-content';
import { type CellValue, type DataColumn } from '@/components/data-table/column';
import { type TableView } from '@/components/data-table/view';
import { classes } from '@/components/ui/classes';

interface GridHeadProps<Row> {
  readonly columns: readonly DataColumn<Row>[];
  readonly sort: TableView['sort'];
  readonly onSort: (column: string) => void;
}

/** Column heads: title, unit, and the order when it is by this column. Pressing one sorts. */
export function GridHead<Row>({ columns, sort, onSort }: GridHeadProps<Row>) {
  return (
    <thead>
      <tr aria-rowindex={1}>
        {columns.map((column, index) => {
          const order = sort?.column === column.id ? (sort.descending ? 'descending' : 'ascending') : 'none';
          return (
            <th key={column.id} scope="col" aria-colindex={index + 1} aria-sort={order}>
              <button
                type="button"
                title={`Sort by ${column.title}`}
                onClick={() => onSort(column.id)}
                className={classes(
                  'flex w-full cursor-pointer items-baseline gap-1 font-semibold',
                  column.kind === 'number' && 'justify-end',
                )}
              >
                <span className="truncate">{column.title}</span>
                {column.unit ? <span className="font-normal text-ink-2">{column.unit}</span> : null}
                <OrderMark order={order} />
              </button>
            </th>
          );
        })}
      </tr>
    </thead>
  );
}

function OrderMark({ order }: { readonly order: 'ascending' | 'descending' | 'none' }) {
  if (order === 'none') return null;
  return (
    <svg width="8" height="8" viewBox="0 0 8 8" aria-hidden="true" className="shrink-0 self-center fill-spin">
      <path d={order === 'ascending' ? 'M4 1 8 7H0z' : 'M4 7 0 1h8z'} />
    </svg>
  );
}

interface GridFootProps<Row> {
  readonly columns: readonly DataColumn<Row>[];
  readonly rows: readonly Row[];
  readonly total: number;
  readonly of: string;
  readonly totals: Readonly<Record<string, CellValue>> | undefined;
}

/** Totals over the rows shown; absent when no column has one. */
export function GridFoot<Row>({ columns, rows, total, of, totals }: GridFootProps<Row>) {
  const values = useMemo(
    () => columns.map((column) => (totals ? (totals[column.id] ?? null) : (column.total?.(rows) ?? null))),
    [columns, rows, totals],
  );
  if (!totals && !columns.some((column) => column.total)) return null;
  return (
    <tfoot>
      <tr>
        {columns.map((column, index) => (
          <td key={column.id}>
            {index === 0 ? (
              <span className="block truncate">
                {totals || rows.length === total ? `All ${of}` : `${rows.length} shown`}
              </span>
            ) : (
              <CellContent column={column} value={values[index] ?? null} />
            )}
          </td>
        ))}
      </tr>
    </tfoot>
  );
}
