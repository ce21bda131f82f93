'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';
import { MEMBER_ROLES, type MemberRole, ROLE_NAMES } from '@/lib/permissions';

interface RoleFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly member: { readonly userId: string; readonly role: MemberRole };
}

/** One member's role. */
export function RoleForm({ action, program, member }: RoleFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="program" value={program} />
      <input type="hidden" name="userId" value={member.userId} />
      <SelectField
        name="role"
        label="Role"
        options={MEMBER_ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }))}
        defaultValue={state.values['role'] ?? member.role}
        error={state.errors['role']}
      />
      <div>
        <SubmitButton pendingWords="Changing the role">Change role</SubmitButton>
      </div>
    </form>
  );
}
