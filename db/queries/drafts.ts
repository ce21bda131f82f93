import { type Selectable, type Transaction, sql } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';
import { type ListDraftsTable } from '@/db/schema/drafts';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { isIn, neededRowRange } from './revision-rows';

export type StoredDraft = Selectable<ListDraftsTable>;

export function findDraft(db: Db, listId: string, userId: string): Promise<StoredDraft | undefined> {
  return db
    .selectFrom('list_drafts')
    .selectAll()
    .where('list_id', '=', listId)
    .where('user_id', '=', userId)
    .executeTakeFirst();
}

export async function editsOfDraft(db: Db, draftId: string): Promise<DraftEdit[]> {
  const rows = await db
    .selectFrom('list_draft_edits')
    .select('edit')
    .where('draft_id', '=', draftId)
    .execute();
  return rows.map(({ edit }) => edit);
}

export async function countDraftEdits(db: Db, draftId: string): Promise<number> {
  const { count } = await db
    .selectFrom('list_draft_edits')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('draft_id', '=', draftId)
    .executeTakeFirstOrThrow();
  return count;
}

/** The drafts of a list with their owners and how many rows each edits, oldest first. A draft that edits nothing is left out. */
export function draftsOfList(db: Db, listId: string) {
  return db
    .selectFrom('list_drafts')
    .innerJoin('users', 'users.id', 'list_drafts.user_id')
    .innerJoinLateral(
      (eb) =>
        eb
          .selectFrom('list_draft_edits')
          .select((count) => count.fn.countAll<number>().as('rows'))
          .whereRef('list_draft_edits.draft_id', '=', 'list_drafts.id')
          .as('edits'),
      (join) => join.onTrue(),
    )
    .select([
      'user_id',
      'users.name',
      'base_revision',
      'version',
      'list_drafts.created_at',
      'changed_at',
      'rows',
    ])
    .where('list_id', '=', listId)
    .where('rows', '>', 0)
    .orderBy('list_drafts.created_at')
    .execute();
}

/** Puts edits under their keys, new or instead of what stood there. */
export async function putDraftEdits(
  trx: Transaction<Database>,
  draftId: string,
  edits: readonly (readonly [key: string, edit: DraftEdit])[],
): Promise<void> {
  if (edits.length === 0) return;
  const rows = JSON.stringify(edits.map(([key, edit]) => ({ key, edit })));
  await sql`
    insert into list_draft_edits (draft_id, key, edit)
    select ${draftId}, put.key, put.edit from jsonb_to_recordset(${rows}::jsonb) as put (key text, edit jsonb)
    on conflict (draft_id, key_digest) do update set edit = excluded.edit
  `.execute(trx);
}

export async function dropDraftEdits(
  trx: Transaction<Database>,
  draftId: string,
  keys: readonly string[],
): Promise<void> {
  if (keys.length === 0) return;
  await sql`
    delete from list_draft_edits where draft_id = ${draftId}
      and key_digest in (select md5(key)::uuid from jsonb_array_elements_text(${JSON.stringify(keys)}::jsonb) as drop (key))
  `.execute(trx);
}

/** Where rows stand in a revision, counted from 0, by item. */
export async function placesInRevision(
  db: Db,
  revisionId: string,
  items: readonly string[],
): Promise<Map<string, number>> {
  if (items.length === 0) return new Map();
  const range = await neededRowRange(db, revisionId);
  const places = await db
    .with('placed', (eb) =>
      eb
        .selectFrom('row_versions')
        .select(['item', sql<number>`row_number() over (order by sort_key) - 1`.as('place')])
        .where(isIn(range)),
    )
    .selectFrom('placed')
    .select(['item', 'place'])
    .where(sql<boolean>`item = any(${items}::text[])`)
    .execute();
  return new Map(places.map(({ item, place }) => [item, place]));
}

/** Items of those rows of a revision that are called one of `items`. */
export async function itemsInRevision(
  db: Db,
  revisionId: string,
  items: readonly string[],
): Promise<Set<string>> {
  if (items.length === 0) return new Set();
  const range = await neededRowRange(db, revisionId);
  const found = await db
    .selectFrom('row_versions')
    .select('item')
    .where(isIn(range))
    .where(sql<boolean>`item = any(${items}::text[])`)
    .execute();
  return new Set(found.map(({ item }) => item));
}
