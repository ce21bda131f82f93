'use client';

import { type ReactNode, useEffect, useId, useRef, useState } from 'react';
import { type DataColumn } from '@/components/data-table/column';
import { toCsv } from '@/components/data-table/export-text';
import { type TableView } from '@/components/data-table/view';
import { Button } from '@/components/ui/button';
import { CONTROL_CLASS } from '@/components/ui/field';
import { SelectControl } from '@/components/ui/select-control';

interface ToolbarProps<Row> {
  readonly columns: readonly DataColumn<Row>[];
  readonly visible: readonly DataColumn<Row>[];
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
  readonly groups: readonly string[];
  readonly shown: readonly Row[];
  readonly total: number;
  readonly of: string;
  readonly exportName: string | undefined;
  readonly actions: ReactNode;
}

/** Find, group, columns, export: what changes the view stands above the table. */
export function Toolbar<Row>(props: ToolbarProps<Row>) {
  const { columns, visible, view, onView, groups, shown, total, of, exportName, actions } = props;
  const id = useId();
  return (
    <div className="no-print flex flex-wrap items-end gap-x-4 gap-y-2">
      <Find text={view.text} onText={(text) => onView({ ...view, text })} />
      {groups.length > 0 ? (
        <div className="grid w-52 gap-1">
          <label htmlFor={`${id}-group`} className="text-note text-ink-2">
            Group
          </label>
          <SelectControl
            id={`${id}-group`}
            value={view.group}
            onChange={(event) => onView({ ...view, group: event.target.value })}
          >
            <option value="">All groups</option>
            {groups.map((group) => (
              <option key={group} value={group}>
                {group}
              </option>
            ))}
          </SelectControl>
        </div>
      ) : null}
      {groups.length > 0 ? (
        <label className="flex min-h-8 items-center gap-2">
          <input
            type="checkbox"
            checked={view.subtotals}
            onChange={(event) => onView({ ...view, subtotals: event.target.checked })}
            className="size-4 accent-(--spin)"
          />
          Subtotals
        </label>
      ) : null}
      <ColumnChoice columns={columns} view={view} onView={onView} />
      <p role="status" className="flex min-h-8 items-center text-ink-2">
        {shown.length === total ? `${total} ${of}` : `${shown.length} of ${total} ${of}`}
      </p>
      <div className="ml-auto flex flex-wrap items-center gap-3">
        {exportName ? (
          <Button disabled={shown.length === 0} onClick={() => download(exportName, toCsv(visible, shown))}>
            Export CSV
          </Button>
        ) : null}
        {actions}
      </div>
    </div>
  );
}

/** The text filter: what is typed takes effect after a short rest, so that large tables keep up. */
export function Find({ text, onText }: { readonly text: string; readonly onText: (text: string) => void }) {
  const id = useId();
  const [typed, setTyped] = useState(text);
  const [given, setGiven] = useState(text);
  const rest = useRef<ReturnType<typeof setTimeout>>(undefined);
  if (given !== text) {
    setGiven(text);
    setTyped(text);
  }
  useEffect(() => () => clearTimeout(rest.current), []);
  return (
    <div className="grid w-52 gap-1">
      <label htmlFor={id} className="text-note text-ink-2">
        Find
      </label>
      <input
        id={id}
        type="search"
        value={typed}
        onChange={(event) => {
          const next = event.target.value;
          setTyped(next);
          clearTimeout(rest.current);
          rest.current = setTimeout(() => onText(next), 200);
        }}
        className={CONTROL_CLASS}
      />
    </div>
  );
}

/** Which columns are shown; the first always is. */
export function ColumnChoice<Row>({
  columns,
  view,
  onView,
}: Pick<ToolbarProps<Row>, 'columns' | 'view' | 'onView'>) {
  const toggle = (id: string, show: boolean) =>
    onView({ ...view, hidden: show ? view.hidden.filter((each) => each !== id) : [...view.hidden, id] });
  return (
    <details className="relative">
      <summary className="flex min-h-8 cursor-pointer items-center underline decoration-1 underline-offset-4">
        Columns
      </summary>
      <div className="absolute z-20 grid max-h-80 min-w-48 gap-1 overflow-y-auto border border-ink-2 bg-sheet p-3">
        {columns.slice(1).map((column) => (
          <label key={column.id} className="flex items-center gap-2 whitespace-nowrap">
            <input
              type="checkbox"
              checked={!view.hidden.includes(column.id)}
              onChange={(event) => toggle(column.id, event.target.checked)}
              className="size-4 accent-(--spin)"
            />
            {column.title}
          </label>
        ))}
      </div>
    </details>
  );
}

function download(name: string, csv: string): void {
  const address = URL.createObjectURL(new Blob(['\uFEFF', csv], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
