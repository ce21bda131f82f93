import { type Db } from '@/db/client';
import { fromNumbers, NOTHING } from '@/lib/mass/account';
import { type Subtotal } from '@/lib/mass/subtotals';

/**
 * The subtotals of a revision in the frame issue that it states its places in, without growth, as though no row stated any, and without uncertainties, which are
 * most of what is stored.
 */
export async function basicSubtotalsOf(
  db: Db,
  revisionId: string,
  frameIssueId: string,
): Promise<Subtotal[]> {
  const rows = await db
    .selectFrom('revision_subtotals')
    .select(['group_path', 'category', 'maturity', 'status', 'rows', 'pieces', 'memo_rows', 'basic'])
    .where('revision_id', '=', revisionId)
    .where('frame_issue_id', '=', frameIssueId)
    .orderBy('group_path')
    .orderBy('category')
    .orderBy('maturity')
    .orderBy('status')
    .execute();
  return rows.map((row) => {
    const basic = fromNumbers(row.basic);
    return {
      group: row.group_path,
      category: row.category,
      maturity: row.maturity === '' ? null : row.maturity,
      status: row.status,
      rows: row.rows,
      pieces: row.pieces,
      memoRows: row.memo_rows,
      basic,
      statedPredicted: NOTHING,
      unstatedBasic: basic,
    };
  });
}
