'use client';

import { useActionState } from 'react';
import { FieldError } from '@/components/ui/field';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';
import { MEMBER_ROLES, type MemberRole, ROLE_NAMES } from '@/lib/permissions';

interface RoleFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly member: { readonly userId: string; readonly name: string; readonly role: MemberRole };
}

/** One member's role, in a row of the table. */
export function RoleForm({ action, program, member }: RoleFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-1">
      <input type="hidden" name="program" value={program} />
      <input type="hidden" name="userId" value={member.userId} />
      <div className="flex items-center gap-2">
        <div className="w-48 [&_label]:sr-only">
          <SelectField
            name="role"
            label={`Role of ${member.name}`}
            options={MEMBER_ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }))}
            defaultValue={member.role}
          />
        </div>
        <SubmitButton kind="quiet" pendingWords="Changing">
          Change role
        </SubmitButton>
      </div>
      <div role="status">
        {state.status === 'failed' && state.message !== null ? (
          <FieldError id={`role-${member.userId}`} text={state.message} />
        ) : null}
        {state.status === 'done' && state.message !== null ? (
          <p className="text-note text-pass">{state.message}</p>
        ) : null}
      </div>
    </form>
  );
}
