'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { type Option, SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';

interface ConfigurationFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly builds: readonly Option[];
  /** The program's frame issues, newest first. */
  readonly issues: readonly Option[];
}

/** Makes a configuration of a build. */
export function ConfigurationForm({ action, program, builds, issues }: ConfigurationFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <SelectField
          {...field('build')}
          label="Build"
          options={builds}
          defaultValue={state.values['build'] ?? builds[0]?.value ?? ''}
          required
        />
        <FieldRow>
          <TextField
            {...field('title')}
            label="Title"
            hint="What people call it."
            autoComplete="off"
            required
          />
          <TextField
            {...field('code')}
            label="Code"
            hint="Stands in its address: lower-case letters, digits, hyphens."
            autoComplete="off"
            mono
            required
          />
        </FieldRow>
        {issues.length < 2 ? null : (
          <SelectField
            {...field('frame_issue')}
            label="Frame issue"
            hint="Lists that are stated in another one are converted."
            options={issues}
            defaultValue={state.values['frame_issue'] ?? issues[0]?.value ?? ''}
          />
        )}
        <Actions>
          <SubmitButton kind="secondary" pendingWords="Making the configuration">
            Make configuration
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
