'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Checkbox } from '@/components/ui/choice';
import { CopyButton } from '@/components/ui/copy-button';
import { FieldError } from '@/components/ui/field';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { TOKEN_LIFETIMES } from '@/lib/contracts/token';
import { type FormAction, IDLE } from '@/lib/form-state';
import { SCOPE_NAMES, type TokenScope } from '@/lib/token-scopes';

interface TokenFormProps {
  readonly action: FormAction<{ readonly token: string }>;
  /** Those that the person's roles carry somewhere. */
  readonly scopes: readonly TokenScope[];
  readonly programs: readonly { readonly code: string; readonly title: string }[];
  readonly appUrl: string;
}

/** Makes a token and shows it, this once. */
export function TokenForm({ action, scopes, programs, appUrl }: TokenFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const ticked = (field: string) => (state.values[field] ?? '').split(',');
  return (
    <div className="grid gap-6">
      {state.result ? <NewToken token={state.result.token} appUrl={appUrl} /> : null}
      <form action={send} className="grid max-w-160 gap-4">
        {state.status === 'failed' ? <FormAnswer state={state} /> : null}
        <TextField
          name="name"
          label="Name"
          hint="What will use it, e.g. the simulator or the script."
          autoComplete="off"
          required
          defaultValue={state.values['name']}
          error={state.errors['name']}
        />
        <Boxes
          legend="It may"
          id="scopes"
          error={state.errors['scopes']}
          boxes={scopes.map((scope) => ({
            value: scope,
            label: SCOPE_NAMES[scope],
            hint: scope,
            ticked: state.status === 'failed' ? ticked('scopes').includes(scope) : scope === 'baselines:read',
          }))}
        />
        {programs.length > 0 ? (
          <Boxes
            legend="Only in these programs"
            hint="With none ticked it reaches every program of yours, later ones too."
            id="programs"
            error={state.errors['programs']}
            boxes={programs.map(({ code, title }) => ({
              value: code,
              label: title,
              ticked: ticked('programs').includes(code),
            }))}
          />
        ) : null}
        <SelectField
          name="days"
          label="It ends after"
          options={TOKEN_LIFETIMES.map((days) => ({ value: String(days), label: `${days} days` }))}
          defaultValue={state.values['days'] ?? '90'}
          error={state.errors['days']}
        />
        <div>
          <SubmitButton kind="secondary" pendingWords="Making the token">
            Make token
          </SubmitButton>
        </div>
      </form>
    </div>
  );
}

interface Box {
  readonly value: string;
  readonly label: string;
  readonly hint?: string;
  readonly ticked: boolean;
}

function Boxes({
  legend,
  hint,
  id,
  boxes,
  error,
}: {
  readonly legend: string;
  readonly hint?: string;
  readonly id: string;
  readonly boxes: readonly Box[];
  readonly error: readonly string[] | undefined;
}) {
  return (
    <fieldset aria-describedby={error ? `${id}-error` : undefined} className="grid content-start gap-1">
      <legend className="mb-1 text-body font-semibold">{legend}</legend>
      {hint ? <p className="measure text-note text-ink-2">{hint}</p> : null}
      {boxes.map((box) => (
        <Checkbox
          key={box.value + String(box.ticked)}
          name={id}
          value={box.value}
          label={box.label}
          defaultChecked={box.ticked}
          {...(box.hint ? { hint: <code>{box.hint}</code> } : {})}
        />
      ))}
      {error ? <FieldError id={id} text={error.join(' ')} /> : null}
    </fieldset>
  );
}

function NewToken({ token, appUrl }: { readonly token: string; readonly appUrl: string }) {
  const line = `curl -H 'Authorization: Bearer ${token}' ${appUrl}/api/v1/programs`;
  return (
    <div role="status" className="grid min-w-0 gap-2 border border-pass bg-sheet px-4 py-3">
      <p className="font-semibold">Copy the token now. It is shown this once and stored as a hash only.</p>
      <p className="font-mono wrap-anywhere select-all" data-token>
        {token}
      </p>
      <div>
        <CopyButton words="Copy token" text={token} />
      </div>
      <p className="text-ink-2">To try it:</p>
      <p className="font-mono wrap-anywhere select-all">{line}</p>
      <div>
        <CopyButton words="Copy curl line" text={line} />
      </div>
    </div>
  );
}
