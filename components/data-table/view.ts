/** What a reader has made of a table: kept in the page's address, so that it can be sent on and gone back to. */
export interface TableView {
  readonly sort: { readonly column: string; readonly descending: boolean } | null;
  readonly text: string;
  /** A group path; its subgroups are included. Empty: all groups. */
  readonly group: string;
  readonly subtotals: boolean;
  readonly hidden: readonly string[];
  /** Columns chosen, in order; none: all that are not hidden, in their own order. */
  readonly shown: readonly string[];
  /** The column by whose values a page puts the rows into groups. Empty: as the page has it. */
  readonly by: string;
  /** The value that rows have in a column; empty: rows where it is blank. */
  readonly only: { readonly column: string; readonly value: string } | null;
  /** Groups whose subgroups are in sight; `*` for all. */
  readonly unfolded: readonly string[];
  /** The id of the row that the inspector shows. */
  readonly open: string | null;
}

export const PLAIN_VIEW: TableView = {
  sort: null,
  text: '',
  group: '',
  subtotals: false,
  hidden: [],
  shown: [],
  by: '',
  only: null,
  unfolded: [],
  open: null,
};

const KEYS = [
  'sort',
  'find',
  'group',
  'subtotals',
  'hide',
  'show',
  'by',
  'where',
  'is',
  'unfold',
  'row',
] as const;

/** The view that an address asks for. */
export function viewFromParams(params: Pick<URLSearchParams, 'get' | 'getAll'>): TableView {
  const sort = params.get('sort') ?? '';
  const where = params.get('where') ?? '';
  const descending = sort.startsWith('-');
  const column = descending ? sort.slice(1) : sort;
  return {
    sort: column ? { column, descending } : null,
    text: params.get('find') ?? '',
    group: params.get('group') ?? '',
    subtotals: params.get('subtotals') === 'yes',
    hidden: params.getAll('hide'),
    shown: params.getAll('show'),
    by: params.get('by') ?? '',
    only: where === '' ? null : { column: where, value: params.get('is') ?? '' },
    unfolded: params.getAll('unfold'),
    open: params.get('row'),
  };
}

/** `params` with this view in it; what is as plain leaves no trace, what belongs to others stays. */
export function paramsWithView(params: URLSearchParams, view: TableView): URLSearchParams {
  const next = new URLSearchParams(params);
  for (const key of KEYS) next.delete(key);
  if (view.sort) next.set('sort', `${view.sort.descending ? '-' : ''}${view.sort.column}`);
  if (view.text) next.set('find', view.text);
  if (view.group) next.set('group', view.group);
  if (view.subtotals) next.set('subtotals', 'yes');
  for (const column of view.hidden) next.append('hide', column);
  for (const column of view.shown) next.append('show', column);
  if (view.by) next.set('by', view.by);
  if (view.only) next.set('where', view.only.column);
  if (view.only?.value) next.set('is', view.only.value);
  for (const group of view.unfolded) next.append('unfold', group);
  if (view.open !== null) next.set('row', view.open);
  return next;
}

/** A column's head pressed: ascending, then descending, then the order of the file. */
export function nextSort(sort: TableView['sort'], column: string): TableView['sort'] {
  if (sort?.column !== column) return { column, descending: false };
  return sort.descending ? null : { column, descending: true };
}

/** Whether a group path lies in another, or is it. */
export function inGroup(path: string, group: string): boolean {
  return group === '' || path === group || path.startsWith(`${group}/`);
}

/** The columns that a view shows, in its order; the first of the table always is, and stays first. */
export function columnsShown<Column extends { readonly id: string }>(
  columns: readonly Column[],
  { shown, hidden }: Pick<TableView, 'shown' | 'hidden'>,
  usual: (column: Column) => boolean = () => true,
): readonly Column[] {
  const [first] = columns;
  if (first === undefined) return [];
  if (shown.length === 0)
    return columns.filter((one) => one === first || (usual(one) && !hidden.includes(one.id)));
  const chosen = [...new Set(shown)].flatMap((id) => columns.find((one) => one.id === id) ?? []);
  return [first, ...chosen.filter((one) => one !== first)];
}
