'use client';

import {
  type ClipboardEvent,
  type KeyboardEvent,
  type MouseEvent,
  useCallback,
  useEffect,
  useId,
  useMemo,
  useRef,
  useState,
} from 'react';
import { at, bounds, moved, type Place, type Selection } from '@/components/data-table/selection';
import { useRowHeight } from '@/components/data-table/surroundings';
import { useRowWindow } from '@/components/data-table/use-row-window';
import { CellEditor, type Onward } from '@/components/lists/editing/cell-editor';
import { EditLine } from '@/components/lists/editing/edit-line';
import { type GridColumn } from '@/components/lists/editing/grid-columns';
import { classes } from '@/components/ui/classes';
import { type Texts, addedKey, rowKey } from '@/lib/editing/edits';
import { type CellProblem } from '@/lib/editing/read-row';
import { type Area, endOf, type Sheet, textsAt } from '@/lib/editing/sheet';

/** A cell that the page leads to. Every new one is gone to, even the same cell again. */
export interface Goal {
  readonly line: number;
  readonly column: number;
}

interface EditGridProps {
  readonly caption: string;
  readonly columns: readonly GridColumn[];
  readonly sheet: Sheet;
  readonly problems: ReadonlyMap<string, readonly CellProblem[]>;
  /** What would be wrong in a column of a row that held these texts. */
  readonly check: (texts: Texts, column: string) => string | null;
  readonly onWindow: (first: number, last: number) => void;
  readonly selection: Selection;
  readonly onSelect: (change: (before: Selection) => Selection) => void;
  readonly goal: Goal | null;
  readonly onSet: (line: number, column: number, text: string) => void;
  readonly onClear: (area: Area) => void;
  readonly onFill: (area: Area) => void;
  readonly onCopy: (area: Area) => string | null;
  readonly onPaste: (area: Area, text: string) => void;
  readonly onUndo: () => void;
  readonly onRedo: () => void;
}

interface Editing {
  readonly place: Place;
  readonly start: string;
}

const NO_COLUMNS = [0, -1] as const;

/**
 * The grid in which a list is edited. Arrows move; Enter, F2 or typing edits a cell; while a cell is edited, Enter goes down and Tab to
 * the right; otherwise Tab leaves the grid, as the ARIA authoring practices say of grids. Only rows in sight are in the document.
 */
export function EditGrid(props: EditGridProps) {
  const { caption, columns, sheet, problems, check, onWindow, onSelect, onSet, goal } = props;
  const id = useId();
  const box = useRef<HTMLDivElement>(null);
  const table = useRef<HTMLTableElement>(null);
  const rowHeight = useRowHeight();
  const count = endOf(sheet);
  // One line more than there are rows: where a new one begins.
  const lines = count + 1;
  const [editing, setEditing] = useState<Editing | null>(null);
  const selection = within(props.selection, lines, columns.length);
  const chosen = bounds(selection);
  const { first, last, show } = useRowWindow(box, lines, rowHeight);
  useEffect(() => onWindow(first, last), [onWindow, first, last]);

  const go = (next: Selection) => {
    onSelect(() => next);
    show(next.head.line);
    showColumn(box.current, next.head.column);
  };
  const showRef = useRef(show);
  useEffect(() => {
    showRef.current = show;
  });
  useEffect(() => {
    if (goal === null) return;
    showRef.current(goal.line);
    showColumn(box.current, goal.column);
    table.current?.focus({ preventScroll: true });
  }, [goal]);

  const textAt = ({ line, column }: Place): string => textsAt(sheet, line)?.[columns[column]?.id ?? ''] ?? '';
  const open = (place: Place, start: string) => {
    const row = place.line < sheet.rows ? sheet.rowAt(place.line) : null;
    if (place.line < sheet.rows && row === null) return;
    if (row !== null && sheet.edits.get(rowKey(row.item))?.kind === 'remove') {
      // Told by the page why not.
      onSet(place.line, place.column, start);
      return;
    }
    setEditing({ place, start });
  };
  const close = (onward: Onward) => {
    setEditing(null);
    if (onward === 'stay') return;
    table.current?.focus({ preventScroll: true });
    const { line, column } = selection.head;
    const step = { down: [1, 0], up: [-1, 0], right: [0, 1], left: [0, -1] }[onward];
    go(within(at(line + (step[0] ?? 0), column + (step[1] ?? 0)), lines + 1, columns.length));
  };

  const onKeyDown = (event: KeyboardEvent<HTMLTableElement>) => {
    if (event.target !== event.currentTarget || event.altKey) return;
    const control = event.ctrlKey || event.metaKey;
    const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
    const screen = Math.max(1, Math.floor(((box.current?.clientHeight ?? 640) - 40) / rowHeight));
    const next = moved(
      selection,
      { key: event.key, shift: event.shiftKey, control },
      { lines, columns: columns.length, screen },
    );
    if (next) go(next);
    else if (key === ' ' && event.shiftKey)
      go({
        anchor: { line: chosen.top, column: 0 },
        head: { line: chosen.bottom, column: columns.length - 1 },
      });
    else if (control && key === 'z') (event.shiftKey ? props.onRedo : props.onUndo)();
    else if (control && key === 'y') props.onRedo();
    else if (control && key === 'd') props.onFill(chosen);
    else if (key === 'Delete' || key === 'Backspace') props.onClear(chosen);
    else if (key === 'Enter' || key === 'F2') open(selection.head, textAt(selection.head));
    else if (event.key.length === 1 && !control) open(selection.head, event.key);
    else return;
    event.preventDefault();
  };
  const onCopy = (event: ClipboardEvent) => {
    const text = props.onCopy(chosen);
    event.preventDefault();
    if (text === null) return;
    event.clipboardData.setData('text/plain', text);
    if (event.type === 'cut') props.onClear(chosen);
  };
  const onPaste = (event: ClipboardEvent) => {
    event.preventDefault();
    props.onPaste(chosen, event.clipboardData.getData('text/plain'));
  };
  const onPress = useCallback(
    (line: number, column: number, event: MouseEvent) => {
      if (event.button !== 0 || (event.target instanceof Element && event.target.closest('input') !== null))
        return;
      const place = { line, column };
      if (event.shiftKey) event.preventDefault();
      onSelect((before) =>
        event.shiftKey ? { anchor: before.anchor, head: place } : { anchor: place, head: place },
      );
    },
    [onSelect],
  );
  const onOver = useCallback(
    (line: number, column: number) =>
      onSelect((before) => ({ anchor: before.anchor, head: { line, column } })),
    [onSelect],
  );
  const openRef = useRef(open);
  useEffect(() => {
    openRef.current = open;
  });
  const textRef = useRef(textAt);
  useEffect(() => {
    textRef.current = textAt;
  });
  const onOpen = useCallback((line: number, column: number) => {
    openRef.current({ line, column }, textRef.current({ line, column }));
  }, []);

  const several = chosen.top !== chosen.bottom || chosen.left !== chosen.right;
  const width = useMemo(() => columns.reduce((sum, column) => sum + column.width, 0), [columns]);
  const inSight = Array.from(
    { length: Math.max(0, Math.min(last, lines) - first) },
    (_, index) => first + index,
  );
  const shown = inSight.map((line) => {
    const added = line >= sheet.rows ? sheet.added[line - sheet.rows] : undefined;
    const row = line < sheet.rows ? sheet.rowAt(line) : null;
    const key = row !== null ? rowKey(row.item) : added !== undefined ? addedKey(added.id) : '';
    const isActive = selection.head.line === line;
    const inside = several && line >= chosen.top && line <= chosen.bottom;
    return (
      <EditLine
        key={key === '' ? `line ${line}` : key}
        gridId={id}
        line={line}
        chosen={inside ? chosenColumns(chosen.left, chosen.right) : NO_COLUMNS}
        active={isActive ? selection.head.column : -1}
        columns={columns}
        base={line < sheet.rows ? (row?.texts ?? null) : EMPTY}
        edit={added ?? (key === '' ? undefined : sheet.edits.get(key))}
        problems={problems.get(key)}
        onPress={onPress}
        onOver={onOver}
        onOpen={onOpen}
        editor={
          isActive && editing !== null && editing.place.line === line ? (
            <CellEditor
              key={`${line} ${editing.place.column}`}
              label={`${columns[editing.place.column]?.title ?? ''}, line ${line + 1}`}
              start={editing.start}
              isNumber={columns[editing.place.column]?.kind === 'number'}
              choices={columns[editing.place.column]?.choices}
              check={(text) => {
                const column = columns[editing.place.column]?.id ?? '';
                return check({ ...textsAt(sheet, line), [column]: text }, column);
              }}
              onDone={(text, onward) => {
                if (text !== textAt(editing.place)) onSet(editing.place.line, editing.place.column, text);
                close(onward);
              }}
              onCancel={() => {
                setEditing(null);
                table.current?.focus({ preventScroll: true });
              }}
            />
          ) : null
        }
      />
    );
  });

  return (
    <div ref={box} className="max-h-[60vh] min-w-0 overflow-auto border-b border-ink-2">
      <table
        ref={table}
        role="grid"
        tabIndex={0}
        aria-label={caption}
        aria-rowcount={lines + 1}
        aria-colcount={columns.length}
        aria-multiselectable="true"
        aria-activedescendant={`${id}-${selection.head.line}-${selection.head.column}`}
        onKeyDown={onKeyDown}
        onCopy={onCopy}
        onCut={onCopy}
        onPaste={onPaste}
        className="ruled grid-table edit-table w-full border-separate border-spacing-0"
        style={{ minWidth: width }}
      >
        <colgroup>
          {columns.map((column) => (
            <col key={column.id} style={{ width: column.width }} />
          ))}
        </colgroup>
        <thead>
          <tr aria-rowindex={1}>
            {columns.map((column, index) => (
              <th
                key={column.id}
                scope="col"
                aria-colindex={index + 1}
                className={classes('truncate', column.kind === 'number' ? 'text-right' : 'text-left')}
              >
                {column.title}
                {column.unit === undefined ? null : (
                  <span className="ml-1 font-normal text-ink-2">{column.unit}</span>
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          <Spacer height={first * rowHeight} columns={columns.length} />
          {shown}
          <Spacer height={Math.max(0, lines - last) * rowHeight} columns={columns.length} />
        </tbody>
      </table>
    </div>
  );
}

const EMPTY: Texts = {};

/** The same pair for the same columns, so that lines in the middle of a selection are not drawn anew. */
const pairs = new Map<string, readonly [number, number]>();
function chosenColumns(left: number, right: number): readonly [number, number] {
  const key = `${left} ${right}`;
  const known = pairs.get(key) ?? ([left, right] as const);
  pairs.set(key, known);
  return known;
}

function within({ anchor, head }: Selection, lines: number, columns: number): Selection {
  const clamped = ({ line, column }: Place): Place => ({
    line: Math.max(0, Math.min(line, lines - 1)),
    column: Math.max(0, Math.min(column, columns - 1)),
  });
  return { anchor: clamped(anchor), head: clamped(head) };
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
