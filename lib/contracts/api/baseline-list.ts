import { z } from 'zod';
import { buildParameter } from '@/lib/contracts/api/baseline-parameters';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { programParameter } from '@/lib/contracts/api/parameters';

export const stateSchema = z
  .enum(['current', 'superseded', 'withdrawn'])
  .describe('superseded: a later baseline of the build was signed; withdrawn: not to be used any longer');

export const stampSchema = z.object({ at: z.iso.datetime().describe('UTC'), by: z.string() });

export const baselineListQuery = z.strictObject({
  build: buildParameter,
  state: stateSchema.optional(),
});

export const baselineListSchema = z.object({
  baselines: z.array(
    z
      .object({
        baseline: z.number().int().describe('Given at signing, per program, without gaps'),
        build: z.string(),
        state: stateSchema,
        title: z.string(),
        digest: z.string().describe('`sha256:` and 64 hex digits'),
        approved: stampSchema,
      })
      .meta({ id: 'BaselineEntry', description: 'One signed baseline' }),
  ),
});

export const baselineListEndpoint = {
  method: 'get',
  path: '/programs/{program}/baselines',
  operationId: 'listBaselines',
  summary: 'List the signed baselines of a program',
  description: 'Newest first. What is not signed is not here and leaves by no other way.',
  scope: 'baselines:read',
  pathParameters: z.object({ program: programParameter }),
  query: baselineListQuery,
  answers: {
    200: {
      description: 'Signed baselines, newest first',
      schema: baselineListSchema,
      example: {
        baselines: [
          {
            baseline: 2,
            build: 'design',
            state: 'current',
            title: 'Wing radar',
            digest: `sha256:${'0123456789abcdef'.repeat(4)}`,
            approved: { at: '2026-11-20T09:30:00.000Z', by: 'Erlend Leask' },
          },
        ],
      },
    },
  },
  problems: ['not-found', 'forbidden', 'invalid-input'],
} as const satisfies Endpoint;
