'use client';

import { useActionState } from 'react';
import { NewPasswordFields } from '@/components/account/new-password-fields';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

/** Changes one's own password. */
export function PasswordForm({ action }: { readonly action: FormAction }) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid max-w-96 gap-4">
      <FormAnswer state={state} />
      <TextField
        name="currentPassword"
        type="password"
        label="Present password"
        autoComplete="current-password"
        required
        error={state.errors['currentPassword']}
      />
      <NewPasswordFields errors={state.errors} />
      <div>
        <SubmitButton kind="secondary" pendingWords="Changing the password">
          Change password
        </SubmitButton>
      </div>
    </form>
  );
}
