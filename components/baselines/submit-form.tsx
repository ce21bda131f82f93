'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { ButtonLink } from '@/components/ui/button';
import { FormGrid } from '@/components/ui/form-grid';
import { SeverityWord } from '@/components/ui/severity';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextArea } from '@/components/ui/text-area';
import { TextField } from '@/components/ui/text-field';
import { ANSWER_LENGTH, answerField, findingField } from '@/lib/contracts/baselines';
import { type FormAction, IDLE } from '@/lib/form-state';

export interface WarningToAnswer {
  /** `findingKey` of it. */
  readonly finding: string;
  readonly where: string;
  readonly message: string;
  /** What was answered to it in the submission before. */
  readonly lastAnswer: string | null;
}

interface SubmitFormProps {
  readonly action: FormAction;
  readonly program: string;
  readonly configuration: { readonly code: string; readonly version: number; readonly title: string };
  readonly warnings: readonly WarningToAnswer[];
  /** Where to go without submitting. */
  readonly back: string;
}

/** Title, reason and an answer to each warning. What was typed stays when something is missing. */
export function SubmitForm({ action, program, configuration, warnings, back }: SubmitFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const typed = (field: string, otherwise: string) => state.values[field] ?? otherwise;
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="configuration" value={configuration.code} />
        <input type="hidden" name="version" value={configuration.version} />
        <TextField
          name="title"
          label="Title"
          hint="What the baseline will be called."
          required
          maxLength={200}
          autoComplete="off"
          defaultValue={typed('title', configuration.title)}
          error={state.errors['title']}
        />
        <TextArea
          name="reason"
          label="Reason"
          hint="Why this is submitted now, and for what."
          required
          maxLength={1000}
          rows={3}
          defaultValue={typed('reason', '')}
          error={state.errors['reason']}
        />
        {warnings.map((warning, index) => (
          <div key={warning.finding} className="grid gap-2 border-t border-caution pt-3">
            <input type="hidden" name={findingField(index)} value={warning.finding} />
            <p className="flex flex-wrap items-baseline gap-x-3">
              <SeverityWord severity="warning" word={`Warning ${index + 1} of ${warnings.length}`} />
              <span className="text-ink-2">{warning.where}</span>
            </p>
            <p className="measure wrap-anywhere">{warning.message}</p>
            <TextArea
              name={answerField(index)}
              label={`Answer to warning ${index + 1}`}
              hint={
                warning.lastAnswer === null
                  ? 'Why it may stand as it is.'
                  : 'As answered in the last submission; change it where it no longer holds.'
              }
              required
              maxLength={ANSWER_LENGTH}
              rows={2}
              defaultValue={typed(answerField(index), warning.lastAnswer ?? '')}
              error={state.errors[answerField(index)]}
            />
          </div>
        ))}
        <Actions>
          <SubmitButton pendingWords="Submitting">Submit for approval</SubmitButton>
          <ButtonLink href={back}>Back to the configuration</ButtonLink>
        </Actions>
      </FormGrid>
    </form>
  );
}
