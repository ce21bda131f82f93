import { neutraliseFormula, restoreFormula } from '@/lib/export/formula-text';

/** Cells as a spreadsheet puts them on the clipboard: rows of texts. */
export type Block = readonly (readonly string[])[];

const NEEDS_QUOTES = /["\t\r\n]/u;

/** Tab-separated text that spreadsheets take: cells with tabs, quotes or line breaks in quotes, formulas made harmless. */
export function writeBlock(block: Block): string {
  return block
    .map((row) =>
      row
        .map((cell) => {
          const text = neutraliseFormula(cell);
          return NEEDS_QUOTES.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
        })
        .join('\t'),
    )
    .join('\n');
}

/**
 * Reads what a spreadsheet put on the clipboard. A cell in quotes may hold tabs, line breaks and doubled quotes; a quote that does
 * not close its cell is a mark like any other (5" bolt). The line break at the end begins no row. Rows of different
 * lengths are filled up with blank cells.
 */
export function readBlock(text: string): Block {
  const rows: string[][] = [];
  let row: string[] = [];
  let at = 0;
  while (at <= text.length) {
    const { cell, end } = cellAt(text, at);
    row.push(restoreFormula(cell));
    if (text[end] !== '\t') {
      rows.push(row);
      row = [];
    }
    at = end + (text.startsWith('\r\n', end) ? 2 : 1);
    if (row.length === 0 && at >= text.length) break;
  }
  const width = Math.max(...rows.map(({ length }) => length));
  return rows.map((cells) => [...cells, ...Array<string>(width - cells.length).fill('')]);
}

const ENDS_CELL = /[\t\r\n]/gu;

function cellAt(text: string, start: number): { readonly cell: string; readonly end: number } {
  if (text[start] === '"') {
    const quoted = quotedAt(text, start);
    if (quoted !== null) return quoted;
  }
  ENDS_CELL.lastIndex = start;
  const end = ENDS_CELL.exec(text)?.index ?? text.length;
  return { cell: text.slice(start, end), end };
}

/** Null where the quote is not closed right before the end of a cell. */
function quotedAt(text: string, start: number): { readonly cell: string; readonly end: number } | null {
  let close = text.indexOf('"', start + 1);
  while (close !== -1 && text[close + 1] === '"') close = text.indexOf('"', close + 2);
  if (close === -1) return null;
  const end = close + 1;
  if (end < text.length && !'\t\r\n'.includes(text[end] ?? '')) return null;
  return { cell: text.slice(start + 1, close).replaceAll('""', '"'), end };
}
