'use client';

import { useActionState } from 'react';
import { type ButtonKind } from '@/components/ui/button-style';
import { classes } from '@/components/ui/classes';
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
  /** In a row of a table, which it must not make taller. */
  readonly inRow?: boolean;
}

/** A button that does one thing, and says beneath it what came of it. */
export function OneButtonForm(props: OneButtonFormProps) {
  const { action, fields, words, pendingWords, kind = 'quiet', inRow = false } = props;
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className={classes('grid justify-items-start', inRow && '-my-1.5')}>
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SubmitButton kind={kind} pendingWords={pendingWords}>
        {words}
      </SubmitButton>
      <div role="status">
        {state.status === 'failed' && state.message !== null ? (
          <div className="py-1">
            <FieldError id={`${words}-${Object.values(fields).join('-')}`} text={state.message} />
          </div>
        ) : null}
        {state.status === 'done' && state.message !== null ? (
          <p className="py-1 text-note text-pass">{state.message}</p>
        ) : null}
      </div>
    </form>
  );
}
