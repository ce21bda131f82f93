import { z } from 'zod';
import { problemSchema } from '@/lib/contracts/list-imports';
import { LIST_COLUMNS } from '@/lib/ingest/mass-list/columns';
import { type Mapping, dimensionOfColumn } from '@/lib/ingest/mapping/mapping';
import { UNITS_OF } from '@/lib/ingest/mapping/unit-words';

const UNITS = Object.values(UNITS_OF).flat();

const use = z.discriminatedUnion('use', [
  z
    .strictObject({ use: z.literal('column'), column: z.enum(LIST_COLUMNS), unit: z.enum(UNITS).nullable() })
    .refine(
      ({ column, unit }) => unit === null || unitFits(column, unit),
      'This unit is none of what the column measures.',
    ),
  z.strictObject({ use: z.literal('extra') }),
  z.strictObject({ use: z.literal('ignored') }),
]);

/** How a file is read into the columns of the contract; version 1. */
export const mappingSchema = z
  .strictObject({
    version: z.literal(1),
    delimiter: z.enum([',', ';', '\t']).nullable(),
    sheet: z.string().min(1).max(200).nullable(),
    header: z
      .strictObject({ first: z.int().min(1), last: z.int().min(1) })
      .refine(
        ({ first, last }) => first <= last && last - first < 10,
        'The headings stand in at most ten rows.',
      ),
    columns: z
      .array(z.strictObject({ heading: z.string().max(2000), to: use }))
      .min(1)
      .max(256),
    numbers: z
      .strictObject({ decimal: z.enum(['.', ',']), thousands: z.enum(['', ',', '.', ' ', "'"]) })
      .refine(
        ({ decimal, thousands }) => decimal !== thousands,
        'The decimal mark and the thousands separator must differ.',
      ),
    per: z.enum(['piece', 'row']),
    leaveOut: z.strictObject({ totals: z.boolean(), texts: z.boolean(), headings: z.boolean() }),
  })
  .refine(({ delimiter, sheet }) => (delimiter === null) !== (sheet === null), 'A file is text or a sheet.')
  .superRefine(({ columns }, context) => {
    const taken = columns.flatMap(({ to }) => (to.use === 'column' ? [to.column] : []));
    for (const column of ['mass', 'x', 'y', 'z'] as const)
      if (!taken.includes(column))
        context.addIssue({ code: 'custom', path: ['columns'], message: `No column is ${column}.` });
    if (!taken.includes('item') && !taken.includes('part_number'))
      context.addIssue({ code: 'custom', path: ['columns'], message: 'No column is item or part_number.' });
    for (const column of new Set(taken.filter((one, index) => taken.indexOf(one) !== index)))
      context.addIssue({ code: 'custom', path: ['columns'], message: `Two columns are ${column}.` });
  }) satisfies z.ZodType<Mapping>;

export const checkMappingSchema = z.strictObject({ mapping: mappingSchema });
export const importMappedSchema = z.strictObject({ mapping: mappingSchema, acceptTotals: z.boolean() });

const cell = z.union([z.string(), z.number()]);
const row = z.object({ line: z.int(), cells: z.array(cell) });

/** What is seen of a stored file before it is read. */
export const sampleSchema = z.object({
  delimiter: z.enum([',', ';', '\t']).nullable(),
  sheet: z.string().nullable(),
  sheets: z.array(z.string()),
  head: z.array(row),
  tail: z.array(row),
  rows: z.int(),
});

export const totalSchema = z.object({
  line: z.int(),
  heading: z.string(),
  what: z.enum(['mass', 'x', 'y', 'z']),
  unit: z.string(),
  stated: z.number(),
  computed: z.number(),
  agrees: z.boolean(),
});

export const leftOutSchema = z.object({
  line: z.int(),
  why: z.enum(['above the headings', 'totals', 'text alone', 'repeated headings']),
  text: z.string(),
});

/** What reading the whole file by a mapping would give. */
export const mappingCheckSchema = z.object({
  rows: z.int(),
  problems: z.array(problemSchema).describe('The first 200'),
  problemCount: z.int(),
  leftOut: z.array(leftOutSchema).describe('The first 200'),
  leftOutCount: z.int(),
  totals: z.array(totalSchema),
});
export type MappingCheck = z.output<typeof mappingCheckSchema>;

function unitFits(column: (typeof LIST_COLUMNS)[number], unit: string): boolean {
  const dimension = dimensionOfColumn(column);
  return dimension !== null && UNITS_OF[dimension].some((one) => one === unit);
}
