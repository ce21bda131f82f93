'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type AxisTriple } from '@/lib/frames/axes';
import { type LengthUnit } from '@/lib/units/table';

interface ReferencePointFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly axes: AxisTriple;
  readonly unit: LengthUnit;
}

/** Names a point of the airframe frame. */
export function ReferencePointForm({ action, program, axes, unit }: ReferencePointFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="length_unit" value={unit} />
        <FieldRow>
          <TextField
            {...field('code')}
            label="Code"
            hint="As in MRC or JACK-NOSE."
            autoComplete="off"
            mono
            required
          />
          <TextField
            {...field('title')}
            label="Title"
            hint="What the point is."
            autoComplete="off"
            required
          />
        </FieldRow>
        <FieldRow>
          {(['x', 'y', 'z'] as const).map((letter, index) => (
            <NumberField
              key={letter}
              {...field(letter)}
              label={`${letter}, ${axes[index] ?? ''}`}
              unit={unit}
              required
            />
          ))}
        </FieldRow>
        <Actions>
          <SubmitButton kind="secondary" pendingWords="Adding the point">
            Add reference point
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
