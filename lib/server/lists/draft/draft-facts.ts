import { type StoredDraft } from '@/db/queries/drafts';

/** What is told of a draft without its edits. */
export function draftFacts(
  draft: Pick<StoredDraft, 'base_revision' | 'created_at' | 'changed_at'>,
  rows: number,
) {
  return {
    base: draft.base_revision,
    since: draft.created_at.toISOString(),
    changedAt: draft.changed_at.toISOString(),
    rows,
  };
}
