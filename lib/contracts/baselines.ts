import { z } from 'zod';
import { codeSchema, reasonSchema, titleSchema } from './codes';
import { blankOr, wholeField } from './form-fields';

const idField = z.string().min(1).max(64);

const answers = { prefix: 'answer.', finding: 'finding.' } as const;

/** Field names of a warning and of the answer to it, by its place in the form. */
export const findingField = (index: number): string => `${answers.finding}${index}`;
export const answerField = (index: number): string => `${answers.prefix}${index}`;

/**
 * The form that submits a configuration. Besides the fields named here it has a hidden `finding.N` (the finding's key) and an
 * `answer.N` for every warning.
 */
export const submitFormSchema = z
  .looseObject({
    configuration: codeSchema,
    version: wholeField(1),
    title: titleSchema,
    reason: reasonSchema,
  })
  .transform((form) => ({
    configuration: form.configuration,
    version: form.version,
    title: form.title,
    reason: form.reason,
    answers: answersOf(form),
  }));

export interface GivenAnswer {
  /** Its place in the form. */
  readonly index: number;
  /** The finding's key. */
  readonly finding: string;
  readonly text: string;
}

function answersOf(form: Readonly<Record<string, unknown>>): GivenAnswer[] {
  return Object.entries(form).flatMap(([name, finding]) => {
    if (!name.startsWith(answers.finding) || typeof finding !== 'string') return [];
    const index = Number(name.slice(answers.finding.length));
    const text = form[answerField(index)];
    return Number.isInteger(index) ? [{ index, finding, text: typeof text === 'string' ? text : '' }] : [];
  });
}

/** An answer is one or a few sentences. */
export const ANSWER_LENGTH = 1000;

/** With the submission goes what its page said that the signature does: which number it gives, which baseline it supersedes. */
export const signFormSchema = z.object({
  submission: idField,
  number: wholeField(1),
  supersedes: blankOr(wholeField(1)),
  password: z.string('Enter your password.').min(1, 'Enter your password.').max(200),
});

export const returnFormSchema = z.object({ submission: idField, reason: reasonSchema });

export const withdrawFormSchema = z.object({ number: wholeField(1), reason: reasonSchema });
