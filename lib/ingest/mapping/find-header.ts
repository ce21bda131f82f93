import { cellText, type GridRow } from './grid';
import { nameOf, readHeading } from './heading';
import { columnNamed } from './words';
import { unitOf } from './unit-words';

export interface HeaderPlace {
  readonly first: number;
  readonly last: number;
  /** Why these rows, in words. */
  readonly because: string;
}

/** Rows looked at for the headings. */
const SEARCHED = 40;

/**
 * The rows that hold the headings: the one with the most known names, a row of what they are part of above it ("CG", "Inertia") and
 * a row of units below it. Null where no row can be told to be one.
 */
export function findHeader(head: readonly GridRow[]): HeaderPlace | null {
  let best = -1;
  let bestHits = 0;
  for (const [index, row] of head.slice(0, SEARCHED).entries()) {
    const hits = knownNames(row);
    if (hits > bestHits && numbers(row) <= filled(row) / 4) [best, bestHits] = [index, hits];
  }
  const row = head[best];
  if (row === undefined || bestHits < 2) return null;
  const above = head[best - 1];
  const below = head[best + 1];
  const first = above !== undefined && isGroupRow(above, row) ? above.line : row.line;
  const last = below !== undefined && isUnitRow(below) ? below.line : row.line;
  const names = row.cells.map(cellText).filter((text) => columnNamed(readHeading(text).name) !== null);
  return {
    first,
    last,
    because: `It has ${bestHits} names of columns, among them ${names.slice(0, 3).join(', ')}.`,
  };
}

/** The headings of the columns: the texts of the header rows joined, those of a row above carried over the blanks that follow. */
export function headingsOf(
  head: readonly GridRow[],
  { first, last }: Pick<HeaderPlace, 'first' | 'last'>,
): string[] {
  const rows = head.filter(({ line }) => line >= first && line <= last);
  const names = rows.findLastIndex((row) => !isUnitRow(row));
  const width = Math.max(0, ...rows.map(widthOf));
  const joined = Array.from({ length: width }, (): string[] => []);
  for (const [index, row] of rows.entries()) {
    let carried = '';
    for (let at = 0; at < width; at += 1) {
      const own = oneLine(cellText(row.cells[at]));
      if (own !== '') carried = own;
      const below = rows[index + 1];
      const text =
        own === '' && index < names && below !== undefined && cellText(below.cells[at]) !== ''
          ? carried
          : own;
      if (text !== '' && joined[at]?.at(-1) !== text)
        joined[at]?.push(index > names && !/^[[(]/u.test(text) ? `[${text}]` : text);
    }
  }
  return joined.map((texts) => texts.join(' '));
}

/** Fields up to the last one that holds anything. */
export function widthOf({ cells }: GridRow): number {
  return cells.findLastIndex((cell) => cellText(cell) !== '') + 1;
}

function knownNames(row: GridRow): number {
  const columns = new Set<string>();
  for (const cell of row.cells) {
    if (typeof cell === 'number') continue;
    const found = columnNamed(readHeading(cell).name);
    if (found !== null && found.weight > 0.4) columns.add(found.column);
  }
  return columns.size;
}

/** "Centre of gravity" and "Inertia about own CG" over the columns that they are made of. */
function isGroupRow(row: GridRow, header: GridRow): boolean {
  const texts = row.cells.map(cellText);
  const from = texts.findIndex((text) => text !== '');
  if (from < 1 || numbers(row) > 0) return false;
  const over = texts.filter((text, index) => text !== '' && cellText(header.cells[index]) !== '');
  return (
    over.length > 0 &&
    over.some((text) =>
      /\b(?:cg|c g|cog|centre of gravity|center of gravity|centroid|inertia|moments?|products?|arm|location|position|coordinates?|sigma|uncertainty)\b/u.test(
        nameOf(text),
      ),
    )
  );
}

function isUnitRow(row: GridRow): boolean {
  const texts = row.cells.map(cellText).filter((text) => text !== '' && text !== '-');
  const plain = texts.map((text) => text.replace(/^[[(]|[\])]$/gu, ''));
  return plain.length >= 2 && plain.every((text) => unitOf(text) !== null);
}

function numbers({ cells }: GridRow): number {
  return cells.filter((cell) => typeof cell === 'number' || /^[+-]?[\d.,]*\d$/u.test(cell.trim())).length;
}

function filled({ cells }: GridRow): number {
  return cells.filter((cell) => cellText(cell) !== '').length;
}

function oneLine(text: string): string {
  return text.replace(/\s+/gu, ' ').trim();
}
