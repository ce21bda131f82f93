'use client';

import { type ClipboardEvent, type KeyboardEvent, useEffect, useId, useMemo, useRef, useState } from 'react';
import { type CellValue, columnWidth, type DataColumn } from '@/components/data-table/column';
import { toTsv } from '@/components/data-table/export-text';
import { GridLine } from '@/components/data-table/grid-line';
import { GridHead, GridFoot } from '@/components/data-table/grid-ends';
import { type Line } from '@/components/data-table/lines';
import { at, bounds, moved, type Selection } from '@/components/data-table/selection';
import { nextSort, type TableView } from '@/components/data-table/view';
import { usePrinting, useRowHeight } from '@/components/data-table/surroundings';
import { useRowWindow } from '@/components/data-table/use-row-window';
import { columnsOnPaper, PAPER_SCALE } from '@/components/data-table/paper';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';

interface GridProps<Row> {
  readonly caption: string;
  readonly columns: readonly DataColumn<Row>[];
  readonly lines: readonly Line<Row>[];
  readonly shown: readonly Row[];
  readonly total: number;
  readonly of: string;
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
  readonly loading: string | null;
  readonly totals: Readonly<Record<string, CellValue>> | undefined;
  readonly opens: boolean;
  readonly onPlain: () => void;
  /** What the lines are of, when they arrive piece by piece: the selection holds while it stays the same. */
  readonly subject?: string;
  /** Told which lines are in sight, from `first` up to, not including, `last`. */
  readonly onWindow?: (first: number, last: number) => void;
  /** Called instead of a copy that would lack lines which are still on their way. */
  readonly onCopyTooEarly?: () => void;
}

/** Rows that go on paper; more than these belong in the CSV. */
const MOST_PRINTED = 2000;

/** The ruled grid itself: only the lines in sight are in the document. */
export function Grid<Row>(props: GridProps<Row>) {
  const { caption, lines, shown, total, of, view, onView, loading, totals, opens, onPlain } = props;
  const id = useId();
  const box = useRef<HTMLDivElement>(null);
  const rowHeight = useRowHeight();
  const printing = usePrinting();
  const paper = useMemo(() => columnsOnPaper(props.columns), [props.columns]);
  const columns = printing ? paper.columns : props.columns;
  const drawnWidth = (column: DataColumn<Row>) => columnWidth(column) * (printing ? PAPER_SCALE : 1);
  const subject = props.subject ?? lines;
  const [kept, setKept] = useState<{ readonly subject: unknown; readonly selection: Selection }>();
  const selection = kept?.subject === subject ? kept.selection : at(0, 0);
  const setSelection = (next: Selection) => setKept({ subject, selection: next });
  const chosen = bounds(selection);

  const rowWindow = useRowWindow(box, lines.length, rowHeight);
  const body = printing ? lines.filter((line) => line.kind !== 'waiting').slice(0, MOST_PRINTED) : lines;
  const first = printing ? 0 : rowWindow.first;
  const last = printing ? body.length : rowWindow.last;
  const { onWindow } = props;
  useEffect(() => {
    onWindow?.(first, last);
  }, [onWindow, first, last]);
  const width = useMemo(() => columns.reduce((sum, column) => sum + columnWidth(column), 0), [columns]);

  const go = (next: Selection) => {
    setSelection(next);
    rowWindow.show(next.head.line);
    showColumn(box.current, next.head.column);
  };
  const openLine = (line: number) => {
    const target = lines[line];
    if (opens && target?.kind === 'row') onView({ ...view, open: target.id });
  };
  const onKeyDown = (event: KeyboardEvent<HTMLTableElement>) => {
    if (event.target !== event.currentTarget || event.altKey || lines.length === 0) return;
    const screen = Math.max(1, Math.floor(((box.current?.clientHeight ?? 640) - 60) / rowHeight));
    const press = { key: event.key, shift: event.shiftKey, control: event.ctrlKey || event.metaKey };
    const next = moved(selection, press, { lines: lines.length, columns: columns.length, screen });
    if (next) go(next);
    else if (event.key === 'Enter') openLine(selection.head.line);
    else return;
    event.preventDefault();
  };
  const onCopy = (event: ClipboardEvent) => {
    if (window.getSelection()?.isCollapsed === false || lines.length === 0) return;
    const within = lines.slice(chosen.top, chosen.bottom + 1);
    if (within.some((line) => line.kind === 'waiting')) {
      event.preventDefault();
      props.onCopyTooEarly?.();
      return;
    }
    const picked = within.filter((line) => line.kind === 'row');
    const across = columns.slice(chosen.left, chosen.right + 1);
    const whole = picked.length === shown.length && shown.length > 1;
    event.clipboardData.setData(
      'text/plain',
      toTsv(
        across,
        picked.map((line) => line.row),
        whole,
      ),
    );
    event.preventDefault();
  };

  return (
    <div
      ref={box}
      className={classes(
        'print-whole max-h-[70vh] min-w-0 overflow-auto border-b border-ink-2',
        paper.isWide && 'print-wide',
      )}
    >
      <table
        role="grid"
        tabIndex={0}
        aria-label={caption}
        aria-rowcount={lines.length + 1}
        aria-colcount={columns.length}
        aria-multiselectable="true"
        aria-busy={loading !== null}
        aria-activedescendant={
          lines.length > 0 ? `${id}-${selection.head.line}-${selection.head.column}` : undefined
        }
        onKeyDown={onKeyDown}
        onCopy={onCopy}
        className="ruled grid-table w-full border-separate border-spacing-0"
        style={printing ? undefined : { minWidth: width }}
      >
        <colgroup>
          {columns.map((column) => (
            <col key={column.id} style={{ width: drawnWidth(column) }} />
          ))}
        </colgroup>
        <GridHead
          columns={columns}
          sort={view.sort}
          onSort={(column) => onView({ ...view, sort: nextSort(view.sort, column) })}
        />
        <tbody>
          <Spacer height={first * rowHeight} columns={columns.length} />
          {body.slice(first, last).map((line, offset) => (
            <GridLine
              key={line.id}
              gridId={id}
              line={line}
              index={first + offset}
              columns={columns}
              chosen={chosen}
              active={selection.head}
              isOpen={line.kind === 'row' && view.open === line.id}
              onPick={(place, extend) =>
                setSelection(
                  extend ? { anchor: selection.anchor, head: place } : { anchor: place, head: place },
                )
              }
              onOpen={() => openLine(first + offset)}
            />
          ))}
          {printing ? null : <Spacer height={(lines.length - last) * rowHeight} columns={columns.length} />}
          {lines.length === 0 ? (
            <tr>
              <td colSpan={columns.length}>
                <Nothing loading={loading} of={of} onPlain={onPlain} />
              </td>
            </tr>
          ) : null}
        </tbody>
        <GridFoot columns={columns} rows={shown} total={total} of={of} totals={totals} />
      </table>
      {printing && paper.left.length > 0 ? (
        <p className="pt-2 text-note">
          Not on this paper, which is too narrow: {paper.left.join(', ')}. Columns chosen, and their order,
          say which are.
        </p>
      ) : null}
      {printing && lines.length > body.length ? (
        <p className="pt-2 text-note">
          The first {body.length} of {lines.length} lines. The CSV export has them all.
        </p>
      ) : null}
    </div>
  );
}

/** Brings a column beside the frozen first one into sight. */
function showColumn(box: HTMLElement | null, column: number): void {
  const heads = box?.querySelectorAll('th') ?? [];
  const [frozen, head] = [heads[0], heads[column]];
  if (!box || !frozen || !head || column === 0) return;
  const [left, right] = [head.offsetLeft, head.offsetLeft + head.offsetWidth];
  if (left - frozen.offsetWidth < box.scrollLeft) box.scrollLeft = left - frozen.offsetWidth;
  else if (right > box.scrollLeft + box.clientWidth) box.scrollLeft = right - box.clientWidth;
}

function Spacer({ height, columns }: { readonly height: number; readonly columns: number }) {
  if (height <= 0) return null;
  return (
    <tr aria-hidden="true" className="spacer">
      <td colSpan={columns} style={{ height }} />
    </tr>
  );
}

function Nothing({
  loading,
  of,
  onPlain,
}: {
  readonly loading: string | null;
  readonly of: string;
  readonly onPlain: () => void;
}) {
  if (loading) return <p role="status">{loading}</p>;
  return (
    <p className="flex flex-wrap items-center gap-x-4 py-1">
      No {of} match what is asked for.
      <Button kind="quiet" onClick={onPlain}>
        Show all {of}
      </Button>
    </p>
  );
}
