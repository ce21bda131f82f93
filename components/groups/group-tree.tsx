import { OneButtonForm } from '@/components/forms/one-button-form';
import { MoveGroupForm, RecodeGroupForm } from '@/components/groups/group-forms';
import { Indent } from '@/components/settings/indent';
import { Num } from '@/components/mass/num';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';
import { groupName, type GroupNode } from '@/lib/groups/breakdown';

export interface GroupActions {
  readonly move: FormAction;
  readonly recode: FormAction;
  readonly remove: FormAction;
}

interface GroupTreeProps {
  readonly nodes: readonly GroupNode[];
  /** Counted rows of the newest list revisions in each group itself, by the group's name of today. */
  readonly rows: ReadonlyMap<string, number>;
  readonly program: string;
  /** Null for those who may only look. */
  readonly actions: GroupActions | null;
}

/** The breakdown as it stands today. */
export function GroupTree({ nodes, rows, program, actions }: GroupTreeProps) {
  const paths = nodes.map(({ path }) => path);
  const isLeaf = (path: string): boolean => !paths.some((one) => one.startsWith(`${path}/`));
  return (
    <Table caption="Groups of today, with the rows of the newest list revisions that are in each itself" tall>
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          <ColumnHead>Code</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          {actions ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {nodes.map(({ path, code }) => (
          <tr key={path}>
            <RowHead>
              <Indent path={path} />
              {groupName(path)}
            </RowHead>
            <Cell className="font-mono">{code}</Cell>
            <Cell side="right">
              <Num value={rows.get(path) ?? 0} decimals={0} />
            </Cell>
            {actions ? (
              <Cell>
                <span className="-my-1.5 flex flex-wrap gap-x-4 pointer-coarse:-my-3">
                  <DialogButton words="Rename or move" kind="quiet" title={`Rename or move ${path}`}>
                    <MoveGroupForm action={actions.move} {...{ program, path, paths }} />
                  </DialogButton>
                  <DialogButton words="Code" kind="quiet" title={`Code of ${path}`}>
                    <RecodeGroupForm action={actions.recode} {...{ program, path, code }} />
                  </DialogButton>
                  {isLeaf(path) ? (
                    <DialogButton words="Remove" kind="quiet" title={`Remove ${path}?`} asks>
                      <p className="measure">
                        Rows that are in it become rows of an unknown group, which the checks warn of. The
                        history keeps it.
                      </p>
                      <OneButtonForm
                        action={actions.remove}
                        fields={{ program, path }}
                        words="Remove group"
                        pendingWords="Removing"
                        kind="danger"
                      />
                    </DialogButton>
                  ) : null}
                </span>
              </Cell>
            ) : null}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
