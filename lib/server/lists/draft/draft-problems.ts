import { type Db } from '@/db/client';
import { itemsInRevision } from '@/db/queries/drafts';
import { type ListRevision } from '@/db/queries/lists';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type EditProblem } from '@/lib/contracts/list-edits';
import { itemOf } from '@/lib/editing/edits';
import { checkEdits } from '@/lib/server/lists/check-edits';

/**
 * What is wrong with the edits of a draft as a set, which no row alone tells: items that are taken, parents that are not there,
 * assemblies removed from above their parts. Circles of parents are found when the draft is saved.
 */
export async function draftProblems(
  db: Db,
  base: Pick<ListRevision, 'id' | 'number' | 'declarations'>,
  edits: readonly DraftEdit[],
): Promise<EditProblem[]> {
  const named = edits.filter((edit) => itemOf(edit) !== '');
  return [...(await checkEdits(db, base, named)), ...(await unknownParents(db, base, named))];
}

async function unknownParents(
  db: Db,
  base: Pick<ListRevision, 'id'>,
  edits: readonly DraftEdit[],
): Promise<EditProblem[]> {
  const named = edits.flatMap((edit) => {
    const parent = edit.kind === 'remove' ? '' : (edit.fields['parent'] ?? '').trim();
    return parent === '' ? [] : [{ item: itemOf(edit), parent }];
  });
  const there = await itemsInRevision(
    db,
    base.id,
    named.map(({ parent }) => parent),
  );
  for (const edit of edits) {
    if (edit.kind === 'add') there.add(itemOf(edit));
    if (edit.kind === 'remove') there.delete(edit.item);
  }
  return named
    .filter(({ parent }) => !there.has(parent))
    .map(({ item, parent }) => ({
      item,
      column: 'parent',
      found: parent,
      message: `No row has the item \`${parent}\`. Write the item of the assembly this row belongs to.`,
    }));
}
