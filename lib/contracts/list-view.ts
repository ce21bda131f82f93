import { z } from 'zod';
import { CATEGORIES } from '@/lib/mass/component';

/** The columns by which the rows of a list can be put in order; `position` is the order of the list itself. */
export const SORT_COLUMNS = [
  'position',
  'item',
  'part_number',
  'description',
  'group',
  'category',
  'quantity',
  'mass',
  'x',
  'y',
  'z',
  'ixx',
  'iyy',
  'izz',
  'ixy',
  'ixz',
  'iyz',
  'maturity',
  'growth_percent',
] as const;
export type SortColumn = (typeof SORT_COLUMNS)[number];

const sort = z.string().transform((text, context) => {
  const column = SORT_COLUMNS.find((name) => name === text.replace(/^-/, ''));
  if (column === undefined) {
    context.addIssue({ code: 'custom', message: 'There is no such column to sort by.' });
    return z.NEVER;
  }
  return { column, descending: text.startsWith('-') };
});

/**
 * Which rows of a list are shown and in which order: what stands in the address of a list's page and of its exports. `find` is
 * a text, `group` takes in all groups below it, `finding` is the id of a rule and keeps the rows that its finding names,
 * `sort` a column, with `-` before it downwards. What cannot be read is left out.
 */
export const listViewSchema = z.object({
  find: z.string().trim().max(200).catch(''),
  group: z.string().trim().max(1000).catch(''),
  category: z.enum(['', ...CATEGORIES]).catch(''),
  counting: z.enum(['', 'counted', 'memo']).catch(''),
  finding: z.string().max(100).catch(''),
  sort: sort.catch({ column: 'position', descending: false }),
});
export type ListView = z.output<typeof listViewSchema>;

/** The view that an address asks for. */
export function listViewOf(params: URLSearchParams): ListView {
  return listViewSchema.parse(Object.fromEntries(params));
}

/** The members of a view that leave rows out, as they stand in an address. */
export const FILTER_KEYS = ['find', 'group', 'category', 'counting', 'finding'] as const;

/** Whether a view leaves rows out. */
export function isFiltered(view: Pick<ListView, (typeof FILTER_KEYS)[number]>): boolean {
  return FILTER_KEYS.some((key) => view[key] !== '');
}

/** Of an address, what tells which rows are shown and in which order; in a fixed order, so that equal views are equal texts. */
export function viewQuery(params: Pick<URLSearchParams, 'get'>): string {
  const kept = new URLSearchParams();
  for (const key of [...FILTER_KEYS, 'sort'] as const) {
    const value = params.get(key);
    if (value) kept.set(key, value);
  }
  return kept.toString();
}
