'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

/** Makes a program with its first chief engineer. */
export function ProgramForm({ action }: { readonly action: FormAction }) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send} className="grid max-w-160 gap-4">
      <FormAnswer state={state} />
      <div className="grid items-start gap-4 sm:grid-cols-2">
        <TextField
          {...field('title')}
          label="Title"
          hint="As it is read on every page."
          autoComplete="off"
          required
        />
        <TextField
          {...field('code')}
          label="Code"
          hint="Part of every address, for good: a-z, 0-9, hyphens."
          autoComplete="off"
          mono
          required
        />
        <TextField
          {...field('chiefEmail')}
          type="email"
          label="First chief engineer, mail address"
          hint="Invited, if there is no account with it."
          autoComplete="off"
          required
        />
        <TextField
          {...field('chiefName')}
          label="First chief engineer, name"
          hint="For someone who is invited."
          autoComplete="off"
          optional
        />
      </div>
      <div>
        <SubmitButton kind="secondary" pendingWords="Making the program">
          Make program
        </SubmitButton>
      </div>
    </form>
  );
}
