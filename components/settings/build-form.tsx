'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { BUILD_WORDS } from '@/components/settings/words';
import { Actions } from '@/components/ui/actions';
import { Checkbox } from '@/components/ui/choice';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

/** Adds a build, with the serial numbers that it stands for. */
export function BuildForm({ action, program }: { readonly action: FormAction; readonly program: string }) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <FieldRow>
          <TextField
            {...field('code')}
            label="Code"
            hint="Stands in addresses: lower-case letters, digits, hyphens."
            autoComplete="off"
            mono
            required
          />
          <TextField
            {...field('title')}
            label="Title"
            hint="As in Serial 1, as built."
            autoComplete="off"
            required
          />
        </FieldRow>
        <FieldRow>
          <SelectField
            {...field('kind')}
            label="What it is about"
            placeholder="Choose"
            required
            options={Object.entries(BUILD_WORDS).map(([value, label]) => ({ value, label }))}
          />
          <TextField {...field('serial_from')} label="First serial number" inputMode="numeric" optional />
          <TextField {...field('serial_to')} label="Last serial number" inputMode="numeric" optional />
        </FieldRow>
        <Checkbox
          name="is_default"
          defaultChecked={state.values['is_default'] === 'on'}
          label="Make it the default build"
          hint="The one that the API answers for when a request names none."
        />
        <Actions>
          <SubmitButton kind="secondary" pendingWords="Adding the build">
            Add build
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
