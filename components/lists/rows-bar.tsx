'use client';

import { type ReactNode, useId } from 'react';
import { type DataColumn } from '@/components/data-table/column';
import { ColumnChooser } from '@/components/lists/column-chooser';
import { Find } from '@/components/data-table/toolbar';
import { type TableView } from '@/components/data-table/view';
import { Button } from '@/components/ui/button';
import { buttonClass } from '@/components/ui/button-style';
import { SelectControl } from '@/components/ui/select-control';
import { TextLink } from '@/components/ui/text-link';
import { type ListRow } from '@/lib/contracts/list-rows';

interface RowsBarProps {
  readonly columns: readonly DataColumn<ListRow>[];
  /** Those shown, in order. */
  readonly visible: readonly DataColumn<ListRow>[];
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
  readonly groups: readonly string[];
  /** What the finding says whose rows alone are shown; null: no such filter. */
  readonly finding: string | null;
  /** The value of a column by which rows are chosen, in words; null: no such filter. */
  readonly only: string | null;
  /** The address of all rows. */
  readonly plainHref: string;
  readonly status: string;
  /** The export of all rows, or of those shown. */
  readonly exportHref: (all: boolean) => string;
  /** Whether the view is another than the whole list in its own order. */
  readonly differs: boolean;
  readonly views: ReactNode;
}

/** Find, group, columns, export, add: what changes the view of the rows, or goes with them. */
export function RowsBar(props: RowsBarProps) {
  const {
    columns,
    visible,
    view,
    onView,
    groups,
    finding,
    only,
    plainHref,
    status,
    exportHref,
    differs,
    views,
  } = props;
  const id = useId();
  return (
    <div className="no-print grid gap-2">
      <div className="flex flex-wrap items-end gap-x-4 gap-y-2">
        <Find text={view.text} onText={(text) => onView({ ...view, text })} />
        {groups.length > 1 ? (
          <div className="grid w-52 gap-1">
            <label htmlFor={id} className="text-note text-ink-2">
              Group
            </label>
            <SelectControl
              id={id}
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
        <ColumnChooser columns={columns} visible={visible} view={view} onView={onView} />
        {views}
        <p role="status" className="flex min-h-8 items-center text-ink-2">
          {status}
        </p>
        <div className="ml-auto flex flex-wrap items-center gap-3">
          {differs ? (
            <a href={exportHref(false)} download className={buttonClass('secondary')}>
              Export rows shown
            </a>
          ) : null}
          <a href={exportHref(true)} download className={buttonClass('secondary')}>
            Export all rows
          </a>
        </div>
      </div>
      {only === null ? null : (
        <p className="flex flex-wrap items-baseline gap-x-3 border-y border-rule py-1">
          <span className="text-ink-2">Only rows with</span>
          <span className="measure min-w-0 wrap-anywhere">{only}</span>
          <Button kind="quiet" onClick={() => onView({ ...view, only: null })}>
            Show the others too
          </Button>
        </p>
      )}
      {finding === null ? null : (
        <p className="flex flex-wrap items-baseline gap-x-3 border-y border-rule py-1">
          <span className="text-ink-2">Only the rows of a finding:</span>
          <span className="measure min-w-0">{finding}</span>
          <TextLink href={plainHref}>Show all rows</TextLink>
        </p>
      )}
    </div>
  );
}
