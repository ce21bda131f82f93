'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { MEMBER_ROLES, ROLE_NAMES } from '@/lib/permissions';

/** Adds a member to a program, inviting who has no account yet. */
export function MemberForm({ action, program }: { readonly action: FormAction; readonly program: string }) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send} className="grid max-w-160 gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="program" value={program} />
      <div className="grid items-start gap-4 sm:grid-cols-2">
        <TextField
          {...field('email')}
          type="email"
          label="Mail address"
          hint="Whoever has no account yet is invited."
          autoComplete="off"
          required
        />
        <TextField
          {...field('name')}
          label="Name"
          hint="For someone who is invited."
          autoComplete="off"
          optional
        />
        <SelectField
          {...field('role')}
          label="Role"
          placeholder="Choose a role"
          required
          options={MEMBER_ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }))}
        />
      </div>
      <div>
        <SubmitButton kind="secondary" pendingWords="Adding the member">
          Add member
        </SubmitButton>
      </div>
    </form>
  );
}
