import { type Db } from '@/db/client';
import {
  countDraftEdits,
  dropDraftEdits,
  editsOfDraft,
  putDraftEdits,
  type StoredDraft,
} from '@/db/queries/drafts';
import { findRevision, type List } from '@/db/queries/lists';
import { type Transaction } from 'kysely';
import { type Database } from '@/db/schema/database';
import { DRAFT_ROWS, type DraftPatch, type PatchedDraft } from '@/lib/contracts/list-draft';
import { keyOf } from '@/lib/editing/edits';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { newId } from '@/lib/server/ids';
import { draftFacts } from './draft-facts';
import { draftProblems } from './draft-problems';
import { CHANGED_ELSEWHERE } from './reach-draft';

/**
 * Keeps a few edits more in a person's draft, or begins one. Only the version that the person saw is changed: of two windows that
 * type at once one is told. @throws AppError conflict, or too-large where the draft would hold too many rows.
 */
export async function patchDraft(
  db: Db,
  input: { readonly person: Person; readonly list: List; readonly patch: DraftPatch },
): Promise<PatchedDraft> {
  const { person, list, patch } = input;
  const base = await findRevision(db, list.id, patch.base);
  if (base === undefined)
    throw new AppError('not-found', `The list ${list.code} has no revision ${patch.base}.`);
  const [draft, edits] = await db.transaction().execute(async (trx) => {
    const found =
      patch.version === 0 ? await begun(trx, list, person, patch) : await next(trx, list, person, patch);
    if (found === undefined) throw new AppError('conflict', CHANGED_ELSEWHERE);
    await dropDraftEdits(trx, found.id, patch.drop);
    await putDraftEdits(
      trx,
      found.id,
      patch.put.map((edit) => [keyOf(edit), edit]),
    );
    if ((await countDraftEdits(trx, found.id)) > DRAFT_ROWS)
      throw new AppError(
        'too-large',
        `A draft holds at most ${DRAFT_ROWS} rows. Save it first, or upload a file.`,
      );
    return [found, await editsOfDraft(trx, found.id)] as const;
  });
  return {
    ...draftFacts(draft, edits.length),
    version: draft.version,
    problems: await draftProblems(db, base, edits),
  };
}

function begun(
  trx: Transaction<Database>,
  list: List,
  person: Person,
  patch: DraftPatch,
): Promise<StoredDraft | undefined> {
  return trx
    .insertInto('list_drafts')
    .values({ id: newId(), list_id: list.id, user_id: person.userId, base_revision: patch.base, version: 1 })
    .onConflict((conflict) => conflict.columns(['list_id', 'user_id']).doNothing())
    .returningAll()
    .executeTakeFirst();
}

function next(
  trx: Transaction<Database>,
  list: List,
  person: Person,
  patch: DraftPatch,
): Promise<StoredDraft | undefined> {
  return trx
    .updateTable('list_drafts')
    .set((eb) => ({ version: eb('version', '+', 1), changed_at: eb.fn('now', []) }))
    .where('list_id', '=', list.id)
    .where('user_id', '=', person.userId)
    .where('version', '=', patch.version)
    .where('base_revision', '=', patch.base)
    .returningAll()
    .executeTakeFirst();
}
