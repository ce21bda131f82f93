/** One thing wrong in a file: where (`line` is the physical line, 1 the first; null for the file), what was found, what would be right. */
export interface Problem {
  readonly kind: string;
  readonly line: number | null;
  readonly column: string | null;
  readonly found: string | null;
  readonly message: string;
}
