'use client';

import { useId } from 'react';
import { columnName, type DataColumn } from '@/components/data-table/column';
import { type TableView } from '@/components/data-table/view';
import { Button } from '@/components/ui/button';
import { DialogButton } from '@/components/ui/dialog-button';

interface ColumnChooserProps<Row> {
  /** All columns; the first is always shown. */
  readonly columns: readonly DataColumn<Row>[];
  /** Those shown now, in order. */
  readonly visible: readonly DataColumn<Row>[];
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
}

/** Which columns are shown, and in which order. */
export function ColumnChooser<Row>({ columns, visible, view, onView }: ColumnChooserProps<Row>) {
  const id = useId();
  const [first, ...others] = columns;
  const shown = visible.filter((column) => column !== first).map((column) => column.id);
  const choose = (next: readonly string[]) => onView({ ...view, shown: next, hidden: [] });
  const swap = (at: number, by: -1 | 1) => {
    const next = [...shown];
    const [a, b] = [next[at], next[at + by]];
    if (a === undefined || b === undefined) return;
    next[at] = b;
    next[at + by] = a;
    choose(next);
  };
  const left = others.filter((column) => !shown.includes(column.id));
  const line = (column: DataColumn<Row>, checked: boolean) => (
    <label className="flex min-w-0 flex-1 items-center gap-2">
      <input
        type="checkbox"
        checked={checked}
        // A table of one column has nothing to tell.
        disabled={checked && shown.length === 1}
        onChange={() => choose(checked ? shown.filter((one) => one !== column.id) : [...shown, column.id])}
        className="size-4 shrink-0 accent-(--spin)"
      />
      <span className="truncate">{columnName(column)}</span>
    </label>
  );
  return (
    <DialogButton words="Choose columns" title="Columns">
      <p className="text-ink-2">
        {first === undefined ? '' : `${first.title} always comes first.`} The file of all rows has every
        column whatever is chosen here; the file of the rows shown has these.
      </p>
      <div className="grid gap-6 sm:grid-cols-2">
        <section aria-labelledby={`${id}-shown`} className="min-w-0">
          <h3 id={`${id}-shown`} className="pb-1 font-semibold">
            Shown, in this order
          </h3>
          <ol className="grid border-t border-rule">
            {shown.flatMap((each, at) => {
              const column = others.find((one) => one.id === each);
              if (column === undefined) return [];
              return [
                <li key={each} className="flex min-h-8 items-center gap-1 border-b border-rule">
                  {line(column, true)}
                  <Move up disabled={at === 0} of={column.title} onMove={() => swap(at, -1)} />
                  <Move disabled={at === shown.length - 1} of={column.title} onMove={() => swap(at, 1)} />
                </li>,
              ];
            })}
          </ol>
        </section>
        <section aria-labelledby={`${id}-left`} className="min-w-0">
          <h3 id={`${id}-left`} className="pb-1 font-semibold">
            Not shown
          </h3>
          <ul className="grid border-t border-rule">
            {left.map((column) => (
              <li key={column.id} className="flex min-h-8 items-center border-b border-rule">
                {line(column, false)}
              </li>
            ))}
          </ul>
        </section>
      </div>
      <div>
        <Button kind="quiet" onClick={() => onView({ ...view, shown: [], hidden: [] })}>
          Show the usual columns
        </Button>
      </div>
    </DialogButton>
  );
}

function Move({
  up = false,
  disabled,
  of,
  onMove,
}: {
  readonly up?: boolean;
  readonly disabled: boolean;
  readonly of: string;
  readonly onMove: () => void;
}) {
  return (
    <button
      type="button"
      aria-label={`Move ${of} ${up ? 'up' : 'down'}`}
      disabled={disabled}
      onClick={onMove}
      className="grid size-8 shrink-0 cursor-pointer place-items-center disabled:cursor-default disabled:opacity-30"
    >
      <svg width="10" height="10" viewBox="0 0 10 10" aria-hidden="true" className="fill-current">
        <path d={up ? 'M5 1.5 9.5 8h-9z' : 'M5 8.5 .5 2h9z'} />
      </svg>
    </button>
  );
}
