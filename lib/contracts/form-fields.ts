import { z } from 'zod';
import { readNumber } from '@/lib/ingest/table/number-text';

/** A finite number as a person typed it, with a decimal point. */
export const numberField = z
  .string('Enter a number.')
  .trim()
  .min(1, 'Enter a number.')
  .max(64, 'This is too long for a number.')
  .transform((text, context) => {
    const read = readNumber(text, false);
    if (typeof read === 'number') return read;
    const own = read.kind === 'not-finite' || read.kind === 'thousands-separator';
    const message = own
      ? read.message
      : `\`${text}\` is not a number. Write digits with a decimal point, for example 12.45.`;
    context.addIssue({ code: 'custom', message });
    return z.NEVER;
  });

export const positiveField = numberField.refine((value) => value > 0, 'It must be greater than 0.');

/** `field`, or null when it is left blank. Says what `field` says of a text that is neither. */
export const blankOr = <T>(field: z.ZodType<T, string>) =>
  z
    .string()
    .optional()
    .transform((text = '', context): T | null => {
      if (text.trim() === '') return null;
      const read = field.safeParse(text);
      if (read.success) return read.data;
      for (const { message } of read.error.issues) context.addIssue({ code: 'custom', message });
      return z.NEVER;
    });

/** A whole number of at least `least`, as a person typed it or as a hidden field has it. */
export const wholeField = (least: number) =>
  z
    .string('Enter a whole number.')
    .trim()
    .regex(/^\d{1,9}$/, 'Enter a whole number.')
    .transform(Number)
    .refine((value) => value >= least, `It must be at least ${least}.`);

/** A day, as a date input sends it. */
export const dateField = z.iso.date('Enter a date, as in 2026-03-31.');

export const sourceField = z
  .string('Say where this comes from.')
  .trim()
  .min(1, 'Say where this comes from: a document, a decision.')
  .max(300, 'Use at most 300 characters.');

/** Sent as `on` by a ticked box, not at all by another. */
export const tickField = z
  .literal('on')
  .optional()
  .transform((value) => value === 'on');
