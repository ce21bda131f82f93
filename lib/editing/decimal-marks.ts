import { MARK_OR_THOUSANDS } from '@/lib/ingest/table/number-text';

const COMMA = /^[+-]?(?:\d+,\d*|,\d+)(?:[eE][+-]?\d+)?$/u;

/**
 * A number as it is kept, from one as it was typed or pasted: blanks around it go, and a decimal comma that can be nothing else
 * becomes a point. 12,500 may be twelve thousand: it stays, to be refused at its cell.
 */
export function pointed(text: string): string {
  const trimmed = text.trim();
  return COMMA.test(trimmed) && !MARK_OR_THOUSANDS.test(trimmed) ? trimmed.replace(',', '.') : trimmed;
}

/** Among numbers that come together: one with a decimal comma, and one whose point may then separate thousands. Null if not both. */
export function mixedMarks(
  texts: Iterable<string>,
): { readonly comma: string; readonly doubtful: string } | null {
  let comma: string | null = null;
  let doubtful: string | null = null;
  for (const text of texts) {
    const trimmed = text.trim();
    if (COMMA.test(trimmed)) comma ??= trimmed;
    else if (trimmed.includes('.') && MARK_OR_THOUSANDS.test(trimmed)) doubtful ??= trimmed;
    if (comma !== null && doubtful !== null) return { comma, doubtful };
  }
  return null;
}
