import { type Db } from '@/db/client';
import { findConfiguration } from '@/db/queries/configurations';
import { ANSWER_LENGTH, answerField, type GivenAnswer } from '@/lib/contracts/baselines';
import { AppError, type InputError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { submitConfiguration } from './submit-configuration';

export interface SubmittedForm {
  readonly configuration: string;
  readonly version: number;
  readonly title: string;
  readonly reason: string;
  readonly answers: readonly GivenAnswer[];
}

/** Submits what a person filled in, and says of each answer that is missing at which field. */
export async function submitForm(
  db: Db,
  person: Person,
  program: { readonly id: string; readonly code: string; readonly title: string },
  form: SubmittedForm,
): Promise<string> {
  const configuration = await findConfiguration(db, program.id, form.configuration);
  if (configuration === undefined) throw new AppError('not-found', 'There is no such configuration.');
  const tooLong = form.answers.filter(({ text }) => text.length > ANSWER_LENGTH);
  if (tooLong.length > 0)
    throw new AppError('invalid-input', 'An answer is too long.', {
      errors: tooLong.map(({ index }) => ({
        pointer: `/${answerField(index)}`,
        message: `Use at most ${ANSWER_LENGTH} characters.`,
      })),
    });
  const answers = Object.fromEntries(form.answers.map(({ finding, text }) => [finding, text]));
  try {
    const { version, title, reason } = form;
    return await submitConfiguration(db, { person, program, configuration, version, title, reason, answers });
  } catch (error) {
    throw error instanceof AppError ? atFields(error, form.answers) : error;
  }
}

/** Points errors of `/answers/<finding>` to the form's fields. A warning that the form did not have is told at its top. */
function atFields(error: AppError, answers: readonly GivenAnswer[]): AppError {
  if (!error.errors.some(({ pointer }) => pointer?.startsWith('/answers/'))) return error;
  const errors: InputError[] = error.errors.flatMap((one) => {
    const finding = one.pointer?.replace(/^\/answers\//, '');
    const known = answers.find((answer) => answer.finding === finding);
    return known ? [{ ...one, pointer: `/${answerField(known.index)}` }] : [];
  });
  if (errors.length === error.errors.length)
    return new AppError(error.code, error.message, { errors, cause: error });
  return new AppError(
    'conflict',
    'There are warnings now that this page did not show. Load it again and answer them.',
    { cause: error },
  );
}
