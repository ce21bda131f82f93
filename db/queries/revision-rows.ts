import { type Expression, type ExpressionBuilder, type SqlBool, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';

/** Which row versions of a list make up a revision: those up to `lastRow` without those that an end up to `lastEnd` names. */
export interface RowRange {
  readonly listNo: number;
  readonly lastRow: number;
  readonly lastEnd: number;
}

/** Undefined when there is no such revision. */
export async function rowRange(db: Db, revisionId: string): Promise<RowRange | undefined> {
  return db
    .selectFrom('list_revisions')
    .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
    .select(['lists.list_no as listNo', 'last_row as lastRow', 'last_end as lastEnd'])
    .where('list_revisions.id', '=', revisionId)
    .executeTakeFirst();
}

/** The range of a revision that must exist. */
export async function neededRowRange(db: Db, revisionId: string): Promise<RowRange> {
  const range = await rowRange(db, revisionId);
  if (range === undefined) throw new Error(`there is no revision ${revisionId}`);
  return range;
}

/** For `where` on `row_versions`: that a row is one of the range's. With no ends in it, none are looked for. */
export function isIn(range: RowRange) {
  return (eb: ExpressionBuilder<Database, 'row_versions'>): Expression<SqlBool> => {
    const begun = eb.and([
      eb('row_versions.list_no', '=', range.listNo),
      eb('row_versions.row_no', '<=', range.lastRow),
    ]);
    if (range.lastEnd === 0) return begun;
    return eb.and([
      begun,
      sql<SqlBool>`not exists (
        select from row_ends e
        where e.list_no = ${range.listNo} and e.row_no = row_versions.row_no and e.end_no <= ${range.lastEnd})`,
    ]);
  };
}
