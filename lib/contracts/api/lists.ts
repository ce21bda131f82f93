import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { listParameter, programParameter } from '@/lib/contracts/api/parameters';
import { titleSchema } from '@/lib/contracts/codes';
import { listDeclarationsSchema } from '@/lib/contracts/list-declarations';

const frameIssue = z
  .number()
  .int()
  .min(1)
  .describe(
    'Number of the frame issue that coming revisions are stated in. Left out, the one in force for a new list, else the one it has',
  );

/** A list as it is to be. Members that do not exist are refused: a mistyped one would leave a default in force unseen. */
export const listBodySchema = z.strictObject({
  title: titleSchema.describe('For people, at most 200 characters'),
  ...listDeclarationsSchema.shape,
  frame_issue: frameIssue.optional(),
});

export const listSchema = z
  .object({
    program: z.string().describe('Code of the program'),
    list: z.string().describe('Code of the list'),
    title: z.string(),
    ...listDeclarationsSchema.shape,
    frame_issue: frameIssue.optional().describe('As it was sent; absent where it was not'),
  })
  .meta({ id: 'List', description: "A mass list and what it declares, in the list's own units" });

const declarations = {
  title: 'Wing structure',
  mass_unit: 'kg',
  length_unit: 'm',
  inertia_unit: 'kg.m2',
  products: 'positive',
  axes: ['aft', 'right', 'up'],
  frame: { origin: { x: 11.2, y: 0, z: 3.1 }, yaw: 0, pitch: 0, roll: 0 },
  kind: 'components',
  extent: 'whole',
  uncertainty: '1sigma',
  marking: null,
};
const example = { program: 'dunlin-40', list: 'wing-structure', ...declarations };

export const saveListEndpoint = {
  method: 'put',
  path: '/programs/{program}/lists/{list}',
  operationId: 'saveList',
  summary: 'Create a mass list, or change its declarations',
  description:
    'Creates the list, or changes title and declarations for the revisions to come; those that exist keep what they were read ' +
    'with. The three units have no default. Members left out take their defaults, also in a list that exists. A new list is stated ' +
    "in the program's frame issue in force unless another is named; where a configuration stands in another, it is converted.",
  scope: 'lists:write',
  pathParameters: z.object({ program: programParameter, list: listParameter }),
  body: {
    type: 'application/json',
    description: 'Title and declarations. At most 1 MiB',
    schema: listBodySchema,
    example: declarations,
  },
  answers: {
    200: { description: 'Changed', schema: listSchema, example },
    201: { description: 'Created', schema: listSchema, example },
  },
  problems: [
    'invalid-request',
    'forbidden',
    'not-found',
    'conflict',
    'length-required',
    'too-large',
    'unsupported-media-type',
    'invalid-input',
  ],
} as const satisfies Endpoint;
