import { z } from 'zod';
import { MATURITIES } from '@/lib/mass/component';
import { LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';
import { codeSchema, titleSchema } from './codes';
import { blankOr, dateField, numberField, sourceField, tickField, wholeField } from './form-fields';

export const BUILD_KINDS = ['design', 'as-built', 'as-weighed'] as const;
export const LIMIT_QUANTITIES = ['cg-forward-percent-mac', 'cg-aft-percent-mac', 'mass-maximum'] as const;
export const LIMIT_KINDS = ['contract', 'specification', 'target', 'allocation'] as const;

/** A named point of the frame issue in force; lengths in `length_unit`. */
export const referencePointSchema = z.object({
  code: z
    .string()
    .trim()
    .regex(
      /^[A-Za-z0-9][A-Za-z0-9_-]{0,30}$/,
      'Use letters, digits, hyphens and underscores, at most 31, beginning with a letter or digit.',
    ),
  title: titleSchema,
  length_unit: z.enum(LENGTH_UNITS),
  x: numberField,
  y: numberField,
  z: numberField,
});

const serialField = blankOr(wholeField(1));

export const buildSchema = z
  .object({
    code: codeSchema,
    title: titleSchema,
    kind: z.enum(BUILD_KINDS, 'Choose what this build is about.'),
    serial_from: serialField,
    serial_to: serialField,
    is_default: tickField,
  })
  .superRefine(({ serial_from: from, serial_to: to }, context) => {
    if (to === null) return;
    if (from === null)
      context.addIssue({
        code: 'custom',
        path: ['serial_from'],
        message: 'Give the first serial number too.',
      });
    else if (to < from)
      context.addIssue({ code: 'custom', path: ['serial_to'], message: `It must be at least ${from}.` });
  });

/** CG limits in per cent of the mean chord, masses in `mass_unit`. */
export const limitSchema = z
  .object({
    quantity: z.enum(LIMIT_QUANTITIES),
    kind: z.enum(LIMIT_KINDS, 'Choose what kind of limit this is.'),
    value: numberField,
    mass_unit: z.enum(MASS_UNITS),
    source: sourceField,
    source_date: dateField,
  })
  .superRefine(({ quantity, value }, context) => {
    if (quantity === 'mass-maximum' && value <= 0)
      context.addIssue({ code: 'custom', path: ['value'], message: 'A mass must be greater than 0.' });
  });

export const limitChoiceSchema = z.object({ quantity: z.enum(LIMIT_QUANTITIES) });

export const allowanceSchema = z.object({
  maturity: z.enum(MATURITIES),
  percent: numberField.refine((value) => value >= 0 && value <= 200, 'It must be between 0 and 200 %.'),
  source: sourceField,
});
