import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { type MassRowsTable } from '@/db/schema/lists';

/** What a row says: its place in the list and in a file do not count as changes. */
const COMPARED = [
  'part_number',
  'part_revision',
  'description',
  'group_path',
  'category',
  'parent',
  'counting',
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
  'yaw',
  'pitch',
  'roll',
  'pair',
  'maturity',
  'growth',
  'sigma',
  'source',
  'source_date',
  'note',
  'change_ref',
  'status',
  'extra',
] as const satisfies readonly (keyof MassRowsTable)[];

export interface ChangeCounts {
  readonly added: number;
  readonly removed: number;
  readonly changed: number;
}

export type RowChangeKind = keyof ChangeCounts;

/**
 * How many rows two revisions of a list differ by, rows being the same that have the same item. `group` narrows it to rows that
 * are in that group path, or below it, on either side.
 */
export async function countChanges(
  db: Db,
  before: string,
  after: string,
  group: string | null = null,
): Promise<ChangeCounts> {
  const { rows } = await sql<ChangeCounts>`
    select
      count(*) filter (where before.item is null) as added,
      count(*) filter (where after.item is null) as removed,
      count(*) filter (where before.item is not null and after.item is not null) as changed
    ${differing(before, after, group)}
  `.execute(db);
  const counts = rows[0];
  if (counts === undefined) throw new Error('a count came back without a row');
  return counts;
}

/** The items of the rows that differ and how, in the order of the newer revision, removed ones last. */
export async function changedItems(
  db: Db,
  before: string,
  after: string,
  page: { readonly offset: number; readonly limit: number; readonly group?: string | null },
): Promise<{ item: string; kind: RowChangeKind }[]> {
  const { rows } = await sql<{ item: string; kind: RowChangeKind }>`
    select
      coalesce(after.item, before.item) as item,
      case when before.item is null then 'added' when after.item is null then 'removed' else 'changed' end as kind
    ${differing(before, after, page.group ?? null)}
    order by after.position nulls last, before.position
    limit ${page.limit} offset ${page.offset}
  `.execute(db);
  return rows;
}

function differing(before: string, after: string, group: string | null) {
  const below = (side: 'before' | 'after') =>
    sql`(${sql.ref(`${side}.group_path`)} = ${group} or starts_with(${sql.ref(`${side}.group_path`)}, ${`${group}/`}))`;
  const columns = (side: 'before' | 'after') =>
    sql.join(COMPARED.map((column) => sql.ref(`${side}.${column}`)));
  return sql`
    from (select * from mass_rows where revision_id = ${before}) before
    full join (select * from mass_rows where revision_id = ${after}) after on after.item = before.item
    where (${columns('before')}) is distinct from (${columns('after')})
      ${group === null ? sql`` : sql`and (${below('before')} or ${below('after')})`}
  `;
}
