import { columnLetters } from '@/lib/ingest/mapping/grid';
import { WORKBOOK_LIMITS } from './limits';
import { WorkbookRefused } from './refused';
import { unescapeXml } from './workbook';

/** A block of merged cells of more than one row; 0 is the first row and column. */
export interface Merged {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

// The inside of a cell ends at the latest where the next begins, so that no text is gone through twice.
const CELL = /<((?:\w+:)?)c\b([^>]*?)(?:\/>|>((?:[^<]|<(?!\/?(?:\w+:)?c\b))*)<\/\1c>)/gu;
const MERGED_CELLS = 1_000_000;
const ROW = /<(?:\w+:)?row\b[^>]*?\sr\s*=\s*["'](\d+)["']/gu;

/**
 * A sheet's XML in which cells that hold an error or a formula without a stored value hold its text instead: the library takes both
 * for empty cells. Throws for cells beyond the limits, before anything is built of their addresses.
 */
export function tellingSheet(xml: string, sheet: string): string {
  for (const [, row = ''] of xml.matchAll(ROW)) checkPlace(Number(row), 1, sheet);
  return xml.replace(CELL, (whole, _prefix: string, attributes: string, inner: string | undefined) => {
    const address = /\sr\s*=\s*["']([A-Z]+)(\d+)["']/u.exec(attributes);
    if (address === null)
      throw new WorkbookRefused(
        'workbook-unusual',
        `A cell of the sheet ${sheet} has no address. Save the workbook again as .xlsx.`,
      );
    checkPlace(Number(address[2]), columnNumber(address[1] ?? ''), sheet);
    const content = inner ?? '';
    const value = /<(?:\w+:)?v\b[^>]*>([^<]*)<\/(?:\w+:)?v>/u.exec(content)?.[1] ?? '';
    const formula = /<(?:\w+:)?f\b[^>]*>([^<]*)</u.exec(content)?.[1];
    const isError = /\st\s*=\s*["']e["']/u.test(attributes);
    if (isError) return textCell(address[0], value === '' ? '#ERROR!' : value);
    if (/<(?:\w+:)?f\b/u.test(content) && value === '' && !/\st\s*=\s*["']str["']/u.test(attributes))
      return textCell(address[0], `=${formula ?? '...'}`);
    return whole;
  });
}

/** Blocks of merged cells that go over more than one row. */
export function mergedRows(xml: string): Merged[] {
  const blocks: Merged[] = [];
  for (const [, from = '', top = '', to = '', bottom = ''] of xml.matchAll(
    /<(?:\w+:)?mergeCell\b[^>]*?\sref\s*=\s*["']([A-Z]+)(\d+):([A-Z]+)(\d+)["']/gu,
  )) {
    if (top === bottom) continue;
    blocks.push({
      top: Number(top) - 1,
      bottom: Math.min(Number(bottom), WORKBOOK_LIMITS.rows) - 1,
      left: columnNumber(from) - 1,
      right: Math.min(columnNumber(to), WORKBOOK_LIMITS.columns) - 1,
    });
  }
  return blocks;
}

/** A text stands in all rows of a merged block, for that is how it is read; of a number nobody knows whose it is, so it is named. */
export function fillMerged(rows: (string | number | null)[][], blocks: readonly Merged[]): void {
  let filled = 0;
  for (const { top, bottom, left } of blocks) {
    const value = rows[top]?.[left] ?? null;
    if (value === null) continue;
    for (let row = top + 1; row <= bottom; row += 1) {
      const cells = rows[row];
      if (cells === undefined) break;
      filled += 1;
      if (filled > MERGED_CELLS)
        throw new WorkbookRefused(
          'workbook-unusual',
          'The sheet has more merged cells than rows could need. Unmerge them.',
        );
      while (cells.length <= left) cells.push(null);
      cells[left] = typeof value === 'string' ? value : `merged with ${columnLetters(left)}${top + 1}`;
    }
  }
}

function textCell(address: string, text: string): string {
  const escaped = unescapeXml(text).replace(/&/gu, '&amp;').replace(/</gu, '&lt;');
  return `<c${address} t="str"><v>${escaped}</v></c>`;
}

function checkPlace(row: number, column: number, sheet: string): void {
  const { rows, columns } = WORKBOOK_LIMITS;
  if (row >= 1 && row <= rows && column <= columns) return;
  const where = column > columns ? `columns; at most ${columns}` : `rows; at most ${rows}`;
  throw new WorkbookRefused(
    'workbook-too-large',
    `The sheet ${sheet} uses more ${where} are read. Save it as CSV and upload that.`,
  );
}

/** A is 1. */
function columnNumber(letters: string): number {
  let number = 0;
  for (const letter of letters) number = number * 26 + letter.charCodeAt(0) - 64;
  return number;
}
