'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextArea } from '@/components/ui/text-area';
import { type FormAction, IDLE } from '@/lib/form-state';

interface CarryFormProps {
  readonly action: FormAction;
  readonly fields: Readonly<Record<string, string>>;
  readonly to: number;
  /** The reason that is offered. */
  readonly reason: string;
}

/** Carries a list to another frame issue. */
export function CarryForm({ action, fields, to, reason }: CarryFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        {Object.entries(fields).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <TextArea
          name="reason"
          label="Reason"
          rows={2}
          required
          defaultValue={state.values['reason'] ?? reason}
          error={state.errors['reason']}
        />
        <Actions>
          <SubmitButton
            kind="secondary"
            pendingWords="Carrying the list"
          >{`Carry list to issue ${to}`}</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
