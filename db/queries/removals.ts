import { sql, type SqlBool } from 'kysely';
import { type Db } from '@/db/client';
import { type Component } from '@/lib/mass/component';

/** What removals and the rows that they take away are compared by. */
export type RemovalRow = Pick<
  Component,
  | 'item'
  | 'partNumber'
  | 'group'
  | 'maturity'
  | 'growth'
  | 'quantity'
  | 'pair'
  | 'mass'
  | 'position'
  | 'moments'
  | 'orientation'
>;

/** More removals of one list are not held against rows. */
export const REMOVALS = 1000;

/** Lists of more rows are looked through by item only, which has an index. */
export const ROWS_BY_PART_NUMBER = 200_000;

/** The counted, approved rows of a revision that take something away, in the order of the list. */
export async function removalsOf(db: Db, revisionId: string): Promise<RemovalRow[]> {
  const rows = await counted(db, revisionId)
    .where('mass', '<', 0)
    .where('status', '=', 'approved')
    .orderBy('position')
    .limit(REMOVALS)
    .execute();
  return rows.map(rowOf);
}

/** The counted rows of a revision that have the item or the part number of one of these removals, in no order. */
export async function rowsThatMayBeRemoved(
  db: Db,
  revisionId: string,
  removals: readonly RemovalRow[],
): Promise<RemovalRow[]> {
  const items = removals.map(({ item }) => item);
  const numbers = removals.flatMap(({ partNumber }) => (partNumber === null ? [] : [partNumber]));
  const { rows: length } = await db
    .selectFrom('list_revisions')
    .select('rows')
    .where('id', '=', revisionId)
    .executeTakeFirstOrThrow();
  const isNamed = sql<SqlBool>`item = any(${items}::text[])`;
  const isNumbered = sql<SqlBool>`part_number = any(${numbers}::text[])`;
  const rows = await counted(db, revisionId)
    .where(
      length > ROWS_BY_PART_NUMBER || numbers.length === 0
        ? isNamed
        : sql<SqlBool>`(${isNamed} or ${isNumbered})`,
    )
    .limit(20 * REMOVALS)
    .execute();
  return rows.map(rowOf);
}

function counted(db: Db, revisionId: string) {
  return db
    .selectFrom('mass_rows')
    .select([
      'item',
      'part_number',
      'group_path',
      'maturity',
      'growth',
      'quantity',
      'pair',
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
      'yaw',
      'pitch',
      'roll',
    ])
    .where('revision_id', '=', revisionId)
    .where('counting', '=', 'counted');
}

type Stored = Awaited<ReturnType<ReturnType<typeof counted>['execute']>>[number];

function rowOf(row: Stored): RemovalRow {
  const { ixx, iyy, izz, ixy, ixz, iyz, yaw, pitch, roll } = row;
  return {
    item: row.item,
    partNumber: row.part_number,
    group: row.group_path,
    maturity: row.maturity,
    growth: row.growth,
    quantity: row.quantity,
    pair: row.pair,
    mass: row.mass,
    position: [row.x, row.y, row.z],
    moments: { ixx, iyy, izz, ixy, ixz, iyz },
    orientation: { yaw, pitch, roll },
  };
}
