import { type findImport, type List } from '@/db/queries/lists';
import { type ImportView } from '@/lib/contracts/list-imports';

type Found = NonNullable<Awaited<ReturnType<typeof findImport>>>;

/** An import as its page shows it, problems counted by kind, the most frequent first. */
export function importOf(found: Found, list: Pick<List, 'last_revision'>): ImportView {
  const counts = Object.entries(found.problem_counts ?? {}).map(([kind, count]) => ({ kind, count }));
  return {
    import: found.id,
    state: found.state,
    file: found.file_name,
    reason: found.reason,
    rows: found.rows_done,
    ofRows: found.of_rows,
    revision: found.revision_number,
    problems: found.problems ?? [],
    counts: counts.sort((a, b) => b.count - a.count || (a.kind < b.kind ? -1 : 1)),
    failure: found.failure,
    inForce: list.last_revision,
  };
}
