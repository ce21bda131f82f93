import { type Expression, type SelectQueryBuilder, type SqlBool, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';
import { type RowVersionsTable } from '@/db/schema/lists';
import { type SortColumn } from '@/lib/contracts/list-view';
import { type Category, type Counting } from '@/lib/mass/component';
import { isIn, neededRowRange } from './revision-rows';

/** Which rows of a revision; members that are null or empty leave all in. */
export interface RowFilter {
  /** Text that stands in the item, part number, description, source, note or a column of the list's own. */
  readonly text: string;
  /** Group paths as the rows state them. */
  readonly groups: readonly string[] | null;
  readonly category: Category | null;
  readonly counting: Counting | null;
  readonly items: readonly string[] | null;
}

export interface RowOrder {
  readonly column: SortColumn;
  readonly descending: boolean;
}

const ORDERED_BY: Readonly<Record<SortColumn, keyof RowVersionsTable>> = {
  position: 'sort_key',
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
export async function rowsOfView(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  order: RowOrder,
  page: { readonly offset: number; readonly limit: number },
) {
  return ordered((await rowsIn(db, revisionId, filter)).selectAll(), order)
    .limit(page.limit)
    .offset(page.offset)
    .execute();
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
export async function sumRows(
  db: Db,
  revisionId: string,
  filter: RowFilter,
  near: readonly [number, number, number],
): Promise<RowSums[]> {
  const moment = (axis: 'x' | 'y' | 'z', from: number) =>
    sql<number>`sum(quantity * mass * (${sql.ref(axis)} - ${from}::float8))`;
  return (await rowsIn(db, revisionId, filter))
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
    .groupBy('pair')
    .execute();
}

/** How many rows of a view are not summed: memo rows, and adjustments that are not approved. */
export async function unsummedRows(
  db: Db,
  revisionId: string,
  filter: RowFilter,
): Promise<{ memo: number; waiting: number }> {
  return (await rowsIn(db, revisionId, filter))
    .select([
      sql<number>`count(*) filter (where counting = 'memo')`.as('memo'),
      sql<number>`count(*) filter (where counting = 'counted' and status <> 'approved')`.as('waiting'),
    ])
    .executeTakeFirstOrThrow();
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

const EVERY_ROW: RowFilter = { text: '', groups: null, category: null, counting: null, items: null };

async function rowsIn(db: Db, revisionId: string, filter = EVERY_ROW) {
  const range = await neededRowRange(db, revisionId);
  return db
    .selectFrom('row_versions')
    .where(isIn(range))
    .where((eb) => {
      const conditions: Expression<SqlBool>[] = [];
      if (filter.text !== '') {
        const pattern = `%${filter.text.replace(/[\\%_]/g, '\\$&')}%`;
        conditions.push(
          sql<SqlBool>`concat_ws(E'\n', item, part_number, description, source, note, change_ref, extra::text) ilike ${pattern}`,
        );
      }
      if (filter.groups !== null) conditions.push(sql<SqlBool>`group_path = any(${filter.groups})`);
      if (filter.category !== null) conditions.push(eb('category', '=', filter.category));
      if (filter.counting !== null) conditions.push(eb('counting', '=', filter.counting));
      if (filter.items !== null) conditions.push(sql<SqlBool>`item = any(${filter.items})`);
      return eb.and(conditions);
    });
}

function ordered<O>(
  query: SelectQueryBuilder<Database, 'row_versions', O>,
  order: RowOrder,
): SelectQueryBuilder<Database, 'row_versions', O> {
  const column = sql.ref(`row_versions.${ORDERED_BY[order.column]}`);
  const direction = order.descending ? sql`desc nulls last` : sql`asc nulls last`;
  return query.orderBy(sql`${column} ${direction}`).orderBy('sort_key');
}
