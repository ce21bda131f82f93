'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { MATURITY_WORDS } from '@/components/settings/words';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { MATURITIES } from '@/lib/mass/component';

interface AllowanceFormProps {
  readonly action: FormAction;
  readonly program: string;
  /** '' for the program's own. */
  readonly group: string;
}

/** Sets the growth allowance of one maturity, for the program or one group. */
export function AllowanceForm({ action, program, group }: AllowanceFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({
    name,
    defaultValue: state.values[name] ?? '',
    error: state.errors[name],
  });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="group" value={group} />
        <FieldRow>
          <SelectField
            {...field('maturity')}
            label="Maturity of the rows"
            placeholder="Choose"
            required
            options={MATURITIES.map((value) => ({ value, label: MATURITY_WORDS[value] }))}
          />
          <NumberField {...field('percent')} label="Allowance" unit="%" hint="Of the mass." required />
        </FieldRow>
        <TextField {...field('source')} label="Source" hint="The document it comes from." required />
        <Actions>
          <SubmitButton pendingWords="Setting the allowance">Set allowance</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
