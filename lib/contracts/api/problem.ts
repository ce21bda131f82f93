import { z } from 'zod';

const inputError = z
  .object({
    message: z.string().describe('What is wrong, and what would be right'),
    pointer: z.string().optional().describe('JSON pointer (RFC 6901) into the body'),
    parameter: z.string().optional().describe('Parameter of the query or the path'),
    line: z
      .number()
      .int()
      .nullable()
      .optional()
      .describe('Physical line of the file, the first is 1; null: the file'),
    column: z.string().nullable().optional().describe('Column of the file; null: the whole line'),
    found: z.string().nullable().optional().describe('The text that stands there, shortened'),
    kind: z.string().optional().describe('Stable word for the kind of error, e.g. not-a-number'),
  })
  .meta({ id: 'InputError', description: 'One thing wrong in an input' });

/** Lines of a file that are wrong, as an import tells them. */
export const fileErrorSchema = z
  .object({
    kind: z.string().describe('Stable word for the kind of error, e.g. not-a-number'),
    line: z.number().int().nullable().describe('Physical line of the file, the first is 1; null: the file'),
    column: z.string().nullable().describe('Column of the file; null: the whole line'),
    found: z.string().nullable().describe('The text that stands there, shortened'),
    message: z.string().describe('What is wrong, and what would be right'),
  })
  .meta({ id: 'FileError', description: 'One thing wrong in a file' });

/** RFC 9457 problem details, as every failure is answered. */
export const problemSchema = z
  .object({
    type: z.string().describe('Stable name of the kind of problem: `urn:polhode:problem:` and a code'),
    title: z.string(),
    status: z.number().int().describe('The HTTP status'),
    detail: z.string().describe('What happened, in a sentence for people'),
    instance: z.string().optional().describe('Names the entry in the server log, for faults of the server'),
    errors: z.array(inputError).optional().describe('Of an input: each thing wrong, the first 200'),
  })
  .meta({ id: 'Problem', description: 'Problem details (RFC 9457)' });
