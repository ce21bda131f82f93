import { z } from 'zod';
import { DIRECTIONS } from '@/lib/frames/axes';
import { UNIT_SYSTEMS } from '@/lib/units/names';

/*
 * The members that answers with mass properties share, and what they mean; lib/contracts/condition-members.ts makes them. Units
 * follow `conventions.units`: kg, m, kg.m2, or with `?units=us` lb, in, slug.ft2.
 */

const three = (description: string) => z.array(z.number()).length(3).describe(description);

export const unitsParameter = z
  .enum(UNIT_SYSTEMS)
  .default('si')
  .describe(
    'si: kg, m, kg.m2; us: lb (mass), in, slug.ft2. The answer says its units in `conventions.units`',
  );

export const placeSchema = z
  .object({ x: z.number(), y: z.number(), z: z.number() })
  .meta({ id: 'Place', description: 'From the datum, along the axes of the airframe frame; unit of length' });

export const inertiaSchema = z
  .object({
    ixx: z.number().describe('∫(y² + z²) dm'),
    iyy: z.number().describe('∫(z² + x²) dm'),
    izz: z.number().describe('∫(x² + y²) dm'),
    ixy: z.number().describe('+∫xy dm, the positive integral'),
    ixz: z.number().describe('+∫xz dm, the positive integral'),
    iyz: z.number().describe('+∫yz dm, the positive integral'),
    tensor: z
      .array(z.array(z.number()).length(3))
      .length(3)
      .describe(
        '[[ixx, -ixy, -ixz], [-ixy, iyy, -iyz], [-ixz, -iyz, izz]]: off-diagonals are minus the products',
      ),
  })
  .meta({
    id: 'Inertia',
    description:
      'Moments and products about the CG in body axes (x forward, y right, z down); unit of inertia',
  });

const principalSchema = z
  .object({
    moments: three('In the order of the body axes that the principal axes are nearest to; unit of inertia'),
    axes: z
      .array(z.array(z.number()).length(3))
      .length(3)
      .describe('Row i is principal axis i in body components; the rows are right-handed'),
  })
  .meta({ id: 'Principal', description: 'Principal moments of inertia and their axes' });

const massSchema = z.number().describe('Unit of mass');
const cgSchema = z.object({
  airframe: placeSchema,
  percentMac: z.number().optional().describe('% of the mean aerodynamic chord aft of its leading edge'),
});
const radiiSchema = z
  .object({ x: z.number(), y: z.number(), z: z.number() })
  .describe('sqrt(I/m) about the body axes; unit of length');

const properties = {
  cg: cgSchema.optional().describe('Absent where the mass is zero or less, as are the members below'),
  inertia: inertiaSchema.optional(),
  principal: principalSchema.optional(),
  radiiOfGyration: radiiSchema.optional(),
};

/** Members of a condition, and of a roll-up. */
export const conditionMembers = {
  basis: z.literal('basic').describe('mass, cg, inertia and principal are without mass growth allowance'),
  mass: massSchema,
  predictedMass: massSchema.describe('With mass growth allowance; unit of mass'),
  ...properties,
  predicted: z
    .object({ mass: massSchema, ...properties })
    .describe('The same with mass growth allowance: mass, CG and tensor all differ'),
};

export const groupSchema = z
  .object({
    group: z.string().describe('Path of the group, levels separated by /'),
    rows: z.number().int().describe('Rows that are summed, without those of groups below it'),
    mass: massSchema,
    cg: z.object({ airframe: placeSchema }).optional(),
    inertia: inertiaSchema.optional().describe("About the group's own CG"),
  })
  .meta({ id: 'Group', description: 'Subtotal of a group; no CG where its mass is zero or less' });

export const findingSchema = z
  .object({
    rule: z.string().describe('Stable name of the rule'),
    severity: z.enum(['blocker', 'warning', 'note']),
    message: z.string().describe('What was seen, in a sentence; figures in it are SI'),
    rows: z.array(z.string()).describe('Items concerned, the first 200'),
    count: z.number().int().describe('How many are concerned'),
  })
  .meta({ id: 'Finding', description: 'What a check saw. Findings never refuse a roll-up' });

export const conventionsSchema = z
  .object({
    bodyAxes: z.string(),
    products: z.string(),
    tensor: z.string(),
    spin: z.string(),
    airframeAxes: z
      .object({ x: z.enum(DIRECTIONS), y: z.enum(DIRECTIONS), z: z.enum(DIRECTIONS) })
      .describe('Where the axes of the airframe frame point'),
    incidenceDeg: z.number().describe('Body x nose-up from the reference line, deg'),
    airframeToBody: z
      .array(z.array(z.number()).length(3))
      .length(3)
      .describe(
        'Rows are the body axes in airframe components: v_body = A v_airframe; det is -1 from a left-handed frame',
      ),
    units: z.object({
      mass: z.enum(['kg', 'lb']),
      length: z.enum(['m', 'in']),
      inertia: z.enum(['kg.m2', 'slug.ft2']),
      angularMomentum: z.enum(['kg.m2/s', 'slug.ft2/s']),
    }),
  })
  .meta({ id: 'Conventions', description: 'Frames, signs and units of the numbers in this answer' });
