import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { type RowVersionsTable } from '@/db/schema/lists';
import { neededRowRange, type RowRange } from './revision-rows';

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
] as const satisfies readonly (keyof RowVersionsTable)[];

export interface ChangeCounts {
  readonly added: number;
  readonly removed: number;
  readonly changed: number;
}

export type RowChangeKind = keyof ChangeCounts;

/**
 * How many rows two revisions of a list differ by, rows being the same that have the same item; null is no revision: held against it
 * every row of the other side is new or gone. `group` narrows it to rows that are in that group path, or below it, on either side.
 */
export async function countChanges(
  db: Db,
  before: string | null,
  after: string | null,
  group: string | null = null,
): Promise<ChangeCounts> {
  const { rows } = await sql<ChangeCounts>`
    select
      count(*) filter (where before.item is null) as added,
      count(*) filter (where after.item is null) as removed,
      count(*) filter (where before.item is not null and after.item is not null) as changed
    ${differing(...(await rangesOf(db, before, after)), group)}
  `.execute(db);
  const counts = rows[0];
  if (counts === undefined) throw new Error('a count came back without a row');
  return counts;
}

/** The items of the rows that differ and how, in the order of the newer revision, removed ones last. */
export async function changedItems(
  db: Db,
  before: string | null,
  after: string | null,
  page: { readonly offset: number; readonly limit: number; readonly group?: string | null },
): Promise<{ item: string; kind: RowChangeKind }[]> {
  const { rows } = await sql<{ item: string; kind: RowChangeKind }>`
    select
      coalesce(after.item, before.item) as item,
      case when before.item is null then 'added' when after.item is null then 'removed' else 'changed' end as kind
    ${differing(...(await rangesOf(db, before, after)), page.group ?? null)}
    order by after.sort_key nulls last, before.sort_key
    limit ${page.limit} offset ${page.offset}
  `.execute(db);
  return rows;
}

/**
 * The rows that one of two revisions has and the other has not, paired by item, less those that say the same and have only moved.
 * Only what ended or began between the two is looked at, whichever is the older.
 */
function differing(before: RowRange, after: RowRange, group: string | null) {
  if (before.listNo !== after.listNo) throw new Error('revisions of two lists are not compared');
  const forward = before.lastRow <= after.lastRow && before.lastEnd <= after.lastEnd;
  const [older, newer] = forward ? [before, after] : [after, before];
  const gone = sql`(
    select r.* from row_ends e join row_versions r on r.list_no = e.list_no and r.row_no = e.row_no
    where e.list_no = ${older.listNo} and e.end_no > ${older.lastEnd} and e.end_no <= ${newer.lastEnd}
      and r.row_no <= ${older.lastRow})`;
  const come = sql`(
    select r.* from row_versions r
    where r.list_no = ${older.listNo} and r.row_no > ${older.lastRow} and r.row_no <= ${newer.lastRow}
      and not exists (
        select from row_ends e where e.list_no = r.list_no and e.row_no = r.row_no and e.end_no <= ${newer.lastEnd}))`;
  const [had, has] = forward ? [gone, come] : [come, gone];
  const below = (side: 'before' | 'after') =>
    sql`(${sql.ref(`${side}.group_path`)} = ${group} or starts_with(${sql.ref(`${side}.group_path`)}, ${`${group}/`}))`;
  const columns = (side: 'before' | 'after') =>
    sql.join(COMPARED.map((column) => sql.ref(`${side}.${column}`)));
  return sql`
    from ${had} before
    full join ${has} after on after.item = before.item
    where (${columns('before')}) is distinct from (${columns('after')})
      ${group === null ? sql`` : sql`and (${below('before')} or ${below('after')})`}
  `;
}

async function rangesOf(db: Db, before: string | null, after: string | null): Promise<[RowRange, RowRange]> {
  const [was, is] = await Promise.all(
    [before, after].map((id) => (id === null ? null : neededRowRange(db, id))),
  );
  if (was && is) return [was, is];
  const one = was ?? is;
  if (!one) throw new RangeError('a comparison has a revision on one side at least');
  const nothing = { listNo: one.listNo, lastRow: 0, lastEnd: 0 };
  return was ? [was, nothing] : [nothing, one];
}
