import { OneButtonForm } from '@/components/forms/one-button-form';
import { RoleForm } from '@/components/people/role-form';
import { Day } from '@/components/ui/day';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';
import { type MemberRole, ROLE_NAMES } from '@/lib/permissions';

interface MemberLine {
  readonly userId: string;
  readonly name: string;
  readonly email: string;
  readonly role: MemberRole;
  readonly joined: boolean;
  readonly disabled: boolean;
  readonly addedAt: Date;
}

interface MemberTableProps {
  readonly members: readonly MemberLine[];
  /** Code of the program. */
  readonly program: string;
  /** Null for those who may only look. */
  readonly actions: { readonly changeRole: FormAction; readonly remove: FormAction } | null;
}

export function MemberTable({ members, program, actions }: MemberTableProps) {
  return (
    <Table caption="Members" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Name</ColumnHead>
          <ColumnHead>Mail address</ColumnHead>
          <ColumnHead>Role</ColumnHead>
          <ColumnHead>Account</ColumnHead>
          <ColumnHead>Member since</ColumnHead>
          {actions ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {members.map((member) => (
          <tr key={member.userId}>
            <RowHead>{member.name}</RowHead>
            <Cell>{member.email}</Cell>
            <Cell>{ROLE_NAMES[member.role]}</Cell>
            <Cell>{member.disabled ? 'Disabled' : member.joined ? 'Joined' : 'Invited'}</Cell>
            <Cell>
              <Day at={member.addedAt} />
            </Cell>
            {actions ? (
              <Cell>
                <MemberButtons member={member} program={program} actions={actions} key={member.role} />
              </Cell>
            ) : null}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** Keyed by the role, so that a changed one closes its dialog. */
function MemberButtons({
  member,
  program,
  actions,
}: {
  readonly member: MemberLine;
  readonly program: string;
  readonly actions: NonNullable<MemberTableProps['actions']>;
}) {
  return (
    <div className="-my-1.5 flex gap-x-4 whitespace-nowrap">
      <DialogButton words="Change role" kind="quiet" title={`Role of ${member.name}`}>
        <RoleForm action={actions.changeRole} program={program} member={member} />
      </DialogButton>
      <DialogButton words="Remove member" kind="quiet" title={`Remove ${member.name}?`} asks>
        <p className="measure">
          {member.name} no longer sees this program. What they made in it stays, under their name.
        </p>
        <OneButtonForm
          action={actions.remove}
          fields={{ program, userId: member.userId }}
          words={`Remove ${member.name}`}
          pendingWords="Removing"
          kind="danger"
        />
      </DialogButton>
    </div>
  );
}
