'use client';

import { useActionState, useState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { LIMIT_KIND_WORDS, LIMIT_QUANTITY_WORDS } from '@/components/settings/words';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { limitUnits } from '@/lib/contracts/program-settings';
import { type FormAction, IDLE } from '@/lib/form-state';
import { LIMIT_KINDS, LIMIT_QUANTITIES, type LimitQuantity } from '@/lib/loading/limits';

export interface LimitChoices {
  readonly groups: readonly string[];
  readonly conditions: readonly { readonly code: string; readonly title: string }[];
}

interface LimitFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly choices: LimitChoices;
  /** The limit that it changes, as texts by field name; with no `id` it states a further one. */
  readonly present: Readonly<Record<string, string>>;
}

const isQuantity = (text: string): text is LimitQuantity => LIMIT_QUANTITIES.some((one) => one === text);

/** States a limit or target of the program, or changes one. */
export function LimitForm({ action, program, choices, present }: LimitFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const first = state.values['quantity'] ?? present['quantity'] ?? 'mass';
  const [quantity, setQuantity] = useState<LimitQuantity>(isQuantity(first) ? first : 'mass');
  const field = (name: string) => ({
    name,
    defaultValue: state.values[name] ?? present[name] ?? '',
    error: state.errors[name],
  });
  const units = limitUnits(quantity);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="id" value={present['id'] ?? ''} />
        <FieldRow>
          <SelectField
            name="quantity"
            label="Quantity"
            value={quantity}
            onChange={(event) => {
              if (isQuantity(event.target.value)) setQuantity(event.target.value);
            }}
            error={state.errors['quantity']}
            options={LIMIT_QUANTITIES.map((value) => ({ value, label: LIMIT_QUANTITY_WORDS[value] }))}
          />
          <SelectField
            {...field('group')}
            label="Of"
            placeholder="The whole aircraft"
            options={choices.groups.map((value) => ({ value, label: value }))}
          />
          <SelectField
            {...field('condition')}
            label="In condition"
            placeholder="Every condition"
            options={choices.conditions.map(({ code, title }) => ({ value: code, label: title }))}
          />
        </FieldRow>
        <FieldRow>
          <SelectField
            {...field('sense')}
            label="Allowed is"
            placeholder="Choose"
            required
            options={[
              { value: 'at-most', label: 'at most' },
              { value: 'at-least', label: 'at least' },
            ]}
          />
          <NumberField {...field('value')} label="Value" required />
          <SelectField
            {...field('unit')}
            label="Unit"
            placeholder="Choose"
            required
            options={units.map((value) => ({ value, label: value }))}
          />
        </FieldRow>
        <FieldRow>
          <SelectField
            {...field('kind')}
            label="Kind"
            placeholder="Choose"
            hint="Beyond a contract or specification is a warning to be answered, beyond a target or allocation a note."
            required
            options={LIMIT_KINDS.map((value) => ({ value, label: LIMIT_KIND_WORDS[value] }))}
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
        <FieldRow>
          <TextField {...field('from')} type="date" label="In force from" required />
          <TextField {...field('until')} type="date" label="Last day in force" optional />
        </FieldRow>
        <Actions>
          <SubmitButton pendingWords="Setting the limit">Set limit</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
