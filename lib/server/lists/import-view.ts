import { type findImport, type List } from '@/db/queries/lists';
import { type ImportView } from '@/lib/contracts/list-imports';

type Found = NonNullable<Awaited<ReturnType<typeof findImport>>>;

/** An import as its page shows it, problems counted by kind, the most frequent first. */
export function importOf(found: Found, list: Pick<List, 'last_revision'>, now: Date): ImportView {
  const counts = Object.entries(found.problem_counts ?? {}).map(([kind, count]) => ({ kind, count }));
  return {
    import: found.id,
    state: found.state,
    file: found.file_name,
    reason: found.reason,
    rows: found.rows_done,
    ofRows: found.of_rows,
    secondsLeft: secondsLeft(found, now),
    unchanged: found.unchanged,
    revision: found.revision_number,
    problems: found.problems ?? [],
    counts: counts.sort((a, b) => b.count - a.count || (a.kind < b.kind ? -1 : 1)),
    failure: found.failure,
    inForce: list.last_revision,
  };
}

/** Nothing is foretold from less than a second's work. */
const TELLING_MS = 1_000;

/** At the pace of the run so far. */
function secondsLeft(
  { state, started_at, rows_done, of_rows }: Pick<Found, 'state' | 'started_at' | 'rows_done' | 'of_rows'>,
  now: Date,
): number | null {
  if (state !== 'running' || started_at === null || of_rows === null || rows_done === 0) return null;
  const elapsed = now.getTime() - started_at.getTime();
  if (elapsed < TELLING_MS) return null;
  return (Math.max(0, of_rows - rows_done) / rows_done) * (elapsed / 1_000);
}
