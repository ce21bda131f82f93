import { FOUND_LENGTH, PROBLEMS_KEPT } from '@/lib/ingest/limits';
import { type Problem } from '@/lib/ingest/problem';

/** Collects the problems of one file: the first 200, and the number of every kind. */
export class ProblemLog {
  private readonly kept: Problem[] = [];
  private readonly byKind = new Map<string, number>();
  total = 0;

  /** `found` is the text as the file has it; it is shortened for showing. */
  add(problem: Problem): void {
    this.total += 1;
    this.byKind.set(problem.kind, (this.byKind.get(problem.kind) ?? 0) + 1);
    if (this.kept.length >= PROBLEMS_KEPT) return;
    this.kept.push({ ...problem, found: problem.found === null ? null : shorten(problem.found) });
  }

  /** Problems kept, in the order of the file. */
  problems(): Problem[] {
    return this.kept.toSorted((a, b) => (a.line ?? 0) - (b.line ?? 0));
  }

  counts(): Record<string, number> {
    return Object.fromEntries(this.byKind);
  }
}

/** One line of text of at most 80 characters. */
export function shorten(text: string): string {
  const line = text.replace(/\s+/gu, ' ').trim();
  const characters = Array.from(line.slice(0, 2 * FOUND_LENGTH + 2));
  return characters.length <= FOUND_LENGTH ? line : `${characters.slice(0, FOUND_LENGTH - 1).join('')}…`;
}

/** "Line 214, column izz: ..." */
export function problemSentence({ line, column, message }: Problem): string {
  const place = [line === null ? null : `line ${line}`, column === null ? null : `column ${column}`]
    .filter((part) => part !== null)
    .join(', ');
  return place === '' ? message : `${place[0]?.toUpperCase() ?? ''}${place.slice(1)}: ${message}`;
}
