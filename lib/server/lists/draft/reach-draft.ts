import { type Db } from '@/db/client';
import { findDraft, type StoredDraft } from '@/db/queries/drafts';
import { findRevision, type List, type ListRevision } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';

export const CHANGED_ELSEWHERE =
  'This draft was changed in another window. Nothing was overwritten. Load the draft as it is now, then go on.';

/**
 * The draft of a person in the version that they saw. @throws AppError not-found when they have none, conflict when it has changed
 * since.
 */
export async function reachDraft(db: Db, list: List, person: Person, version: number): Promise<StoredDraft> {
  const draft = await findDraft(db, list.id, person.userId);
  if (draft === undefined) throw new AppError('not-found', 'You have no draft of this list any more.');
  if (draft.version !== version) throw new AppError('conflict', CHANGED_ELSEWHERE);
  return draft;
}

/** The revision that a draft is made from: drafts keep it there. */
export async function baseOfDraft(db: Db, draft: StoredDraft): Promise<ListRevision> {
  const base = await findRevision(db, draft.list_id, draft.base_revision);
  if (base === undefined) throw new Error(`the draft ${draft.id} has no base`);
  return base;
}
