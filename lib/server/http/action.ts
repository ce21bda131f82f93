import { refresh } from 'next/cache';
import { headers } from 'next/headers';
import { redirect, unstable_rethrow } from 'next/navigation';
import { z } from 'zod';
import { type AppError } from '@/lib/errors';
import { type FormAction, type FormState } from '@/lib/form-state';
import { type ProgramAction, type SiteAction } from '@/lib/permissions';
import { type Person } from '@/lib/server/actor';
import { type SignedIn } from '@/lib/server/auth/session';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { type ProgramAccess, requireProgramAction, requireSiteAction } from './access';
import { readForm, valuesToKeep } from './form-data';
import { requireOwnOrigin } from './guards';
import { currentAddress, currentUser } from './page';
import { failureOf } from './problem';
import { inputErrorOf } from './read-json';

interface PublicCall<S extends z.ZodType> {
  readonly input: z.output<S>;
  readonly address: string;
}

export interface SiteCall<S extends z.ZodType> extends PublicCall<S> {
  readonly user: SignedIn;
  readonly person: Person;
}

export type ProgramCall<S extends z.ZodType> = SiteCall<S> & ProgramAccess;

/** What the work of an action returns: the sentence to show, with a result where the page needs one. Or it redirects. */
export type ActionAnswer<T> = { readonly message: string; readonly result?: T } | void;

/** For people who are not signed in. */
export function publicAction<S extends z.ZodType, T = null>(
  schema: S,
  work: (call: PublicCall<S>) => Promise<ActionAnswer<T>>,
): FormAction<T> {
  return (_state, form) =>
    answer(form, async () => work({ input: parse(schema, form), address: await currentAddress() }));
}

/** Session, Origin and permission first, then the schema, then the work. */
export function siteAction<S extends z.ZodType, T = null>(
  action: SiteAction,
  schema: S,
  work: (call: SiteCall<S>) => Promise<ActionAnswer<T>>,
): FormAction<T> {
  return (_state, form) =>
    answer(form, async () => {
      const who = await whoAsks();
      requireSiteAction(who.user, action);
      return work({ ...who, input: parse(schema, form) });
    });
}

/** The same for one program, named by its code in the form's field `program`. */
export function programAction<S extends z.ZodType, T = null>(
  action: ProgramAction,
  schema: S,
  work: (call: ProgramCall<S>) => Promise<ActionAnswer<T>>,
): FormAction<T> {
  return (_state, form) =>
    answer(form, async () => {
      const who = await whoAsks();
      const code = z.string().catch('').parse(form.get('program'));
      const access = await requireProgramAction(serverDb(), who.user, { code }, action);
      return work({ ...who, ...access, input: parse(schema, form) });
    });
}

async function whoAsks(): Promise<{ user: SignedIn; person: Person; address: string }> {
  const user = await currentUser();
  if (!user) redirect('/sign-in');
  const address = await currentAddress();
  return { user, address, person: { userId: user.id, address } };
}

function parse<S extends z.ZodType>(schema: S, form: FormData): z.output<S> {
  const parsed = schema.safeParse(readForm(form));
  if (!parsed.success) throw inputErrorOf(parsed.error);
  return parsed.data;
}

async function answer<T>(form: FormData, work: () => Promise<ActionAnswer<T>>): Promise<FormState<T>> {
  try {
    requireOwnOrigin('POST', await headers(), env().APP_URL);
    const done = await work();
    refresh();
    const result = done?.result ?? null;
    return { status: 'done', message: done?.message ?? null, errors: {}, values: {}, result };
  } catch (thrown) {
    unstable_rethrow(thrown);
    return failed(failureOf(thrown, 'action').error, form);
  }
}

function failed<T>(error: AppError, form: FormData): FormState<T> {
  const errors: Record<string, string[]> = {};
  for (const { pointer, message } of error.errors) {
    const field = pointer?.split('/')[1];
    if (field) (errors[field] ??= []).push(message);
  }
  const message =
    Object.keys(errors).length > 0 ? 'Nothing was saved. The fields below say why.' : error.message;
  return { status: 'failed', message, errors, values: valuesToKeep(form), result: null };
}
