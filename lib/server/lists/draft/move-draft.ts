import { type z } from 'zod';
import { type Db } from '@/db/client';
import { putDraftEdits } from '@/db/queries/drafts';
import { findRevision, type List } from '@/db/queries/lists';
import { type Choice, type movedDraftSchema } from '@/lib/contracts/list-draft';
import { keyOf } from '@/lib/editing/edits';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { draftView } from './load-draft';
import { clashesWith, mergeDraft } from './merge-draft';
import { CHANGED_ELSEWHERE, reachDraft } from './reach-draft';

export interface MoveDraft {
  readonly person: Person;
  readonly list: List;
  readonly version: number;
  readonly onto: number;
  readonly choices: readonly Choice[];
}

/**
 * Carries a person's draft over to a newer revision. While any row that both changed is not chosen, nothing happens and the open
 * ones are told with both versions.
 */
export async function moveDraft(db: Db, input: MoveDraft): Promise<z.output<typeof movedDraftSchema>> {
  const { person, list, version } = input;
  const draft = await reachDraft(db, list, person, version);
  const onto = await findRevision(db, list.id, input.onto);
  if (onto === undefined || onto.number < draft.base_revision)
    throw new AppError('not-found', `The list ${list.code} has no newer revision ${input.onto}.`);
  const { edits, open, together, settled } = await mergeDraft(db, draft, onto, input.choices);
  if (open.length > 0) return clashesWith(db, onto, open);
  const moved = await db.transaction().execute(async (trx) => {
    const found = await trx
      .updateTable('list_drafts')
      .set((eb) => ({
        version: eb('version', '+', 1),
        base_revision: onto.number,
        changed_at: eb.fn('now', []),
      }))
      .where('id', '=', draft.id)
      .where('version', '=', version)
      .returningAll()
      .executeTakeFirst();
    if (found === undefined) throw new AppError('conflict', CHANGED_ELSEWHERE);
    await trx.deleteFrom('list_draft_edits').where('draft_id', '=', draft.id).execute();
    await putDraftEdits(
      trx,
      draft.id,
      edits.map((edit) => [keyOf(edit), edit]),
    );
    return found;
  });
  return { status: 'moved', draft: await draftView(db, moved), merged: { together, settled } };
}
