import { z } from 'zod';
import { FILTER_KEYS } from './list-view';

/** Members of an address that a saved view keeps: rows, order, columns, grouping. Not the revision, nor the row that is open. */
const KEPT = [...FILTER_KEYS, 'is', 'sort', 'by', 'hide', 'show', 'unfold'] as const;
const LONGEST_QUERY = 4000;
export const MOST_VIEWS = 100;

/** What a saved view keeps of an address, in a fixed order. */
export function savedQuery(params: URLSearchParams): string {
  const kept = new URLSearchParams();
  for (const key of KEPT) for (const value of params.getAll(key)) if (value !== '') kept.append(key, value);
  return kept.toString();
}

const name = z
  .string()
  .trim()
  .min(1, 'Give the view a name.')
  .max(80, 'A name has at most 80 characters.')
  .regex(/^\P{Cc}*$/u, 'A name is one line.');

export const saveViewSchema = z.object({
  name,
  query: z
    .string()
    .max(3 * LONGEST_QUERY)
    .transform((query) => savedQuery(new URLSearchParams(query)))
    .refine((query) => query.length <= LONGEST_QUERY, 'This view is too long to be kept.'),
});
export type SaveView = z.output<typeof saveViewSchema>;

export const renameViewSchema = z.object({ name });

export const savedViewSchema = z.object({ id: z.string(), name: z.string(), query: z.string() });
export type SavedView = z.output<typeof savedViewSchema>;
export const savedViewsSchema = z.array(savedViewSchema);
