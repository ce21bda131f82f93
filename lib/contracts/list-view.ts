import { z } from 'zod';
import { LIST_COLUMNS, type ListColumn } from '@/lib/ingest/mass-list/columns';
import { CATEGORIES } from '@/lib/mass/component';

const OWN = 'own:';
/** A column of the list's own, told from those of the contract. */
export type OwnColumn = `${typeof OWN}${string}`;
export const ownColumn = (name: string): OwnColumn => `${OWN}${name}`;

/** The name of an own column in its list; null for a column of the contract. */
export function nameOfOwn(column: string): string | null {
  return column.startsWith(OWN) ? column.slice(OWN.length) : null;
}

/** A column by which the rows of a list can be put in order; `position` is the order of the list itself. */
export type SortColumn = 'position' | ListColumn | OwnColumn;

/** Columns of the contract by whose values rows can be put into groups. */
export const GROUPING_COLUMNS = [
  'group',
  'category',
  'maturity',
  'status',
  'part_number',
  'parent',
  'source',
  'counting',
] as const satisfies readonly ListColumn[];
export type GroupingColumn = (typeof GROUPING_COLUMNS)[number] | OwnColumn;

const LONGEST_NAME = 300;

/** The column that a text names, for ordering rows; undefined where there is none. */
export function sortColumnOf(text: string): SortColumn | undefined {
  const own = nameOfOwn(text);
  if (own !== null) return own === '' || own.length > LONGEST_NAME ? undefined : ownColumn(own);
  return text === 'position' ? text : LIST_COLUMNS.find((name) => name === text);
}

/** The column that a text names, for grouping rows; undefined where there is none. */
export function groupingOf(text: string): GroupingColumn | undefined {
  const own = nameOfOwn(text);
  if (own !== null) return own === '' || own.length > LONGEST_NAME ? undefined : ownColumn(own);
  return GROUPING_COLUMNS.find((name) => name === text);
}

const sort = z.string().transform((text, context) => {
  const column = sortColumnOf(text.replace(/^-/, ''));
  if (column === undefined) {
    context.addIssue({ code: 'custom', message: 'There is no such column to sort by.' });
    return z.NEVER;
  }
  return { column, descending: text.startsWith('-') };
});

const where = z.string().transform((text, context) => {
  const column = groupingOf(text);
  if (column === undefined) {
    context.addIssue({ code: 'custom', message: 'There is no such column to choose rows by.' });
    return z.NEVER;
  }
  return column;
});

/**
 * Which rows of a list are shown and in which order: what stands in the address of a list's page and of its exports. `find` is
 * a text, `group` takes in all groups below it, `where` names a column and `is` the value that its rows have (empty: blank),
 * `finding` is the id of a rule and keeps the rows that its finding names, `sort` a column, with `-` before it downwards.
 * What cannot be read is left out.
 */
export const listViewSchema = z.object({
  find: z.string().trim().max(200).catch(''),
  group: z.string().trim().max(1000).catch(''),
  where: where.or(z.literal('')).catch(''),
  is: z.string().max(10_000).catch(''),
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

/** The members of a view that leave rows out, as they stand in an address; `is` goes with `where`. */
export const FILTER_KEYS = ['find', 'group', 'where', 'category', 'counting', 'finding'] as const;

/** Whether a view leaves rows out. */
export function isFiltered(view: Pick<ListView, (typeof FILTER_KEYS)[number]>): boolean {
  return FILTER_KEYS.some((key) => view[key] !== '');
}

/** Of an address, what tells which rows are shown and in which order; in a fixed order, so that equal views are equal texts. */
export function viewQuery(params: Pick<URLSearchParams, 'get'>): string {
  const kept = new URLSearchParams();
  for (const key of [...FILTER_KEYS, 'is', 'sort'] as const) {
    const value = params.get(key);
    if (value && (key !== 'is' || params.get('where'))) kept.set(key, value);
  }
  return kept.toString();
}

/** A view without what it asks of one column: what its groups by that column are made of. */
export function withoutFilterOn(view: ListView, by: GroupingColumn): ListView {
  if (by === 'group') return { ...view, group: '' };
  const plain = view.where === by ? { ...view, where: '' as const, is: '' } : view;
  if (by === 'category') return { ...plain, category: '' };
  return by === 'counting' ? { ...plain, counting: '' } : plain;
}
