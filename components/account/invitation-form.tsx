'use client';

import { useActionState } from 'react';
import { NewPasswordFields } from '@/components/account/new-password-fields';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

interface InvitationFormProps {
  readonly action: FormAction;
  readonly secret: string;
  readonly email: string;
  readonly name: string;
}

/** The invited person's name and first password. */
export function InvitationForm({ action, secret, email, name }: InvitationFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="linkSecret" value={secret} />
      <input type="hidden" name="username" value={email} autoComplete="username" />
      <TextField
        name="name"
        label="Your name"
        hint="As colleagues should read it beside what you submit or sign."
        autoComplete="name"
        required
        defaultValue={state.values['name'] ?? name}
        error={state.errors['name']}
      />
      <NewPasswordFields errors={state.errors} />
      <div>
        <SubmitButton pendingWords="Joining">Join Polhode</SubmitButton>
      </div>
    </form>
  );
}
