import { type Delimiter } from '@/lib/ingest/csv/delimiter';

/** A cell as its file has it: text, or a number where the file itself knows its cells' kinds (a workbook). */
export type GridCell = string | number;

/** One row that is not blank. `line` is the physical line where it begins, or the row of a sheet; 1 is the first. */
export interface GridRow {
  readonly line: number;
  readonly cells: readonly GridCell[];
  /** The line of a quote that RFC 4180 does not allow. */
  readonly misplacedQuote?: number | null;
}

/** What a person and the guesses see of a file before it is read: its first rows and its last ones. */
export interface FileSample {
  /** Null for a workbook. */
  readonly delimiter: Delimiter | null;
  /** The sheet that the rows are of; null for text. */
  readonly sheet: string | null;
  /** Names of all sheets, in the workbook's order; empty for text. */
  readonly sheets: readonly string[];
  readonly head: readonly GridRow[];
  /** The last rows, those in `head` left out. */
  readonly tail: readonly GridRow[];
  /** Rows in all, blank ones left out. */
  readonly rows: number;
}

export const HEAD_ROWS = 60;
export const TAIL_ROWS = 12;

export function cellText(cell: GridCell | undefined): string {
  return cell === undefined ? '' : String(cell).trim();
}

/** The letters of a spreadsheet's column: 0 is A, 25 Z, 26 AA. */
export function columnLetters(index: number): string {
  let letters = '';
  for (let left = index + 1; left > 0; left = Math.floor((left - 1) / 26)) {
    letters = String.fromCharCode(65 + ((left - 1) % 26)) + letters;
  }
  return letters;
}

/** Where a cell is: "Sheet1!C12" in a workbook, else "line 12, field 3". */
export function cellPlace(sheet: string | null, line: number, index: number): string {
  return sheet === null ? `line ${line}, field ${index + 1}` : `${sheet}!${columnLetters(index)}${line}`;
}
