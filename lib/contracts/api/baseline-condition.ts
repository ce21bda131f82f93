import { z } from 'zod';
import {
  baselineQuery,
  conditionSchema,
  documentConventions,
  headMembers,
} from '@/lib/contracts/api/baseline-document';
import documentExample from '@/lib/contracts/api/baseline-example.json';
import { baselinePath, ETAG, ifNoneMatch, NOT_MODIFIED } from '@/lib/contracts/api/baseline-parameters';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

export const baselineConditionSchema = z
  .object({ ...headMembers, conventions: documentConventions, condition: conditionSchema })
  .meta({ id: 'BaselineCondition', description: 'One condition of a signed baseline' });

const { program, baseline, build, state, title, digest, marking, caution, conventions, conditions } =
  documentExample;

export const baselineConditionEndpoint = {
  method: 'get',
  path: '/programs/{program}/baselines/{number}/conditions/{condition}',
  operationId: 'getBaselineCondition',
  summary: 'Get one condition of a signed baseline',
  description: 'The same numbers as in the whole document.',
  scope: 'baselines:read',
  pathParameters: baselinePath.extend({ condition: z.string().describe('Code of a condition') }),
  query: baselineQuery,
  headers: ifNoneMatch,
  answers: {
    200: {
      description: 'The condition',
      schema: baselineConditionSchema,
      example: {
        program,
        baseline,
        build,
        state,
        title,
        digest,
        marking,
        caution,
        conventions,
        condition: conditions[0],
      },
      headers: ETAG,
    },
  },
  bare: NOT_MODIFIED,
  problems: ['not-found', 'forbidden', 'gone', 'invalid-input'],
} as const satisfies Endpoint;
