'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

interface RotorRemovalProps {
  readonly action: FormAction;
  readonly program: string;
  readonly base: number;
  readonly rotor: string;
}

/** Takes a rotor out of the next revision; those before keep it. */
export function RotorRemoval({ action, program, base, rotor }: RotorRemovalProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="base" value={base} />
        <input type="hidden" name="was" value={rotor} />
        <TextField
          name="reason"
          label="Reason for removing it"
          hint="Revisions before keep the rotor; speeds of its shaft stay with the operating points."
          defaultValue={state.values['reason']}
          error={state.errors['reason']}
          maxLength={1000}
          required
        />
        <Actions>
          <SubmitButton kind="danger" pendingWords={`Saving revision ${base + 1}`}>
            Remove rotor
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
