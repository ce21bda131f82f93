import { z } from 'zod';
import { blankOr } from './form-fields';
import { groupField } from './program-settings';

const nameField = z
  .string('Give the group a name.')
  .trim()
  .min(1, 'Give the group a name.')
  .max(80, 'Use at most 80 characters.')
  .refine((name) => !name.includes('/'), 'A name has no /: it stands between the levels of a path.');

const codeField = blankOr(
  z
    .string()
    .trim()
    .regex(/^[A-Za-z0-9][A-Za-z0-9.-]{0,15}$/, 'Use letters, digits, dots and hyphens, at most 16.'),
);

const pathField = groupField.refine((path) => path !== '', 'Choose a group.');

export const addGroupSchema = z.object({ above: groupField, name: nameField, code: codeField });
export const moveGroupSchema = z.object({ path: pathField, above: groupField, name: nameField });
export const recodeGroupSchema = z.object({ path: pathField, code: codeField });
export const groupChoiceSchema = z.object({ path: pathField });

/** Several ticked paths come as `path.N`, in their order. */
export const ticked = z
  .looseObject({})
  .transform((form) =>
    Object.entries(form).flatMap(([name, value]) =>
      name.startsWith('path.') && typeof value === 'string' && value !== '' ? [value] : [],
    ),
  );
