import { type Db } from '@/db/client';
import { draftsOfList } from '@/db/queries/drafts';
import { type List } from '@/db/queries/lists';
import { type Presence } from '@/lib/contracts/list-draft';
import { type Person } from '@/lib/server/actor';
import { AppError } from '@/lib/errors';
import { draftFacts } from './draft-facts';

/** Who has a draft of a list, since when and of how many rows, and the newest revision with who made it. */
export async function loadPresence(db: Db, list: List, person: Person): Promise<Presence> {
  const [newest, drafts] = await Promise.all([
    db
      .selectFrom('list_revisions')
      .innerJoin('users', 'users.id', 'list_revisions.created_by')
      .select(['number', 'users.name as author', 'list_revisions.created_at as at'])
      .where('list_id', '=', list.id)
      .orderBy('number', 'desc')
      .limit(1)
      .executeTakeFirst(),
    draftsOfList(db, list.id),
  ]);
  if (newest === undefined) throw new AppError('not-found', 'This list has no revision yet.');
  const mine = drafts.find(({ user_id: owner }) => owner === person.userId);
  return {
    newest: { number: newest.number, author: newest.author, at: newest.at.toISOString() },
    mine: mine === undefined ? null : { ...draftFacts(mine, mine.rows), version: mine.version },
    others: drafts
      .filter((draft) => draft !== mine)
      .map((draft) => ({ name: draft.name, ...draftFacts(draft, draft.rows) })),
  };
}
