import { type ReactNode } from 'react';
import { SeverityMark } from '@/components/ui/severity';

export interface FieldWords {
  readonly label: string;
  /** What the field wants, said before it is filled in. */
  readonly hint?: ReactNode;
  /** What is wrong and the remedy. Absent, null or empty: nothing is wrong. */
  readonly error?: string | readonly string[] | null | undefined;
  /** Says "optional" beside the label. */
  readonly optional?: boolean;
}

/** The ids and aria attributes that tie a control to its hint and error. */
export function fieldAria(id: string, words: FieldWords) {
  const wrong = errorText(words.error);
  const described = [words.hint ? `${id}-hint` : '', wrong ? `${id}-error` : ''].filter(Boolean).join(' ');
  return {
    id,
    'aria-invalid': wrong ? (true as const) : undefined,
    'aria-describedby': described || undefined,
  };
}

export function errorText(error: FieldWords['error']): string {
  return typeof error === 'string' ? error : (error ?? []).join(' ');
}

export const CONTROL_CLASS =
  'block w-full min-h-8 rounded border border-ink-2 bg-sheet px-2 py-1 text-body text-ink placeholder:text-ink-2 ' +
  'hover:border-ink aria-invalid:border-limit pointer-coarse:min-h-11 pointer-coarse:text-lead ' +
  'disabled:border-rule disabled:text-ink-2';

/** Label above, hint under it, the control, the error beneath. */
export function Field({
  id,
  label,
  hint,
  error,
  optional = false,
  children,
}: FieldWords & { readonly id: string; readonly children: ReactNode }) {
  const wrong = errorText(error);
  return (
    <div className="grid content-start gap-1">
      <label htmlFor={id} className="text-body font-semibold">
        {label}
        {optional ? <span className="font-normal text-ink-2"> (optional)</span> : null}
      </label>
      {hint ? (
        <div id={`${id}-hint`} className="measure text-note text-ink-2">
          {hint}
        </div>
      ) : null}
      {children}
      {wrong ? <FieldError id={id} text={wrong} /> : null}
    </div>
  );
}

export function FieldError({ id, text }: { readonly id: string; readonly text: string }) {
  return (
    <p id={`${id}-error`} className="measure flex gap-1 text-note text-limit">
      <span className="flex h-4 items-center">
        <SeverityMark severity="blocker" />
      </span>
      <span>{text}</span>
    </p>
  );
}
