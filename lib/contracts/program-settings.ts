import { z } from 'zod';
import { LIMIT_KINDS, LIMIT_QUANTITIES, type LimitQuantity, LIMIT_SENSES } from '@/lib/loading/limits';
import { MATURITIES } from '@/lib/mass/component';
import { toSi } from '@/lib/units/convert';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';
import { codeSchema, titleSchema } from './codes';
import { blankOr, dateField, numberField, sourceField, tickField, wholeField } from './form-fields';

export const BUILD_KINDS = ['design', 'as-built', 'as-weighed'] as const;

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

/** The whole aircraft or program is the empty text. */
export const groupField = z
  .string()
  .trim()
  .max(400, 'Use at most 400 characters.')
  .refine(
    (path) => path === '' || path.split('/').every((level) => level.trim() === level && level !== ''),
    'Write the levels of a group with / between them, as in Wing/Spars, none of them blank.',
  );

/** In what a limit of a quantity may be stated. */
export function limitUnits(quantity: LimitQuantity): readonly string[] {
  if (quantity === 'mass') return MASS_UNITS;
  if (quantity === 'percentMac') return ['% MAC'];
  return quantity.startsWith('cg') ? LENGTH_UNITS : INERTIA_UNITS;
}

const POSITIVE: readonly LimitQuantity[] = ['mass', 'ixx', 'iyy', 'izz'];

/** `value` in `unit`, one of `limitUnits`. No `id` states a further limit. */
export const limitSchema = z
  .object({
    id: blankOr(z.string().max(64)),
    quantity: z.enum(LIMIT_QUANTITIES, 'Choose what is limited.'),
    sense: z.enum(LIMIT_SENSES, 'Choose from which side it limits.'),
    kind: z.enum(LIMIT_KINDS, 'Choose what kind of limit this is.'),
    group: groupField,
    condition: blankOr(codeSchema),
    value: numberField,
    unit: z.string(),
    source: sourceField,
    source_date: dateField,
    from: dateField,
    until: blankOr(dateField),
  })
  .superRefine(({ quantity, value, unit, from, until, group }, context) => {
    const refuse = (field: string, message: string): void =>
      context.addIssue({ code: 'custom', path: [field], message });
    if (!limitUnits(quantity).includes(unit)) refuse('unit', 'Choose a unit of this quantity.');
    if (POSITIVE.includes(quantity) && group === '' && value <= 0)
      refuse('value', 'It must be greater than 0.');
    if (until !== null && until < from) refuse('until', `It must not be before ${from}.`);
  });

export const limitChoiceSchema = z.object({ id: z.string().min(1).max(64) });

/** A limit's value in SI; % of the mean chord stays. */
export function limitInSi({ quantity, value, unit }: z.output<typeof limitSchema>): number {
  const known = [...MASS_UNITS, ...LENGTH_UNITS, ...INERTIA_UNITS].find((one) => one === unit);
  return quantity === 'percentMac' || known === undefined ? value : toSi(value, known);
}

export const allowanceSchema = z.object({
  maturity: z.enum(MATURITIES, 'Choose the maturity of the rows.'),
  group: groupField,
  percent: numberField.refine((value) => value >= 0 && value <= 200, 'It must be between 0 and 200 %.'),
  source: sourceField,
});

export const allowanceChoiceSchema = z.object({ maturity: z.enum(MATURITIES), group: groupField });
