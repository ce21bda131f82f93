'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { type ButtonKind } from '@/components/ui/button-style';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextArea } from '@/components/ui/text-area';
import { type FormAction, IDLE } from '@/lib/form-state';

interface ReasonFormProps {
  readonly action: FormAction;
  readonly fields: Readonly<Record<string, string>>;
  readonly label: string;
  readonly hint: string;
  /** A verb with its object. */
  readonly words: string;
  readonly pendingWords: string;
  readonly kind?: ButtonKind;
}

/** Does something that needs a reason which others will read: returns a submission, withdraws a baseline. */
export function ReasonForm({
  action,
  fields,
  label,
  hint,
  words,
  pendingWords,
  kind = 'secondary',
}: ReasonFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-3">
      <FormAnswer state={state} />
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <TextArea
        name="reason"
        label={label}
        hint={hint}
        required
        maxLength={1000}
        defaultValue={state.values['reason']}
        error={state.errors['reason']}
      />
      <div>
        <SubmitButton kind={kind} pendingWords={pendingWords}>
          {words}
        </SubmitButton>
      </div>
    </form>
  );
}
