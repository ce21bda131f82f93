'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Checkbox } from '@/components/ui/choice';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

/** Invites a person to the site. */
export function InviteForm({ action }: { readonly action: FormAction }) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid max-w-160 gap-4">
      <FormAnswer state={state} />
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField
          name="email"
          type="email"
          label="Mail address"
          autoComplete="off"
          required
          defaultValue={state.values['email']}
          error={state.errors['email']}
        />
        <TextField
          name="name"
          label="Name"
          autoComplete="off"
          required
          defaultValue={state.values['name']}
          error={state.errors['name']}
        />
      </div>
      <Checkbox
        name="admin"
        label="Administrator: makes programs and keeps people"
        defaultChecked={state.values['admin'] === 'on'}
        error={state.errors['admin']}
      />
      <div>
        <SubmitButton kind="secondary" pendingWords="Inviting">
          Invite person
        </SubmitButton>
      </div>
    </form>
  );
}
