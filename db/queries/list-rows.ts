import { type Expression, type SelectQueryBuilder, type SqlBool, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';
import { type MassRowsTable } from '@/db/schema/lists';
import { type SortColumn } from '@/lib/contracts/list-view';
import { type Category, type Counting } from '@/lib/mass/component';

/** Which rows of a revision; members that are null or empty leave all in. */
export interface RowFilter {
  /** Text that stands in the item, part number, description, source, note or a column of the list's own. */
  readonly text: string;
  /** A group path; the groups below it belong to it. */
  readonly group: string;
  readonly category: Category | null;
  readonly counting: Counting | null;
  readonly items: readonly string[] | null;
}

export interface RowOrder {
  readonly column: SortColumn;
  readonly descending: boolean;
}

const ORDERED_BY: Readonly<Record<SortColumn, keyof MassRowsTable>> = {
  position: 'position',
  item: 'item',
  part_number: 'part_number',
  description: 'description',
  group: 'group_path',
  category: 'category',
  quantity: 'quantity',
  mass: 'mass',
  x: 'x',
  y: 'y',
  z: 'z',
  ixx: 'ixx',
  iyy: 'iyy',
  izz: 'izz',
  ixy: 'ixy',
  ixz: 'ixz',
  iyz: 'iyz',
  maturity: 'maturity',
  growth_percent: 'growth',
};

/** Rows of a revision in an order; rows that are equal in it, or blank, stand in the order of the list, blank ones last. */
export function rowsOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  order: RowOrder,
  page: { readonly offset: number; readonly limit: number },
) {
  return ordered(filtered(db.selectFrom('mass_rows').selectAll(), revisionId, filter), order)
    .limit(page.limit)
    .offset(page.offset)
    .execute();
}

/** The places in the list of all rows of a view, in the view's order. */
export async function positionsOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  order: RowOrder,
): Promise<number[]> {
  const rows = await ordered(
    filtered(db.selectFrom('mass_rows').select('position'), revisionId, filter),
    order,
  ).execute();
  return rows.map(({ position }) => position);
}

/** The rows of a revision at some places, in no order. */
export function rowsAt(db: Db, revisionId: string, positions: readonly number[]) {
  return db
    .selectFrom('mass_rows')
    .selectAll()
    .where('revision_id', '=', revisionId)
    .where(sql<SqlBool>`position = any(${positions}::int[])`)
    .execute();
}

export async function countRows(db: Db, revisionId: string, filter: RowFilter): Promise<number> {
  const { count } = await filtered(
    db.selectFrom('mass_rows').select((eb) => eb.fn.countAll<number>().as('count')),
    revisionId,
    filter,
  ).executeTakeFirstOrThrow();
  return count;
}

export interface RowSums {
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
}

/** Sums of the counted, approved rows of a view, pairs apart; first moments about `near` (m, list axes). */
export function sumRows(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  near: readonly [number, number, number],
): Promise<RowSums[]> {
  const moment = (axis: 'x' | 'y' | 'z', from: number) =>
    sql<number>`sum(quantity * mass * (${sql.ref(axis)} - ${from}::float8))`;
  return filtered(
    db
      .selectFrom('mass_rows')
      .select((eb) => [
        'pair',
        eb.fn.countAll<number>().as('rows'),
        sql<number>`sum(quantity)`.as('pieces'),
        sql<number>`sum(quantity * mass)`.as('mass'),
        moment('x', near[0]).as('px'),
        moment('y', near[1]).as('py'),
        moment('z', near[2]).as('pz'),
      ])
      .where('counting', '=', 'counted')
      .where('status', '=', 'approved')
      .groupBy('pair'),
    revisionId,
    filter,
  ).execute();
}

/** How many rows of a view are not summed: memo rows, and adjustments that are not approved. */
export function unsummedRows(
  db: Db,
  revisionId: string,
  filter: RowFilter,
): Promise<{ memo: number; waiting: number }> {
  return filtered(
    db
      .selectFrom('mass_rows')
      .select([
        sql<number>`count(*) filter (where counting = 'memo')`.as('memo'),
        sql<number>`count(*) filter (where counting = 'counted' and status <> 'approved')`.as('waiting'),
      ]),
    revisionId,
    filter,
  ).executeTakeFirstOrThrow();
}

/** The names of the list's own columns that any row of a revision fills, in the order of the alphabet. */
export async function ownColumnsOf(db: Db, revisionId: string): Promise<string[]> {
  const { rows } = await sql<{ name: string }>`
    select distinct jsonb_object_keys(extra) as name from mass_rows
    where revision_id = ${revisionId} and extra is not null order by name
  `.execute(db);
  return rows.map(({ name }) => name);
}

/** Those of `items` that a revision holds, each with its stored row. */
export function rowsByItem(db: Db, revisionId: string, items: readonly string[]) {
  if (items.length === 0) return Promise.resolve([]);
  return db
    .selectFrom('mass_rows')
    .selectAll()
    .where('revision_id', '=', revisionId)
    .where('item', 'in', items)
    .execute();
}

/** The rows of a revision that name one of `parents` as the assembly they belong to. */
export function childrenOf(db: Db, revisionId: string, parents: readonly string[]) {
  if (parents.length === 0) return Promise.resolve([]);
  return db
    .selectFrom('mass_rows')
    .select(['item', 'parent'])
    .where('revision_id', '=', revisionId)
    .where('parent', 'in', parents)
    .orderBy('position')
    .execute();
}

function ordered<O>(
  query: SelectQueryBuilder<Database, 'mass_rows', O>,
  order: RowOrder,
): SelectQueryBuilder<Database, 'mass_rows', O> {
  const column = sql.ref(`mass_rows.${ORDERED_BY[order.column]}`);
  const direction = order.descending ? sql`desc nulls last` : sql`asc nulls last`;
  return query.orderBy(sql`${column} ${direction}`).orderBy('position');
}

function filtered<O>(
  query: SelectQueryBuilder<Database, 'mass_rows', O>,
  revisionId: string,
  filter: RowFilter,
): SelectQueryBuilder<Database, 'mass_rows', O> {
  return query.where('revision_id', '=', revisionId).where((eb) => {
    const conditions: Expression<SqlBool>[] = [];
    if (filter.text !== '') {
      const pattern = `%${filter.text.replace(/[\\%_]/g, '\\$&')}%`;
      conditions.push(
        sql<SqlBool>`concat_ws(E'\n', item, part_number, description, source, note, change_ref, extra::text) ilike ${pattern}`,
      );
    }
    if (filter.group !== '') {
      conditions.push(
        eb.or([
          eb('group_path', '=', filter.group),
          sql<SqlBool>`starts_with(group_path, ${`${filter.group}/`})`,
        ]),
      );
    }
    if (filter.category !== null) conditions.push(eb('category', '=', filter.category));
    if (filter.counting !== null) conditions.push(eb('counting', '=', filter.counting));
    if (filter.items !== null) conditions.push(sql<SqlBool>`item = any(${filter.items})`);
    return eb.and(conditions);
  });
}
