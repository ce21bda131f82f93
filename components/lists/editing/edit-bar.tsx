'use client';

import { useId } from 'react';
import { ColumnChoice, Find } from '@/components/data-table/toolbar';
import { type TableView } from '@/components/data-table/view';
import { type Keeping } from '@/components/lists/editing/draft-keeper';
import { type GridColumn } from '@/components/lists/editing/grid-columns';
import { counted } from '@/components/lists/list-words';
import { Button } from '@/components/ui/button';
import { SelectControl } from '@/components/ui/select-control';

interface EditBarProps {
  readonly columns: readonly GridColumn[];
  readonly view: TableView;
  readonly onView: (view: TableView) => void;
  readonly groups: readonly string[];
  readonly rows: string;
  readonly edited: number;
  readonly problems: number;
  readonly keeping: Keeping;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly onUndo: () => void;
  readonly onRedo: () => void;
  readonly onAdd: () => void;
  readonly onRemove: () => void;
  readonly onRestore: () => void;
  readonly onForm: () => void;
  readonly onNextProblem: () => void;
}

/** What is done to the rows that are selected, and how the draft stands. */
export function EditBar(props: EditBarProps) {
  const { columns, view, onView, groups, keeping, problems, edited } = props;
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
        <ColumnChoice columns={columns} view={view} onView={onView} />
        <p className="flex min-h-8 items-center text-ink-2">{props.rows}</p>
        <div className="ml-auto flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button onClick={props.onUndo} disabled={!props.canUndo} aria-keyshortcuts="Control+Z">
            Undo
          </Button>
          <Button onClick={props.onRedo} disabled={!props.canRedo} aria-keyshortcuts="Control+Y">
            Redo
          </Button>
          <Button onClick={props.onAdd}>Add row</Button>
          <Button onClick={props.onRemove}>Remove rows</Button>
          <Button onClick={props.onRestore}>Put rows back</Button>
          <Button onClick={props.onForm}>Row as a form</Button>
        </div>
      </div>
      <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1 border-t border-rule pt-1">
        <p>{edited === 0 ? 'Nothing edited yet' : `${counted(edited, 'row')} edited`}</p>
        <p role="status" className={keeping.state === 'failed' ? 'text-limit' : 'text-ink-2'}>
          {keepingWords(keeping, edited)}
        </p>
        {problems === 0 ? null : (
          <p className="flex items-baseline gap-x-3">
            <span className="font-semibold text-limit">{counted(problems, 'problem')}</span>
            <Button kind="quiet" onClick={props.onNextProblem}>
              Go to the next problem
            </Button>
          </p>
        )}
      </div>
    </div>
  );
}

function keepingWords({ state, changedAt, failure }: Keeping, edited: number): string {
  if (state === 'failed') return `Not kept on the server yet: ${failure ?? ''} It is tried again by itself.`;
  if (state === 'elsewhere') return 'Changed in another window';
  if (state === 'waiting') return 'Being kept on the server';
  if (changedAt === null || edited === 0) return '';
  return `Draft kept at ${changedAt.slice(11, 16)} UTC`;
}
