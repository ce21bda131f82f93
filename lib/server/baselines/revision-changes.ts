import { type Db } from '@/db/client';
import { revisionsOfSubmission } from '@/db/queries/baselines';
import { type ChangeCounts, countChanges } from '@/db/queries/list-changes';
import { type Comparison, compareRevisions } from '@/lib/server/lists/compare-revisions';

type HeldRevision = Awaited<ReturnType<typeof revisionsOfSubmission>>[number];

/** One list and its revision on each side; null where a side does not hold it. */
export interface RevisionPair {
  readonly list: string;
  readonly title: string;
  readonly before: HeldRevision | null;
  readonly after: HeldRevision | null;
}

/** The lists that two submissions hold, each with both its revisions. Without a former one every list is new. */
export async function revisionPairs(
  db: Db,
  before: string | null,
  after: string,
): Promise<readonly RevisionPair[]> {
  const [old, now] = await Promise.all([
    before === null ? [] : revisionsOfSubmission(db, before),
    revisionsOfSubmission(db, after),
  ]);
  const lists = [...new Set([...now, ...old].map((one) => one.list_code))].sort();
  return lists.map((list) => {
    const of = (held: readonly HeldRevision[]) => held.find((one) => one.list_code === list) ?? null;
    const [was, is] = [of(old), of(now)];
    return { list, title: (is ?? was)?.list_title ?? list, before: was, after: is };
  });
}

const NO_CHANGES: ChangeCounts = { added: 0, removed: 0, changed: 0 };

/** How many rows each list differs by, of a group path and below it where one is named. */
export function countPairs(
  db: Db,
  pairs: readonly RevisionPair[],
  group: string | null = null,
): Promise<(RevisionPair & { readonly counts: ChangeCounts })[]> {
  return Promise.all(
    pairs.map(async (pair) => {
      const [before, after] = [pair.before?.revision_id ?? null, pair.after?.revision_id ?? null];
      return {
        ...pair,
        counts: before === after ? NO_CHANGES : await countChanges(db, before, after, group),
      };
    }),
  );
}

/** The rows behind a pair, by field, in the units and signs of the later revision. */
export async function rowsOfPair(
  db: Db,
  { before, after }: RevisionPair,
  page: { readonly offset: number; readonly limit: number; readonly group: string | null },
): Promise<Comparison> {
  const declarations = (after ?? before)?.declarations;
  if (declarations === undefined) throw new RangeError('a pair has a revision on one side at least');
  return compareRevisions(
    db,
    { id: before?.revision_id ?? null },
    { id: after?.revision_id ?? null, declarations },
    page,
  );
}
