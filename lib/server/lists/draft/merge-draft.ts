import { type Db } from '@/db/client';
import { editsOfDraft, type StoredDraft } from '@/db/queries/drafts';
import { rowsByItem } from '@/db/queries/list-rows';
import { findRevisionAuthor, type List, type ListRevision } from '@/db/queries/lists';
import { type Choice, type Clash, type Clashes, type DraftEdit } from '@/lib/contracts/list-draft';
import { itemOf, keyOf, textsOfRow } from '@/lib/editing/edits';
import { merge, type RowsByItem, settle } from '@/lib/editing/merge';
import { restated, unlike } from '@/lib/editing/restate';
import { AppError } from '@/lib/errors';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { rowReader } from '@/lib/server/lists/row-view';
import { baseOfDraft } from './reach-draft';

export interface MergedDraft {
  readonly edits: readonly DraftEdit[];
  readonly open: readonly Clash[];
  readonly together: string[];
  readonly settled: string[];
}

/**
 * The edits of a draft as they stand on a newer revision, with choices made of what clashes. Rows are compared and edits restated
 * in the newer one's units and signs. @throws AppError conflict when it states figures in other axes or another frame.
 */
export async function mergeDraft(
  db: Db,
  draft: StoredDraft,
  onto: ListRevision,
  choices: readonly Choice[],
): Promise<MergedDraft> {
  const base = await baseOfDraft(db, draft);
  const difference =
    unlike(base.declarations, onto.declarations) ??
    (base.frame_issue_id === onto.frame_issue_id ? null : 'another frame issue');
  if (difference !== null) {
    throw new AppError(
      'conflict',
      `Revision ${onto.number} declares ${difference} than revision ${base.number}, so that your figures cannot be carried over. ` +
        'Your draft stays as it is: copy from it what you need, throw it away, then edit the newer revision.',
    );
  }
  const edits = (await editsOfDraft(db, draft.id)).map((edit) =>
    restated(edit, base.declarations, onto.declarations),
  );
  const items = [...new Set(edits.map(itemOf).filter((item) => item !== ''))];
  const sides = {
    before: await rowTexts(db, base, onto, items),
    theirs: await rowTexts(db, onto, onto, items),
  };
  const merged = merge(edits, sides);
  const settlement = settle(
    new Map(edits.map((edit) => [keyOf(edit), edit])),
    merged.clashes,
    choices,
    sides,
  );
  return {
    edits: [...merged.edits, ...settlement.edits],
    open: settlement.open,
    together: [...merged.together],
    settled: [...merged.settled],
  };
}

async function rowTexts(
  db: Db,
  revision: ListRevision,
  stated: ListRevision,
  items: readonly string[],
): Promise<RowsByItem> {
  const read = rowReader(stated.declarations, await revisionGroups(db, revision.id));
  const rows = await rowsByItem(db, revision.id, items);
  return new Map(rows.map((row) => [row.item, textsOfRow(read(row))]));
}

/** What is told of clashes: both versions of each, and who made the other and when. */
export async function clashesWith(db: Db, onto: ListRevision, clashes: readonly Clash[]): Promise<Clashes> {
  return {
    status: 'clashes',
    onto: onto.number,
    author: await findRevisionAuthor(db, onto.id),
    at: onto.created_at.toISOString(),
    clashes: [...clashes],
  };
}

/** The newest revision of a list that has one. */
export async function newestRevision(db: Db, list: Pick<List, 'id'>): Promise<ListRevision> {
  return db
    .selectFrom('list_revisions')
    .selectAll()
    .where('list_id', '=', list.id)
    .orderBy('number', 'desc')
    .limit(1)
    .executeTakeFirstOrThrow();
}
