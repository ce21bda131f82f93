'use client';

import { memo, type MouseEvent, type ReactNode } from 'react';
import { type GridColumn } from '@/components/lists/editing/grid-columns';
import { classes } from '@/components/ui/classes';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { editedTexts, type Texts } from '@/lib/editing/edits';
import { type CellProblem } from '@/lib/editing/read-row';

interface EditLineProps {
  readonly gridId: string;
  readonly line: number;
  /** Columns from `left` on are chosen up to `right`; -1: none. */
  readonly chosen: readonly [left: number, right: number];
  /** The active column of this line, -1 where it is another line. */
  readonly active: number;
  readonly columns: readonly GridColumn[];
  /** What the base says; empty for an added row, null while the row is on its way. */
  readonly base: Texts | null;
  readonly edit: DraftEdit | undefined;
  readonly problems: readonly CellProblem[] | undefined;
  readonly onPress: (line: number, column: number, event: MouseEvent) => void;
  readonly onOver: (line: number, column: number) => void;
  readonly onOpen: (line: number, column: number) => void;
  /** Stands in the active cell while it is edited. */
  readonly editor: ReactNode;
}

/** One row of the editing grid. Drawn anew only when something of its own has changed. */
export const EditLine = memo(function EditLine(props: EditLineProps) {
  const { gridId, line, chosen, active, columns, base, edit, problems, onPress, onOver, onOpen, editor } =
    props;
  const isRemoved = edit?.kind === 'remove';
  const texts = base === null ? null : (editedTexts(base, isRemoved ? undefined : edit) ?? base);
  return (
    <tr
      aria-rowindex={line + 2}
      aria-busy={base === null || undefined}
      className={isRemoved ? 'removed-line' : undefined}
    >
      {columns.map((column, at) => {
        const isEdited = edit !== undefined && edit.kind !== 'remove' && edit.fields[column.id] !== undefined;
        const wrong = problems?.find((problem) => problem.column === column.id);
        const isOpen = active === at && editor !== null;
        const text = texts?.[column.id] ?? '';
        return (
          <td
            key={column.id}
            id={`${gridId}-${line}-${at}`}
            aria-colindex={at + 1}
            aria-selected={at >= chosen[0] && at <= chosen[1]}
            aria-invalid={wrong === undefined ? undefined : true}
            title={isOpen ? undefined : (wrong?.message ?? (text === '' ? undefined : text))}
            className={classes(
              at >= chosen[0] && at <= chosen[1] && 'chosen-cell',
              active === at && 'active-cell',
              isEdited && 'edited-cell',
              wrong !== undefined && 'wrong-cell',
              isOpen && 'open-cell',
            )}
            onMouseDown={(event) => onPress(line, at, event)}
            onMouseEnter={(event) => {
              if (event.buttons === 1) onOver(line, at);
            }}
            onDoubleClick={() => onOpen(line, at)}
          >
            {isOpen ? (
              editor
            ) : at === 0 ? (
              <ItemCell text={text} edit={edit} problems={problems?.length ?? 0} />
            ) : (
              <span className={classes('block truncate', column.kind === 'number' && 'num text-right')}>
                {text}
              </span>
            )}
          </td>
        );
      })}
    </tr>
  );
});

const WORDS: Readonly<Record<DraftEdit['kind'], string>> = { change: 'edited', add: 'new', remove: 'goes' };

function ItemCell({
  text,
  edit,
  problems,
}: {
  readonly text: string;
  readonly edit: DraftEdit | undefined;
  readonly problems: number;
}) {
  return (
    <span className="flex items-baseline gap-2">
      <span className={classes('truncate', edit?.kind === 'remove' && 'line-through')}>{text}</span>
      {edit === undefined ? null : (
        <span
          className={classes(
            'ml-auto text-note whitespace-nowrap',
            problems > 0 ? 'text-limit' : 'text-caution',
          )}
        >
          {problems > 0 ? `${problems} wrong` : WORDS[edit.kind]}
        </span>
      )}
    </span>
  );
}
