'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type Maturity } from '@/lib/mass/component';

interface AllowanceFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly maturity: Maturity;
  readonly present: Readonly<Record<string, string>>;
}

/** Sets the growth allowance of one maturity. */
export function AllowanceForm({ action, program, maturity, present }: AllowanceFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({
    name,
    defaultValue: state.values[name] ?? present[name] ?? '',
    error: state.errors[name],
  });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="maturity" value={maturity} />
        <FieldRow>
          <NumberField {...field('percent')} label="Allowance" unit="%" hint="Of the mass." required />
          <TextField {...field('source')} label="Source" hint="The document it comes from." required />
        </FieldRow>
        <Actions>
          <SubmitButton pendingWords="Setting the allowance">Set allowance</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
