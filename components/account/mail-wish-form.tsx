'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { RadioGroup } from '@/components/ui/choice';
import { SubmitButton } from '@/components/ui/submit-button';
import { type FormAction, IDLE } from '@/lib/form-state';

const WISHES = [
  { value: 'all', label: 'All', hint: 'Submissions to decide on, and every decision.' },
  { value: 'decisions', label: 'Only decisions', hint: 'What was signed, returned or withdrawn.' },
  { value: 'none', label: 'None', hint: 'Links for passwords and invitations still come.' },
] as const;

interface MailWishFormProps {
  readonly action: FormAction;
  readonly wish: (typeof WISHES)[number]['value'];
}

/** Which mails a person wants of their programs. */
export function MailWishForm({ action, wish }: MailWishFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid max-w-160 gap-4">
      <FormAnswer state={state} />
      {/* The key keeps the choice: React resets a form after its action to what it was first rendered with. */}
      <RadioGroup
        key={wish}
        name="wish"
        label="Mails of my programs"
        options={WISHES}
        defaultValue={wish}
        error={state.errors['wish']}
      />
      <div>
        <SubmitButton kind="secondary" pendingWords="Saving">
          Save mail wishes
        </SubmitButton>
      </div>
    </form>
  );
}
