'use client';

import { useActionState } from 'react';
import { NewPasswordFields } from '@/components/account/new-password-fields';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

/** Asks for the link. */
export function PasswordResetRequestForm({ action }: { readonly action: FormAction }) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <TextField
        name="email"
        type="email"
        label="Mail address"
        autoComplete="username"
        required
        defaultValue={state.values['email']}
        error={state.errors['email']}
      />
      <div>
        <SubmitButton pendingWords="Asking for the link">Send me a link</SubmitButton>
      </div>
    </form>
  );
}

/** Follows the link: the new password. */
export function PasswordResetForm({
  action,
  secret,
}: {
  readonly action: FormAction;
  readonly secret: string;
}) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="linkSecret" value={secret} />
      <NewPasswordFields errors={state.errors} />
      <div>
        <SubmitButton pendingWords="Setting the password">Set the password</SubmitButton>
      </div>
    </form>
  );
}
