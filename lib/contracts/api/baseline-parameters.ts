import { z } from 'zod';
import { programParameter } from '@/lib/contracts/api/parameters';

export const baselineParameter = z
  .string()
  .describe('Number of a baseline, or `current` for the newest signed one of a build');

export const baselinePath = z.object({ program: programParameter, number: baselineParameter });

export const buildParameter = z
  .string()
  .optional()
  .describe('Code of a build; with `current`, the default build where none is named');

export const ifNoneMatch = z.object({
  'If-None-Match': z
    .string()
    .optional()
    .describe('The ETag of the answer at hand: 304 if nothing has changed'),
});

export const ETAG = { ETag: 'Strong: over the digest, the state, what was asked for and its units' } as const;
export const NOT_MODIFIED = { 304: 'Nothing has changed since the answer with that ETag' } as const;
