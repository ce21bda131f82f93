'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

interface SignFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly submission: string;
  /** The number that this signature gives. */
  readonly number: number;
  /** The baseline that it supersedes, against which the page shows what changes. */
  readonly supersedes: number | null;
}

/** Signs a submission: the password again, and the one primary button. */
export function SignForm({ action, program, submission, number, supersedes }: SignFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-3 py-1">
      {state.errors['password'] ? null : <FormAnswer state={state} />}
      <input type="hidden" name="program" value={program} />
      <input type="hidden" name="submission" value={submission} />
      <input type="hidden" name="number" value={number} />
      <input type="hidden" name="supersedes" value={supersedes ?? ''} />
      <TextField
        name="password"
        type="password"
        label="Your password"
        hint="Asked for again: this is your signature."
        autoComplete="current-password"
        required
        error={state.errors['password']}
      />
      <div>
        <SubmitButton pendingWords={`Signing baseline ${number}`}>{`Sign baseline ${number}`}</SubmitButton>
      </div>
    </form>
  );
}
