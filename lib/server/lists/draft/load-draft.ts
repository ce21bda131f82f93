import { type Db } from '@/db/client';
import { editsOfDraft, findDraft, placesInRevision, type StoredDraft } from '@/db/queries/drafts';
import { rowsByItem } from '@/db/queries/list-rows';
import { type List } from '@/db/queries/lists';
import { type Draft } from '@/lib/contracts/list-draft';
import { type Person } from '@/lib/server/actor';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { rowReader } from '@/lib/server/lists/row-view';
import { draftFacts } from './draft-facts';
import { draftProblems } from './draft-problems';
import { baseOfDraft } from './reach-draft';

/** A person's draft of a list as they left it, with the rows that it edits; null where they have none. */
export async function loadDraft(db: Db, list: List, person: Person): Promise<Draft | null> {
  const draft = await findDraft(db, list.id, person.userId);
  return draft === undefined ? null : draftView(db, draft);
}

/** A draft with its edits, the rows of its base that they are of, and what is wrong with them as a set. */
export async function draftView(db: Db, draft: StoredDraft): Promise<Draft> {
  const base = await baseOfDraft(db, draft);
  const edits = await editsOfDraft(db, draft.id);
  const items = edits.flatMap((edit) => (edit.kind === 'add' ? [] : [edit.item]));
  const [rows, places, problems] = await Promise.all([
    rowsByItem(db, base.id, items),
    placesInRevision(db, base.id, items),
    draftProblems(db, base, edits),
  ]);
  const read = rowReader(base.declarations, await revisionGroups(db, base.id));
  return {
    ...draftFacts(draft, edits.length),
    version: draft.version,
    problems,
    edits,
    stated: rows.map((row) => ({ index: places.get(row.item) ?? 0, row: read(row) })),
  };
}
