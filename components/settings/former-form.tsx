'use client';

import { useActionState, useState } from 'react';
import { textsIn } from '@/components/forms/texts-in';
import { FormAnswer } from '@/components/forms/form-answer';
import { FormerFields, type FormerFrame } from '@/components/settings/former-fields';
import { Actions } from '@/components/ui/actions';
import { FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type LengthUnit } from '@/lib/units/table';

interface FormerFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly number: number;
  readonly geometry: AirframeGeometry;
  readonly former: FormerFrame;
  readonly unit: LengthUnit;
}

/** Says how the issue before lies in one that was made without saying so. */
export function FormerForm({ action, program, number, geometry, former, unit }: FormerFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const [texts, setTexts] = useState<Readonly<Record<string, string>>>(state.values);
  const field = (name: string) => ({
    name,
    defaultValue: state.values[name] ?? '',
    error: state.errors[name],
  });
  return (
    <form action={send} onChange={(event) => setTexts(textsIn(event.currentTarget))}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="number" value={number} />
        <input type="hidden" name="length_unit" value={unit} />
        <FormerFields {...{ former, unit, field, texts }} axes={geometry.axes} />
        <Actions>
          <SubmitButton pendingWords="Saving how it lies">{`Save how issue ${former.number} lies`}</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
