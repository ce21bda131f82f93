/** What a form's action answers. `values` are what was typed, kept for the next try; passwords and secrets are not among them. */
export interface FormState<T = null> {
  readonly status: 'idle' | 'done' | 'failed';
  /** A sentence for the top of the form. */
  readonly message: string | null;
  /** By field name. */
  readonly errors: Readonly<Record<string, readonly string[]>>;
  readonly values: Readonly<Record<string, string>>;
  readonly result: T | null;
}

export const IDLE: FormState<never> = { status: 'idle', message: null, errors: {}, values: {}, result: null };

/** A server action as `useActionState` takes it. */
export type FormAction<T = null> = (state: FormState<T>, form: FormData) => Promise<FormState<T>>;
