import { z } from 'zod';
import { stampSchema, stateSchema } from '@/lib/contracts/api/baseline-list';
import {
  baselinePath,
  buildParameter,
  ETAG,
  ifNoneMatch,
  NOT_MODIFIED,
} from '@/lib/contracts/api/baseline-parameters';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import {
  conditionMembers,
  conventionsSchema,
  placeSchema,
  unitsParameter,
} from '@/lib/contracts/api/members';
import { limitSchema } from '@/lib/contracts/api/limit';
import { momentumMembers } from '@/lib/contracts/api/momentum-members';
import documentExample from './baseline-example.json';

export const baselineQuery = z.strictObject({ build: buildParameter, units: unitsParameter });

const sigmaSchema = z
  .object({
    mass: z.number(),
    cg: z.object({ x: z.number(), y: z.number(), z: z.number() }).describe('Airframe axes; unit of length'),
    inertia: z
      .object({
        ixx: z.number(),
        iyy: z.number(),
        izz: z.number(),
        ixy: z.number(),
        ixz: z.number(),
        iyz: z.number(),
      })
      .describe('Body axes; unit of inertia'),
    massShare: z
      .number()
      .describe('Share of the mass, 0 to 1, whose rows state an uncertainty; the rest counts as certain'),
  })
  .describe('One standard deviation of the basic results, to first order. Absent where no row states any');

export const conditionSchema = z
  .object({
    code: z.string(),
    title: z.string(),
    ...conditionMembers,
    sigma: sigmaSchema.optional(),
  })
  .meta({ id: 'Condition', description: 'One loading of the configuration' });

/** What every answer made from a baseline says of it. */
export const headMembers = {
  program: z.string(),
  baseline: z.number().int(),
  build: z.string(),
  state: stateSchema,
  title: z.string(),
  digest: z
    .string()
    .describe('`sha256:` over the canonical JSON (RFC 8785) of the SI document without `digest` and `state`'),
  marking: z.string().nullable().describe('Markings of the lists it is made of; goes with every copy'),
  caution: z.string(),
};

export const documentConventions = z.object({
  ...conventionsSchema.shape,
  frameIssue: z.string().describe('Number and title of the issue of the airframe frame'),
});

export const baselineDocumentSchema = z
  .object({
    format: z.literal(1),
    ...headMembers,
    supersedes: z.number().int().nullable(),
    submitted: stampSchema,
    approved: stampSchema,
    conventions: documentConventions,
    referencePoints: z.array(z.object({ code: z.string(), airframe: placeSchema })),
    conditions: z.array(conditionSchema),
    limits: z.array(limitSchema).optional(),
    operatingPoints: z.array(z.object({ code: z.string(), ...momentumMembers })),
    findings: z.array(
      z.object({
        rule: z.string(),
        severity: z.enum(['warning', 'note']),
        message: z.string().describe('What was seen, in a sentence; figures in it are SI, with any `units`'),
        answer: z.string().optional().describe("The submitter's answer to a warning"),
      }),
    ),
    sources: z.array(
      z.object({
        list: z.string(),
        revision: z.number().int(),
        sha256: z.string().describe('Over the declarations and rows of the revision'),
        fileSha256: z
          .string()
          .optional()
          .describe('Of the uploaded file; absent where the revision was edited in the browser'),
        rows: z.number().int(),
        converted: z
          .object({
            frameIssue: z.string().describe('Number and title of the issue that the list is stated in'),
            datum: z
              .object({ airframe: placeSchema })
              .describe('Datum of that issue, from the datum of this document'),
            matrix: z
              .array(z.array(z.number()).length(3))
              .length(3)
              .describe('r = datum + matrix r_stated, airframe axes; det is -1 where handedness differs'),
          })
          .optional()
          .describe(
            'How the list was converted; absent where it is stated in the frame issue of the document',
          ),
      }),
    ),
  })
  .meta({ id: 'Baseline', description: 'The hand-off document of a signed baseline' });

export const baselineEndpoint = {
  method: 'get',
  path: '/programs/{program}/baselines/{number}',
  operationId: 'getBaseline',
  summary: 'Get a signed baseline',
  description:
    'The hand-off document as it was made at signing. In SI it is the very text that the digest covers, with `digest` and `state` ' +
    'added. `current` answers 410 while the newest baseline of the build is withdrawn: an older one never takes its place.',
  scope: 'baselines:read',
  pathParameters: baselinePath,
  query: baselineQuery,
  headers: ifNoneMatch,
  answers: {
    200: {
      description: 'The hand-off document',
      schema: baselineDocumentSchema,
      example: documentExample,
      headers: ETAG,
    },
  },
  bare: NOT_MODIFIED,
  problems: ['not-found', 'forbidden', 'gone', 'invalid-input'],
} as const satisfies Endpoint;
