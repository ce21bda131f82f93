import { z } from 'zod';
import { LIMIT_KINDS, LIMIT_QUANTITIES, LIMIT_SENSES } from '@/lib/loading/limits';

const figure = (description: string) => z.number().optional().describe(description);

/** A limit or target that was in force when the configuration was submitted, as lib/baselines/limit-members.ts makes it. */
export const limitSchema = z
  .object({
    kind: z.enum(LIMIT_KINDS),
    quantity: z
      .enum(LIMIT_QUANTITIES)
      .describe(
        'cgx, cgy, cgz: CG in airframe axes from the datum; ixx ... iyz: about the CG in body axes, products as positive integrals',
      ),
    sense: z.enum(LIMIT_SENSES),
    value: z.number().describe('In `unit`'),
    unit: z.enum(['kg', 'lb', 'm', 'in', 'kg.m2', 'slug.ft2', '% MAC']).describe('Of every figure in here'),
    group: z.string().optional().describe('Path of the group it is about; absent: the whole aircraft'),
    condition: z.string().optional().describe('Condition it is about; absent: every condition'),
    frameIssue: z.number().int().optional().describe('Of a place: the frame issue whose axes it is in'),
    source: z.string(),
    sourceDate: z.string(),
    from: z.string().describe('First day in force'),
    until: z.string().optional().describe('Last day in force'),
    standings: z.array(
      z.object({
        condition: z.string(),
        verdict: z.enum(['within', 'predicted-beyond', 'beyond', 'not-judged', 'no-condition']),
        basic: figure('Without growth'),
        margin: figure('Room from `basic` to the limit, negative beyond it'),
        predicted: figure('With growth'),
        predictedMargin: figure('Room from `predicted` to the limit, negative beyond it'),
        obstacle: z.string().optional().describe('Why it is not judged'),
      }),
    ),
  })
  .meta({ id: 'Limit', description: 'A limit or target, and how every condition stands to it' });
