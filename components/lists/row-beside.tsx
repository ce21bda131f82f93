'use client';

import { changeOf, type PendingEdits, textsOf, withEdit } from '@/components/lists/edits';
import { RowForm } from '@/components/lists/row-form';
import { type WholeOnPage } from '@/components/lists/row-shares';
import { RowInspector } from '@/components/lists/row-inspector';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { type EditProblem, EDITS_AT_ONCE, itemOfEdit, type RowEdit } from '@/lib/contracts/list-edits';
import { type ListRow } from '@/lib/contracts/list-rows';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';

/** What lies open beside the rows: a row that is looked at or edited, or a new one. */
export type Beside =
  | { readonly kind: 'look'; readonly row: ListRow }
  | { readonly kind: 'edit'; readonly row: ListRow }
  | { readonly kind: 'new'; readonly edit: Extract<RowEdit, { kind: 'add' }> | null };

interface RowBesideProps {
  readonly beside: Beside;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  readonly wholes: readonly WholeOnPage[];
  /** Columns of the list's own. */
  readonly own: readonly string[];
  readonly file: string | null;
  readonly mayEdit: boolean;
  /** The edits so far; made from `revision` if there are none. */
  readonly pending: PendingEdits | null;
  readonly revision: number;
  readonly problems: readonly EditProblem[];
  readonly onPending: (pending: PendingEdits | null) => void;
  readonly onEdit: (editing: boolean) => void;
  readonly onClose: () => void;
  readonly onTyped: () => void;
}

/** One row beside the table, and what can be done to it. */
export function RowBeside(props: RowBesideProps) {
  const { beside, declarations, pending, revision, problems, onPending, onEdit, onClose } = props;
  const edits = pending?.edits ?? [];
  const base = pending?.base ?? revision;
  const item = beside.kind === 'new' ? beside.edit && itemOfEdit(beside.edit) : String(beside.row.cells.item);
  const known = edits.find((edit) => itemOfEdit(edit) === item);
  const others = edits.filter((edit) => edit !== known);
  const wrong = problems.filter((problem) => item !== null && problem.item === item);

  if (beside.kind === 'new') {
    return (
      <RowForm
        declarations={declarations}
        texts={beside.edit?.fields ?? {}}
        own={props.own}
        isNew
        problems={wrong}
        onDone={(fields) => {
          onPending({ base, edits: withEdit(others, { kind: 'add', fields: { ...fields } }) });
          onClose();
        }}
        onLeave={onClose}
        onTyped={props.onTyped}
      />
    );
  }
  const { row } = beside;
  if (beside.kind === 'edit') {
    return (
      <RowForm
        declarations={declarations}
        texts={{ ...textsOf(row), ...(known?.kind === 'change' ? known.fields : {}) }}
        own={[...new Set([...props.own, ...Object.keys(row.own)])]}
        isNew={false}
        problems={wrong}
        onDone={(fields) => {
          const change = changeOf(row, fields);
          onPending({ base, edits: change === null ? others : withEdit(others, change) });
          onEdit(false);
        }}
        onLeave={() => onEdit(false)}
        onTyped={props.onTyped}
      />
    );
  }
  const full = edits.length >= EDITS_AT_ONCE && known === undefined;
  return (
    <>
      {known === undefined ? null : (
        <Banner severity="note" word="Edited">
          <p>
            {known.kind === 'remove'
              ? 'This row goes with the next revision.'
              : 'Below stands the row before your edit.'}
          </p>
        </Banner>
      )}
      {props.mayEdit && known?.kind !== 'remove' ? (
        <Actions>
          <Button onClick={() => onEdit(true)} disabled={full}>
            Edit row
          </Button>
          <Button
            kind="danger"
            disabled={full}
            onClick={() => onPending({ base, edits: withEdit(edits, { kind: 'remove', item: item ?? '' }) })}
          >
            Remove row
          </Button>
          {full ? (
            <p className="text-note">Save these edits first: {EDITS_AT_ONCE} fit into one revision.</p>
          ) : null}
        </Actions>
      ) : null}
      <RowInspector
        row={row}
        declarations={declarations}
        geometry={props.geometry}
        wholes={props.wholes}
        file={props.file}
      />
    </>
  );
}
