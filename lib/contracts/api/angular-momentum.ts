import { z } from 'zod';
import { documentConventions, headMembers } from '@/lib/contracts/api/baseline-document';
import documentExample from '@/lib/contracts/api/baseline-example.json';
import {
  baselinePath,
  buildParameter,
  ETAG,
  ifNoneMatch,
  NOT_MODIFIED,
} from '@/lib/contracts/api/baseline-parameters';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { unitsParameter } from '@/lib/contracts/api/members';
import { momentumMembers } from '@/lib/contracts/api/momentum-members';

const SHAFT = 'shaft.';

/** The speeds that `shaft.NAME=rpm` parameters give, rpm by shaft. */
export const shaftOf = (parameter: string): string | null =>
  parameter.startsWith(SHAFT) ? parameter.slice(SHAFT.length) : null;

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

export const momentumQuery = z
  .object({
    build: buildParameter,
    units: unitsParameter,
    point: z.string().optional().describe('Code of an operating point of the baseline'),
    'shaft.NAME': z
      .string()
      .optional()
      .describe(
        'Instead of `point`: the speed in rpm of the shaft NAME, once for every shaft of the baseline',
      ),
  })
  .catchall(z.string());

export const rpmSchema = z
  .string()
  .regex(NUMBER, 'Write the speed in rpm as a number with a decimal point.')
  .transform(Number)
  .refine((rpm) => Number.isFinite(rpm) && Math.abs(rpm) <= 1e7, 'The speed is beyond 1e7 rpm.');

export const angularMomentumSchema = z
  .object({
    ...headMembers,
    conventions: documentConventions,
    operatingPoint: z.string().nullable().describe('null where the speeds came with the request'),
    ...momentumMembers,
  })
  .meta({
    id: 'AngularMomentum',
    description: 'Angular momentum of the rotating parts of a signed baseline',
  });

const { program, baseline, build, state, title, digest, marking, caution, conventions, operatingPoints } =
  documentExample;
const [{ code, ...momentum }] = operatingPoints as [(typeof operatingPoints)[number]];

export const angularMomentumEndpoint = {
  method: 'get',
  path: '/programs/{program}/baselines/{number}/angular-momentum',
  operationId: 'getAngularMomentum',
  summary: 'Get h and G at an operating point or at given shaft speeds',
  description:
    'Angular momentum h and gyroscopic matrix G of the rotating parts, in body axes by the right-hand rule: at an operating point of ' +
    'the baseline (`point`), or at speeds of your own (`shaft.NAME=rpm` for every shaft; negative turns the other way).',
  scope: 'baselines:read',
  pathParameters: baselinePath,
  query: momentumQuery,
  headers: ifNoneMatch,
  answers: {
    200: {
      description: 'h and G',
      schema: angularMomentumSchema,
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
        operatingPoint: code,
        ...momentum,
      },
      headers: ETAG,
    },
  },
  bare: NOT_MODIFIED,
  problems: ['not-found', 'forbidden', 'gone', 'invalid-input'],
} as const satisfies Endpoint;
