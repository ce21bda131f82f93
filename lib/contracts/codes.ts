import { z } from 'zod';

/** Codes name things in addresses: lower-case letters, digits and hyphens. */
export const codeSchema = z
  .string()
  .trim()
  .regex(
    /^[a-z0-9][a-z0-9-]{0,62}$/,
    'Use lower-case letters, digits and hyphens, at most 63, beginning with a letter or digit.',
  );

export const titleSchema = z.string().trim().min(1, 'Give it a title.').max(200);
export const reasonSchema = z.string().trim().min(1, 'Say why, in a few words.').max(1000);
