'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { ButtonLink } from '@/components/ui/button';
import { FormGrid } from '@/components/ui/form-grid';
import { type Option, SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';

export interface PinChoice {
  /** `list:CODE` or `rotors`. */
  readonly name: string;
  readonly label: string;
  /** Revision numbers, newest first. */
  readonly options: readonly Option[];
  /** '' when it is not part of the configuration. */
  readonly pinned: string;
}

interface PinsFormProps {
  readonly action: FormAction;
  readonly fields: Readonly<Record<string, string>>;
  readonly choices: readonly PinChoice[];
  readonly backHref: string;
}

/** Which lists and rotating parts a configuration is made from, and which revision of each. */
export function PinsForm({ action, fields, choices, backHref }: PinsFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        {Object.entries(fields).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        {choices.map((choice) => (
          <SelectField
            key={choice.name}
            name={choice.name}
            label={choice.label}
            placeholder="Not part of this configuration"
            options={choice.options}
            defaultValue={state.values[choice.name] ?? choice.pinned}
            error={state.errors[choice.name] ?? state.errors[choice.name.replace('list:', '')]}
          />
        ))}
        <Actions>
          <SubmitButton pendingWords="Saving the choice">Save choice of revisions</SubmitButton>
          <ButtonLink href={backHref} kind="quiet">
            Leave without saving
          </ButtonLink>
        </Actions>
      </FormGrid>
    </form>
  );
}
