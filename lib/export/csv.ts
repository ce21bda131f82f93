import { neutraliseFormula } from '@/lib/export/formula-text';

/** A number, a text, or nothing. Texts are neutralised against spreadsheet formulas, numbers are written in full. */
export type CsvCell = string | number | null;

const NEEDS_QUOTES = /[",;\t\r\n]|^\s|\s$/u;

/** One comma-separated line with its CRLF (RFC 4180). Throws a RangeError for a number that is not finite. */
export function csvLine(cells: readonly CsvCell[]): string {
  return `${cells.map(cellText).join(',')}\r\n`;
}

function cellText(cell: CsvCell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') {
    if (!Number.isFinite(cell)) throw new RangeError(`A CSV file cannot hold the number ${cell}.`);
    return String(cell);
  }
  const text = neutraliseFormula(cell);
  return NEEDS_QUOTES.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
