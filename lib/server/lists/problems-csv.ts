import { csvLine } from '@/lib/export/csv';
import { type Problem } from '@/lib/ingest/problem';

/** The problems of a file as a CSV: where, what was found, what would be right. */
export function problemsCsv(problems: readonly Problem[], marking: string | null): string {
  const marked = marking === null ? [] : [marking];
  const head = ['line', 'column', 'found', 'problem', 'kind', ...(marking === null ? [] : ['marking'])];
  return (
    csvLine(head) +
    problems
      .map(({ line, column, found, message, kind }) =>
        csvLine([line, column, found, message, kind, ...marked]),
      )
      .join('')
  );
}
