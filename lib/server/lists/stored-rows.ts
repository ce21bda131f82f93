import { type Db } from '@/db/client';
import { isIn, neededRowRange } from '@/db/queries/revision-rows';
import { type StoredRow } from './row-codec';

const PAGE = 5000;

/** The rows of a revision in their order, a page at a time, so that a list of any length fits. */
export async function* storedRows(db: Db, revisionId: string): AsyncGenerator<StoredRow> {
  const range = await neededRowRange(db, revisionId);
  let after = -1;
  for (;;) {
    const page = await db
      .selectFrom('row_versions')
      .selectAll()
      .where(isIn(range))
      .where('sort_key', '>', after)
      .orderBy('sort_key')
      .limit(PAGE)
      .execute();
    yield* page;
    if (page.length < PAGE) return;
    after = page.at(-1)?.sort_key ?? after;
  }
}
