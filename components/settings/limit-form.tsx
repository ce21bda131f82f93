'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { LIMIT_KIND_WORDS } from '@/components/settings/words';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type LIMIT_QUANTITIES } from '@/lib/contracts/program-settings';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type MassUnit } from '@/lib/units/table';

interface LimitFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly quantity: (typeof LIMIT_QUANTITIES)[number];
  readonly massUnit: MassUnit;
  /** Field name -> text of the limit in force. */
  readonly present: Readonly<Record<string, string>>;
}

/** Sets one limit of the program. */
export function LimitForm({ action, program, quantity, massUnit, present }: LimitFormProps) {
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
        <input type="hidden" name="quantity" value={quantity} />
        <input type="hidden" name="mass_unit" value={massUnit} />
        <FieldRow>
          <NumberField
            {...field('value')}
            label="Value"
            unit={quantity === 'mass-maximum' ? massUnit : '% MAC'}
            required
          />
          <SelectField
            {...field('kind')}
            label="Kind"
            placeholder="Choose"
            required
            options={Object.entries(LIMIT_KIND_WORDS).map(([value, label]) => ({ value, label }))}
          />
        </FieldRow>
        <FieldRow>
          <TextField {...field('source')} label="Source" hint="The document it comes from." required />
          <TextField
            {...field('source_date')}
            type="date"
            label="Date of the source"
            hint="As printed on it."
            required
          />
        </FieldRow>
        <Actions>
          <SubmitButton pendingWords="Setting the limit">Set limit</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
