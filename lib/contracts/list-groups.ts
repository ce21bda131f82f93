import { z } from 'zod';
import { rowTotalsSchema } from './list-rows';
import { type GroupingColumn, groupingOf } from './list-view';

const byColumn = z.string().transform((text, context) => {
  const column = groupingOf(text);
  if (column !== undefined) return column;
  context.addIssue({ code: 'custom', message: 'Rows cannot be put into groups by such a column.' });
  return z.NEVER;
});

/** What a list's rows are put into groups by, in an address. */
export const groupingSchema = byColumn.catch('group');

/** The values of a column with what the rows that have them add up to. */
export const rowGroupsSchema = z.object({
  of: z.number().int().describe('How many values there are; of very many, those of most mass are told'),
  groups: z.array(
    rowTotalsSchema.extend({
      value: z.string().describe('Empty: the rows where the column is blank'),
      share: z.number().nullable().describe('Of the mass of all groups; null where that is not above zero'),
    }),
  ),
  whole: rowTotalsSchema,
});
export type RowGroups = z.output<typeof rowGroupsSchema>;
export type RowGroup = RowGroups['groups'][number];

/** The grouping that an address asks for. */
export function groupingAsked(params: Pick<URLSearchParams, 'get'>): GroupingColumn {
  return groupingSchema.parse(params.get('by') ?? 'group');
}
