import { type Db } from '@/db/client';
import { type StoredRow } from './row-codec';

const PAGE = 5000;

/** The rows of a revision in their order, a page at a time, so that a list of any length fits. */
export async function* storedRows(db: Db, revisionId: string): AsyncGenerator<StoredRow> {
  let after = 0;
  for (;;) {
    const page = await db
      .selectFrom('mass_rows')
      .selectAll()
      .where('revision_id', '=', revisionId)
      .where('position', '>', after)
      .orderBy('position')
      .limit(PAGE)
      .execute();
    yield* page;
    if (page.length < PAGE) return;
    after = page.at(-1)?.position ?? after;
  }
}
