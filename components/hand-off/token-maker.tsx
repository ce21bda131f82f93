'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { CopyButton } from '@/components/ui/copy-button';
import { FieldRow } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { TOKEN_LIFETIMES } from '@/lib/contracts/token';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type TokenScope } from '@/lib/token-scopes';
import { tokenLine } from './curl-lines';
import { Line } from './curl-list';

const SCOPE: TokenScope = 'baselines:read';

interface TokenMakerProps {
  readonly action: FormAction<{ readonly token: string }>;
  readonly program: { readonly code: string; readonly title: string };
}

/** Makes a token that reads this program's baselines and nothing else, and shows it, this once. */
export function TokenMaker({ action, program }: TokenMakerProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <div className="grid min-w-0 gap-4">
      {state.result ? <NewToken token={state.result.token} /> : null}
      <form action={send} className="grid max-w-160 gap-4">
        {state.status === 'failed' ? <FormAnswer state={state} /> : null}
        <input type="hidden" name="scopes" value={SCOPE} />
        <input type="hidden" name="programs" value={program.code} />
        <FieldRow>
          <TextField
            name="name"
            label="Name"
            hint="The simulator or script that will use it."
            autoComplete="off"
            required
            defaultValue={state.values['name']}
            error={state.errors['name']}
          />
          <SelectField
            name="days"
            label="It ends after"
            options={TOKEN_LIFETIMES.map((days) => ({ value: String(days), label: `${days} days` }))}
            defaultValue={state.values['days'] ?? '90'}
            error={state.errors['days']}
          />
        </FieldRow>
        <p className="measure text-ink-2">
          It reads signed baselines of {program.title}, and nothing else. For more, make one on the account
          page.
        </p>
        <div>
          <SubmitButton kind="secondary" pendingWords="Making the token">
            Make token
          </SubmitButton>
        </div>
      </form>
    </div>
  );
}

function NewToken({ token }: { readonly token: string }) {
  const line = tokenLine(token);
  return (
    <div role="status" className="grid min-w-0 gap-2 border border-pass bg-sheet px-4 py-3">
      <p className="font-semibold">Copy the token now. It is shown this once and stored as a hash only.</p>
      <p className="font-mono wrap-anywhere select-all" data-token>
        {token}
      </p>
      <div>
        <CopyButton words="Copy token" text={token} />
      </div>
      <p className="text-ink-2">For the lines on this page:</p>
      <Line line={line} />
      <div>
        <CopyButton words="Copy line" text={line} />
      </div>
    </div>
  );
}
