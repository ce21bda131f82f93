'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FormGrid } from '@/components/ui/form-grid';
import { type Option, SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';

interface FrameChoiceProps {
  readonly action: FormAction;
  readonly fields: Readonly<Record<string, string>>;
  /** The program's frame issues, newest first. */
  readonly options: readonly Option[];
  readonly present: string;
}

/** The frame issue that a configuration stands in. */
export function FrameChoice({ action, fields, options, present }: FrameChoiceProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        {Object.entries(fields).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <SelectField
          name="frame_issue"
          label="Frame issue"
          options={options}
          defaultValue={state.values['frame_issue'] ?? present}
          error={state.errors['frame_issue']}
        />
        <p className="measure text-note text-ink-2">
          The places of the items on board are converted when it is saved; lists and rotating parts stay as
          they are stated and are converted at each roll-up. Nothing of the aircraft moves. Limits in % MAC
          are shares of the chord of the issue and are not converted.
        </p>
        <Actions>
          <SubmitButton kind="secondary" pendingWords="Saving the frame issue">
            Save frame issue
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
