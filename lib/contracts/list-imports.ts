import { z } from 'zod';
import { reasonSchema } from './codes';

export const uploadQuerySchema = z.object({
  reason: reasonSchema,
  by: z.literal('hand').optional().describe('Its columns are to be mapped by hand, whatever its headings'),
});

export const importStartedSchema = z.object({ import: z.string() });

/** What became of a file: an import under way, or an upload that waits for a mapping. */
export const fileTakenSchema = z.union([importStartedSchema, z.object({ upload: z.string() })]);

export const problemSchema = z.object({
  kind: z.string(),
  line: z.number().int().nullable(),
  column: z.string().nullable(),
  found: z.string().nullable(),
  message: z.string(),
});

/** An import as its page shows it. */
export const importSchema = z.object({
  import: z.string(),
  state: z.enum(['waiting', 'running', 'done', 'failed', 'cancelled']),
  file: z.string(),
  reason: z.string(),
  rows: z.number().int().describe('Read so far'),
  ofRows: z.number().int().nullable().describe('Estimated from the lines of the file until it has been read'),
  secondsLeft: z.number().nullable().describe('Estimated from how far it has come; null when nothing tells'),
  unchanged: z.boolean().describe('Its file was the revision in force already; no new one was made'),
  revision: z.number().int().nullable(),
  problems: z.array(problemSchema).describe('The first 200'),
  counts: z.array(z.object({ kind: z.string(), count: z.number().int() })),
  failure: z.string().nullable().describe('Why an import was given up that found nothing wrong in its file'),
  inForce: z.number().int().describe("The list's newest revision; 0 before the first"),
});
export type ImportView = z.output<typeof importSchema>;
