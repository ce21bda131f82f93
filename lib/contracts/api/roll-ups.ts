import { z } from 'zod';
import { CAUTION } from '@/lib/baselines/caution';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import {
  conditionMembers,
  conventionsSchema,
  findingSchema,
  groupSchema,
  unitsParameter,
} from '@/lib/contracts/api/members';
import { conventionsOf, groupMember, rollUpMembers } from '@/lib/contracts/condition-members';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { ROLL_UP_BYTES } from '@/lib/ingest/limits';
import { type ListRollUp } from '@/lib/ingest/roll-up-list';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type UnitSystem } from '@/lib/units/names';
import rollUpExample from './roll-up-example.json';

const NUMBER = /^\s*[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?\s*$/i;

/** A number as a query has it: text with a decimal point. */
const queryNumber = z.preprocess(
  (value) => (typeof value === 'string' && NUMBER.test(value) ? Number(value) : value),
  z.number({ error: 'Write a number, with a decimal point.' }),
);
const coordinate = (axis: 'x' | 'y' | 'z') =>
  queryNumber
    .default(0)
    .describe(`${axis} of the origin of the list's frame, in airframe components and the list's length_unit`);
const angle = (name: string) =>
  queryNumber.default(0).describe(`${name} of the list's frame in the airframe frame, deg`);

/** The declarations of a list in a query; the members of `frame` stand flat. */
export const rollUpQuerySchema = z.strictObject({
  ...listDeclarationsSchema.omit({ frame: true, marking: true }).shape,
  origin_x: coordinate('x'),
  origin_y: coordinate('y'),
  origin_z: coordinate('z'),
  yaw: angle('yaw'),
  pitch: angle('pitch'),
  roll: angle('roll'),
  marking: z
    .string()
    .trim()
    .min(1)
    .max(200)
    .optional()
    .describe('Text that stands on the answer, e.g. proprietary'),
  units: unitsParameter,
});

export type RollUpQuery = z.output<typeof rollUpQuerySchema>;

/** What a query declares, in SI, as the engine takes it. */
export function declarationsOfQuery(query: RollUpQuery): ListDeclarations {
  const { origin_x: x, origin_y: y, origin_z: z, yaw, pitch, roll, marking = null } = query;
  const frame = { origin: { x, y, z }, yaw, pitch, roll };
  return declarationsFromBody(listDeclarationsSchema.parse({ ...query, frame, marking }));
}

export const rollUpSchema = z
  .object({
    marking: z.string().nullable().describe('What the list is marked; goes with every copy of this answer'),
    rows: z.number().int().describe('Rows that are summed'),
    memoRows: z.number().int().describe('Rows with `counting` memo: shown, not summed'),
    pieces: z
      .number()
      .int()
      .describe('Sum of `quantity`, twice for a row that also stands for its mirror image'),
    ...conditionMembers,
    groups: z.array(groupSchema).describe('In the order of their paths'),
    findings: z.array(findingSchema).describe('Blockers first, then warnings, then notes'),
    conventions: conventionsSchema,
    caution: z.string().describe('What the numbers are not'),
  })
  .meta({ id: 'RollUp', description: 'One mass list rolled up about its CG' });

/** The answer for a list that has been rolled up. */
export function rollUpAnswer(
  { rollUp, geometry, findings }: ListRollUp,
  { marking }: Pick<ListDeclarations, 'marking'>,
  system: UnitSystem,
): z.output<typeof rollUpSchema> {
  return rollUpSchema.parse({
    marking,
    rows: rollUp.rows,
    memoRows: rollUp.memoRows,
    pieces: rollUp.pieces,
    ...rollUpMembers(rollUp, system),
    groups: rollUp.groups.map((group) => groupMember(group, system)),
    findings,
    conventions: conventionsOf(geometry, system, 0),
    caution: CAUTION,
  });
}

/** Two rows of an invented aircraft. */
const EXAMPLE_CSV = `item,description,group,mass,x,y,z,ixx,iyy,izz,symmetry,growth_percent
FUS-01,Fuselage shell,Fuselage,3000,8,0,2,3000,24000,24000,,0
NAC-01,Nacelle with engine,Propulsion/Nacelles,500,4,3,2,100,500,500,pair,0
`;

export const rollUpEndpoint = {
  method: 'post',
  path: '/roll-ups',
  operationId: 'rollUp',
  summary: 'Roll up a mass list without storing it',
  description:
    'Takes a component mass list as CSV and its declarations in the query; answers mass, CG, inertia, principal axes, group ' +
    'subtotals and findings. Nothing is stored. The airframe frame has the axis words of the list, its plane of symmetry at 0 and ' +
    'no chord; body axes have no incidence. Growth is what rows state; rows that state none are predicted as they are. Of a list of ' +
    'kind adjustments the approved rows count. A file with errors answers 422 and no roll-up; findings never do.',
  scope: 'any',
  query: rollUpQuerySchema,
  body: {
    type: 'text/csv',
    description: 'A component mass list: UTF-8, one header row, comma, semicolon or tab. At most 32 MiB',
    maxBytes: ROLL_UP_BYTES,
    example: EXAMPLE_CSV,
  },
  answers: {
    200: { description: 'The list rolled up', schema: rollUpSchema, example: rollUpExample },
  },
  problems: ['invalid-request', 'length-required', 'too-large', 'unsupported-media-type', 'invalid-input'],
} as const satisfies Endpoint;
