'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

interface RestoreFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly list: string;
  /** The revision to bring back, over the newest one. */
  readonly revision: number;
  readonly newest: number;
}

/** Brings an old revision back as a new one, with the reason. */
export function RestoreForm({ action, program, list, revision, newest }: RestoreFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="list" value={list} />
        <input type="hidden" name="revision" value={revision} />
        <input type="hidden" name="newest" value={newest} />
        <TextField
          name="reason"
          label="Reason"
          hint="Why what came after it does not stand."
          defaultValue={state.values['reason'] ?? ''}
          error={state.errors['reason']}
          required
        />
        <Actions>
          <SubmitButton pendingWords={`Bringing revision ${revision} back`}>
            {`Bring revision ${revision} back`}
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
