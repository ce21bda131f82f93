import { z } from 'zod';
import { LIST_COLUMNS } from '@/lib/ingest/mass-list/columns';

const cell = z.union([z.string(), z.number()]);

/** A row as its list states it: figures in the list's own units, signs and axes; blank cells are left out. */
export const listRowSchema = z.object({
  cells: z.partialRecord(z.enum(LIST_COLUMNS), cell),
  own: z.record(z.string(), z.string()).describe("The list's own columns"),
});
export type ListRow = z.output<typeof listRowSchema>;

/** Sums over rows that are counted and approved, mirror images included. */
export const rowTotalsSchema = z.object({
  rows: z.number().int(),
  pieces: z.number(),
  mass: z.number().describe("In the list's mass unit"),
  cg: z
    .tuple([z.number(), z.number(), z.number()])
    .nullable()
    .describe("In the list's axes and length unit; null where there is no mass above zero"),
  memoRows: z.number().int().describe('Shown and not summed'),
  waitingRows: z.number().int().describe('Pending and potential adjustments, not summed'),
});
export type RowTotals = z.output<typeof rowTotalsSchema>;

export const rowPageSchema = z.object({
  offset: z.number().int(),
  total: z.number().int().describe('Rows in this view'),
  rows: z.array(listRowSchema),
});
export type RowPage = z.output<typeof rowPageSchema>;

export const ROWS_PER_PAGE = 200;

const LAST_OFFSET = 1_000_000_000;

/** How many rows of a view stand before a page, from a query: a whole number, 0 where it names none. */
export function offsetOf(text: string | null): number {
  const asked = Math.trunc(Number(text ?? 0));
  return Number.isNaN(asked) ? 0 : Math.min(Math.max(0, asked), LAST_OFFSET);
}
