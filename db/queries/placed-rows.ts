import { type SqlBool, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Category } from '@/lib/mass/component';

/** Which counted, approved rows of some revisions: those in `groups`, as the rows state them, each with the top group it is drawn by. */
export interface PlacedFilter {
  readonly revisionIds: readonly string[];
  readonly categories: readonly Category[];
  readonly groups: readonly { readonly stated: string; readonly top: string }[];
}

/** Of all pieces that a row stands for at its one place, kg. */
const MASS = sql<number>`mass_rows.quantity * mass_rows.mass`;

/** The heaviest rows, without regard to sign; list axes, m. */
export function largestRows(db: Db, filter: PlacedFilter, limit: number) {
  return filtered(db, filter)
    .select(['revision_id', 'item', 'description', 'group_path', 'category', 'pair', 'x', 'y', 'z'])
    .select(MASS.as('mass'))
    .orderBy(sql`abs(${MASS}) desc`)
    .orderBy('revision_id')
    .orderBy('position')
    .limit(limit)
    .execute();
}

export interface RowsOfCell {
  readonly revision_id: string;
  readonly top_group: string;
  readonly pair: boolean;
  readonly rows: number;
  /** kg, and its centre in list axes, m. */
  readonly mass: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
}

/**
 * The rows that `largestRows` with the same limit leaves out, added up by cubes of `size` (m, list axes), top group and sign, so that
 * what is added and what is taken away never cancel.
 */
export async function restByCells(
  db: Db,
  filter: PlacedFilter,
  limit: number,
  size: number,
): Promise<RowsOfCell[]> {
  const [stated, tops] = [filter.groups.map((one) => one.stated), filter.groups.map((one) => one.top)];
  const topOf = sql<string>`(${tops}::text[])[array_position(${stated}::text[], mass_rows.group_path)]`;
  const ranked = filtered(db, filter)
    .select(['revision_id', 'pair', 'x', 'y', 'z'])
    .select([
      topOf.as('top_group'),
      MASS.as('mass'),
      sql<number>`row_number() over (order by abs(${MASS}) desc, revision_id, position)`.as('rank'),
    ]);
  const centre = (axis: 'x' | 'y' | 'z') =>
    sql<number>`coalesce(sum(mass * ${sql.ref(axis)}) / nullif(sum(mass), 0), avg(${sql.ref(axis)}))`;
  const cell = (axis: 'x' | 'y' | 'z') => sql`floor(${sql.ref(axis)} / ${size}::float8)`;
  return db
    .selectFrom(ranked.as('ranked'))
    .where('rank', '>', limit)
    .groupBy(['revision_id', 'top_group', 'pair', cell('x'), cell('y'), cell('z'), sql`sign(mass)`])
    .select((eb) => [
      'revision_id',
      'top_group',
      'pair',
      eb.fn.countAll<number>().as('rows'),
      sql<number>`sum(mass)`.as('mass'),
      centre('x').as('x'),
      centre('y').as('y'),
      centre('z').as('z'),
    ])
    .orderBy(sql`abs(sum(mass)) desc`)
    .execute();
}

function filtered(db: Db, { revisionIds, categories, groups }: PlacedFilter) {
  return db
    .selectFrom('mass_rows')
    .where(sql<SqlBool>`revision_id = any(${revisionIds})`)
    .where(sql<SqlBool>`category = any(${categories})`)
    .where('counting', '=', 'counted')
    .where('status', '=', 'approved')
    .where(sql<SqlBool>`group_path = any(${groups.map(({ stated }) => stated)})`);
}
