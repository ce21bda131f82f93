import { nameOf } from './heading';

/**
 * What a list knows a file's headings by: their words and their order, whatever case, blanks and marks between them. Units stand in
 * headings, so a changed unit is another signature.
 */
export function headingSignature(headings: readonly string[]): string {
  return JSON.stringify(
    headings.map((heading) => heading.normalize('NFKC').toLowerCase().replace(/\s+/gu, ' ').trim()),
  );
}

/** The first letters of headings, for people. */
export function headingWords(headings: readonly string[]): string {
  return headings
    .map(nameOf)
    .filter((name) => name !== '')
    .join(', ');
}
