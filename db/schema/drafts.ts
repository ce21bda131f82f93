import { type Generated, type GeneratedAlways } from 'kysely';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type Json } from './lists';

/** Edits of a list that are not a revision yet: one draft a person and list. `version` grows with every change of it. */
export interface ListDraftsTable {
  id: string;
  list_id: string;
  user_id: string;
  base_revision: number;
  version: number;
  created_at: Generated<Date>;
  changed_at: Generated<Date>;
}

/** One edited row of a draft. */
export interface ListDraftEditsTable {
  draft_id: string;
  key_digest: GeneratedAlways<string>;
  key: string;
  edit: Json<DraftEdit>;
}
