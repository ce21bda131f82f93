import {
  type Expression,
  type RawBuilder,
  type Selectable,
  type SelectQueryBuilder,
  type SqlBool,
  sql,
} from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';
import { type RowVersionsTable } from '@/db/schema/lists';
import { type GroupingColumn, nameOfOwn, type SortColumn } from '@/lib/contracts/list-view';
import { type ListColumn, VALUES } from '@/lib/ingest/mass-list/columns';
import { type Category, type Counting } from '@/lib/mass/component';
import { isIn, neededRowRange, type RowRange } from './revision-rows';

type StoredRowVersion = Selectable<RowVersionsTable>;

/** Which rows of a revision; members that are null or empty leave all in. */
export interface RowFilter {
  /** Text that stands in the item, part number, description, source, note or a column of the list's own. */
  readonly text: string;
  /** Group paths as the rows state them. */
  readonly groups: readonly string[] | null;
  /** The value that rows have in a column; empty: none. */
  readonly only: { readonly column: GroupingColumn; readonly value: string } | null;
  readonly category: Category | null;
  readonly counting: Counting | null;
  readonly items: readonly string[] | null;
}

export interface RowOrder {
  readonly column: SortColumn;
  readonly descending: boolean;
}

/** What a column of the contract is in a stored row, where it is not a column of the same name. */
const KEPT_AS: Partial<Record<ListColumn, RawBuilder<unknown>>> = {
  group: sql.ref('row_versions.group_path'),
  growth_percent: sql.ref('row_versions.growth'),
  symmetry: sql`case when row_versions.pair then 'pair' end`,
};

function valueOf(column: SortColumn): RawBuilder<unknown> {
  const own = nameOfOwn(column);
  if (own !== null) return sql`row_versions.extra ->> ${own}::text`;
  if (column === 'position') return sql.ref('row_versions.sort_key');
  const sigma = SIGMA_COLUMNS.findIndex((name) => name === column);
  if (sigma >= 0) return sql`row_versions.sigma[${sql.lit(sigma + 1)}]`;
  return KEPT_AS[column as ListColumn] ?? sql.ref(`row_versions.${column}`);
}

/** The stored uncertainties, in the order in which a row keeps them. */
const SIGMA_COLUMNS = VALUES.map((value): ListColumn => `${value}_sigma`);

/**
 * A page of a view and how many rows the view has. Rows that are equal in the order, or blank, stand in the order of the list,
 * blank ones last. Only what puts rows in order is sorted; the rows themselves are fetched for the page alone.
 */
export async function pageOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  order: RowOrder,
  page: { readonly offset: number; readonly limit: number },
): Promise<{ total: number; rows: StoredRowVersion[] }> {
  const range = await neededRowRange(db, revisionId);
  const keys = chosenRows(db, range, filter).select([
    'row_no',
    'sort_key',
    sql<unknown>`${valueOf(order.column)}`.as('k'),
  ]);
  const direction = order.descending ? sql`desc nulls last` : sql`asc nulls last`;
  const part = sql`limit ${page.limit} offset ${page.offset}`;
  const all = range.lastRow - range.lastEnd;
  if (isEvery(filter)) {
    const { rows } = await sql<StoredRowVersion>`
      select r.* from (${keys} order by k ${direction}, sort_key ${part}) p
      join row_versions r on r.list_no = ${range.listNo} and r.row_no = p.row_no
      order by p.k ${direction}, p.sort_key
    `.execute(db);
    return { total: all, rows };
  }
  // Chosen once, for the page and for the count.
  const { rows } = await sql<StoredRowVersion & { total: number }>`
    with chosen as materialized (${keys})
    select r.*, (select count(*) from chosen) as total
    from (select * from chosen order by k ${direction}, sort_key ${part}) p
    join row_versions r on r.list_no = ${range.listNo} and r.row_no = p.row_no
    order by p.k ${direction}, p.sort_key
  `.execute(db);
  const total = rows[0]?.total ?? (page.offset === 0 ? 0 : await countRows(db, revisionId, filter));
  return { total, rows: rows.map(({ total: _, ...row }) => row) };
}

/** The numbers of all rows of a view, in the view's order. */
export async function rowNosOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  order: RowOrder,
): Promise<number[]> {
  const rows = await ordered((await rowsIn(db, revisionId, filter)).select('row_no'), order).execute();
  return rows.map(({ row_no }) => row_no);
}

/** The rows of a revision that have some numbers (`row_no`), in no order. */
export async function rowsAt(db: Db, revisionId: string, rowNos: readonly number[]) {
  return (await rowsIn(db, revisionId))
    .selectAll()
    .where(sql<SqlBool>`row_no = any(${rowNos}::int[])`)
    .execute();
}

export async function countRows(db: Db, revisionId: string, filter: RowFilter): Promise<number> {
  const { count } = await (
    await rowsIn(db, revisionId, filter)
  )
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .executeTakeFirstOrThrow();
  return count;
}

export interface RowSums {
  /** What the rows have in the column that they are summed by; empty for blank, and where they are summed by none. */
  readonly value: string;
  /** Whether these rows also stand for their mirror images. */
  readonly pair: boolean;
  readonly rows: number;
  /** Sum of quantities, mirror images not included. */
  readonly pieces: number;
  /** kg; first moments in kg.m about `near`, list axes. */
  readonly mass: number;
  readonly px: number;
  readonly py: number;
  readonly pz: number;
  /** Rows that are not summed: memo rows, and adjustments that are not approved. */
  readonly memo: number;
  readonly waiting: number;
  /** How many values there are, these and those beyond `most`. */
  readonly of: number;
}

/**
 * Sums of the counted, approved rows of a view, by a column's values and pairs apart; first moments about `near` (m, list axes).
 * Of the values, the `most` of most mass.
 */
export async function sumRows(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  near: readonly [number, number, number],
  by: { readonly column: GroupingColumn; readonly most: number | null } | null = null,
): Promise<RowSums[]> {
  const summed = sql`filter (where counting = 'counted' and status = 'approved')`;
  const sum = (of: RawBuilder<unknown>) => sql<number>`coalesce(sum(${of}) ${summed}, 0)`;
  const moment = (axis: 'x' | 'y' | 'z', from: number) =>
    sum(sql`quantity * mass * (${sql.ref(axis)} - ${from}::float8)`);
  const value = by === null ? sql<string>`''` : sql<string>`coalesce(${valueOf(by.column)}, '')`;
  const range = await neededRowRange(db, revisionId);
  const sums = chosenRows(db, range, filter)
    .select([
      value.as('value'),
      'pair',
      sql<number>`count(*) ${summed}`.as('rows'),
      sum(sql`quantity`).as('pieces'),
      sum(sql`quantity * mass`).as('mass'),
      moment('x', near[0]).as('px'),
      moment('y', near[1]).as('py'),
      moment('z', near[2]).as('pz'),
      sql<number>`count(*) filter (where counting = 'memo')`.as('memo'),
      sql<number>`count(*) filter (where counting = 'counted' and status <> 'approved')`.as('waiting'),
    ])
    .groupBy([sql`1`, 'pair']);
  const { rows } = await sql<RowSums>`
    with sums as materialized (${sums}),
    weights as materialized (select value, sum(abs(mass)) as weight from sums group by value),
    most as (
      select value, weight from weights order by weight desc, value
      limit ${by?.most ?? null}
    )
    select sums.*, (select count(*) from weights) as of
    from most join sums using (value) order by weight desc, value, pair
  `.execute(db);
  return rows;
}

/** The names of the list's own columns that any row of a revision fills, in the order of the alphabet. */
export async function ownColumnsOf(db: Db, revisionId: string): Promise<string[]> {
  const rows = await (
    await rowsIn(db, revisionId)
  )
    .select(sql<string>`jsonb_object_keys(extra)`.as('name'))
    .distinct()
    .where('extra', 'is not', null)
    .orderBy('name')
    .execute();
  return rows.map(({ name }) => name);
}

/** Those of `items` that a revision holds, each with its stored row. */
export async function rowsByItem(db: Db, revisionId: string, items: readonly string[]) {
  if (items.length === 0) return [];
  return (await rowsIn(db, revisionId)).selectAll().where('item', 'in', items).execute();
}

/** The rows of a revision that name one of `parents` as the assembly they belong to. */
export async function childrenOf(db: Db, revisionId: string, parents: readonly string[]) {
  if (parents.length === 0) return [];
  return (await rowsIn(db, revisionId))
    .select(['item', 'parent'])
    .where('parent', 'in', parents)
    .orderBy('sort_key')
    .execute();
}

const EVERY_ROW: RowFilter = {
  text: '',
  groups: null,
  only: null,
  category: null,
  counting: null,
  items: null,
};

function isEvery({ text, groups, only, category, counting, items }: RowFilter): boolean {
  return text === '' && [groups, only, category, counting, items].every((one) => one === null);
}

async function rowsIn(db: Db, revisionId: string, filter = EVERY_ROW) {
  return chosenRows(db, await neededRowRange(db, revisionId), filter);
}

function chosenRows(db: Db, range: RowRange, filter: RowFilter) {
  return db
    .selectFrom('row_versions')
    .where(isIn(range))
    .where((eb) => {
      const conditions: Expression<SqlBool>[] = [];
      if (filter.text !== '') conditions.push(saysText(filter.text));
      if (filter.groups !== null) conditions.push(sql<SqlBool>`group_path = any(${filter.groups})`);
      if (filter.only !== null)
        conditions.push(sql<SqlBool>`coalesce(${valueOf(filter.only.column)}, '') = ${filter.only.value}`);
      if (filter.category !== null) conditions.push(eb('category', '=', filter.category));
      if (filter.counting !== null) conditions.push(eb('counting', '=', filter.counting));
      if (filter.items !== null) conditions.push(sql<SqlBool>`item = any(${filter.items})`);
      return eb.and(conditions);
    });
}

const SEARCHED = ['item', 'part_number', 'description', 'source', 'note', 'change_ref'] as const;

/** Of the list's own columns the values are looked through, not the names; their text as a whole says quickly that none has it. */
function saysText(text: string): Expression<SqlBool> {
  const pattern = `%${text.replace(/[\\%_]/g, '\\$&')}%`;
  const quoted = JSON.stringify(text);
  const inJson = `%${quoted.slice(1, -1).replace(/[\\%_]/g, '\\$&')}%`;
  const anyValue = `$.* ? (@ like_regex ${quoted} flag "iq")`;
  return sql<SqlBool>`(
    ${sql.join(
      SEARCHED.map((column) => sql`${sql.ref(`row_versions.${column}`)} ilike ${pattern}`),
      sql` or `,
    )}
    or (row_versions.extra::text ilike ${inJson} and jsonb_path_exists(row_versions.extra, ${anyValue}::jsonpath))
  )`;
}

function ordered<O>(
  query: SelectQueryBuilder<Database, 'row_versions', O>,
  order: RowOrder,
): SelectQueryBuilder<Database, 'row_versions', O> {
  const direction = order.descending ? sql`desc nulls last` : sql`asc nulls last`;
  return query.orderBy(sql`${valueOf(order.column)} ${direction}`).orderBy('sort_key');
}
