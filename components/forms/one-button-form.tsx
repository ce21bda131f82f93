'use client';

import { useActionState } from 'react';
import { type ButtonKind } from '@/components/ui/button-style';
import { FieldError } from '@/components/ui/field';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';

interface OneButtonFormProps {
  readonly action: FormAction;
  /** Sent with it. */
  readonly fields: Readonly<Record<string, string>>;
  readonly words: string;
  readonly pendingWords: string;
  readonly kind?: ButtonKind;
}

/** A button that does one thing to one row, and says beneath it what went wrong. */
export function OneButtonForm({ action, fields, words, pendingWords, kind = 'quiet' }: OneButtonFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid justify-items-start gap-1">
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SubmitButton kind={kind} pendingWords={pendingWords}>
        {words}
      </SubmitButton>
      <div role="status">
        {state.status === 'failed' && state.message !== null ? (
          <FieldError id={`${words}-${Object.values(fields).join('-')}`} text={state.message} />
        ) : null}
        {state.status === 'done' && state.message !== null ? (
          <p className="text-note text-pass">{state.message}</p>
        ) : null}
      </div>
    </form>
  );
}
