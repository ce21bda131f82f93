import type pg from 'pg';
import { type Db } from '@/db/client';
import { editsOfDraft, type StoredDraft } from '@/db/queries/drafts';
import { type List } from '@/db/queries/lists';
import { type DraftEdit, type SavedDraft } from '@/lib/contracts/list-draft';
import { addedRows, keyOf } from '@/lib/editing/edits';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { editRows } from '@/lib/server/lists/edit-rows';
import { clashesWith, mergeDraft, newestRevision } from './merge-draft';
import { CHANGED_ELSEWHERE, reachDraft } from './reach-draft';

export interface SaveDraft {
  readonly person: Person;
  readonly list: List;
  readonly version: number;
  readonly reason: string;
}

/** Others may save while we merge; a list that moves on this often in one breath is told to its editor. */
const TRIES = 3;

/**
 * Makes a person's draft the next revision, and with it the draft is gone. A list that has moved on is merged with, row by row; rows
 * that both changed are refused with both versions, and the draft stays as it was. Nothing is saved twice and nothing is overwritten.
 */
export async function saveDraft(services: { pool: pg.Pool; db: Db }, input: SaveDraft): Promise<SavedDraft> {
  const { db } = services;
  const draft = await reachDraft(db, input.list, input.person, input.version);
  for (let tries = 1; ; tries += 1) {
    const newest = await newestRevision(db, input.list);
    try {
      if (newest.number === draft.base_revision)
        return await published(services, input, draft, newest.number, await editsOfDraft(db, draft.id), null);
      const { edits, open, together, settled } = await mergeDraft(db, draft, newest, []);
      if (open.length > 0) return await clashesWith(db, newest, open);
      if (edits.length === 0) throw new AppError('conflict', nothingLeft(newest.number));
      return await published(services, input, draft, newest.number, edits, { together, settled });
    } catch (error) {
      const movedOn = (await newestRevision(db, input.list)).number > newest.number;
      if (!(error instanceof AppError) || error.code !== 'conflict' || !movedOn || tries === TRIES)
        throw error;
    }
  }
}

const nothingLeft = (revision: number): string =>
  `Revision ${revision} says all that your draft says already, so there is nothing to save. Throw the draft away.`;

async function published(
  services: { pool: pg.Pool; db: Db },
  { person, list, reason }: SaveDraft,
  draft: StoredDraft,
  base: number,
  edits: readonly DraftEdit[],
  merged: Extract<SavedDraft, { status: 'saved' }>['merged'],
): Promise<SavedDraft> {
  if (edits.length === 0) throw new AppError('conflict', 'The draft has no edit. There is nothing to save.');
  const added = addedRows(new Map(edits.map((edit) => [keyOf(edit), edit])));
  const saved = await editRows(services, {
    person,
    list,
    baseRevision: base,
    reason,
    edits: [...edits.filter((edit) => edit.kind !== 'add'), ...added],
    settle: async (trx) => {
      const { numDeletedRows } = await trx
        .deleteFrom('list_drafts')
        .where('id', '=', draft.id)
        .where('version', '=', draft.version)
        .executeTakeFirst();
      if (numDeletedRows === 0n) throw new AppError('conflict', CHANGED_ELSEWHERE);
    },
  });
  return saved.status === 'saved' ? { ...saved, merged } : saved;
}
