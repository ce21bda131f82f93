'use client';

import { type MouseEvent } from 'react';
import { CellContent } from '@/components/data-table/cell-content';
import { type DataColumn } from '@/components/data-table/column';
import { type Line } from '@/components/data-table/lines';
import { type Bounds, holds, type Place } from '@/components/data-table/selection';
import { classes } from '@/components/ui/classes';

interface GridLineProps<Row> {
  readonly gridId: string;
  readonly line: Line<Row>;
  readonly index: number;
  readonly columns: readonly DataColumn<Row>[];
  readonly chosen: Bounds;
  readonly active: Place;
  readonly isOpen: boolean;
  readonly onPick: (place: Place, extend: boolean) => void;
  readonly onOpen: () => void;
}

/** One line of the body: a row, a group with its subtotals, or the room of a row on its way. */
export function GridLine<Row>(props: GridLineProps<Row>) {
  const { gridId, line, index, columns, chosen, active, isOpen, onPick, onOpen } = props;
  const several = chosen.top !== chosen.bottom || chosen.left !== chosen.right;
  return (
    <tr
      aria-rowindex={index + 2}
      aria-busy={line.kind === 'waiting' || undefined}
      className={classes(line.kind === 'group' && 'group-line', isOpen && 'open-line')}
      onClick={(event) => {
        if (!several && !event.shiftKey && !isControl(event.target)) onOpen();
      }}
    >
      {columns.map((column, at) => {
        const place = { line: index, column: at };
        const picked = several && holds(chosen, index, at);
        return (
          <td
            key={column.id}
            id={`${gridId}-${index}-${at}`}
            aria-colindex={at + 1}
            aria-selected={picked}
            className={classes(
              picked && 'chosen-cell',
              active.line === index && active.column === at && 'active-cell',
            )}
            onMouseDown={(event: MouseEvent) => {
              if (event.button !== 0 || isControl(event.target)) return;
              if (event.shiftKey) event.preventDefault();
              onPick(place, event.shiftKey);
            }}
            onMouseEnter={(event: MouseEvent) => {
              if (event.buttons === 1) onPick(place, true);
            }}
          >
            {line.kind === 'row' ? (
              (column.cell?.(line.row) ?? <CellContent column={column} value={column.value(line.row)} />)
            ) : line.kind === 'waiting' ? null : at === 0 ? (
              <span className="whitespace-nowrap">
                {line.path || 'No group'}, {line.rows.length}
              </span>
            ) : (
              <CellContent column={column} value={column.total?.(line.rows) ?? null} />
            )}
          </td>
        );
      })}
    </tr>
  );
}

/** Links and buttons inside a cell act for themselves. */
function isControl(target: EventTarget): boolean {
  return target instanceof Element && target.closest('a, button, input, select, label') !== null;
}
