'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { TextLink } from '@/components/ui/text-link';
import { type FormAction, IDLE } from '@/lib/form-state';

interface SignInFormProps {
  readonly action: FormAction;
  /** Where to go afterwards. */
  readonly next: string;
}

export function SignInForm({ action, next }: SignInFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="next" value={next} />
      <TextField
        name="email"
        type="email"
        label="Mail address"
        autoComplete="username"
        required
        defaultValue={state.values['email']}
        error={state.errors['email']}
      />
      <TextField
        name="password"
        type="password"
        label="Password"
        autoComplete="current-password"
        required
        error={state.errors['password']}
      />
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
        <SubmitButton pendingWords="Signing in">Sign in</SubmitButton>
        <TextLink href="/password-reset">Set a new password by mail</TextLink>
      </div>
    </form>
  );
}
