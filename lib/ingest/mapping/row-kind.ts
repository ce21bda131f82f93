import { positionOf, type ColumnUse, isNumberColumn } from './mapping';
import { cellText, type GridRow } from './grid';

/** What a row of a file is. `subtotal` and `total` may be left out as totals, once their sums have been looked at. */
export type RowKind = 'row' | 'total' | 'text' | 'heading';

interface MappedColumns {
  readonly columns: readonly { readonly heading: string; readonly to: ColumnUse | null }[];
}

/** Exactly a word for a sum, perhaps with what it is of: "TOTAL", "Sub-total:", "Total mass", "Σ". */
const SUM_WORD =
  /^(?:grand|overall|sub|group)?[ -]?(?:totals?|sum|Σ)(?: (?:mass|weight|wt|of all|all))?[ :.=]*$/iu;
/** Begins with one and goes on: a sum only where the row has no key. */
const SUM_BEGIN = /^(?:(?:grand|sub)[ -]?)?totals?\b/iu;

/**
 * Tells what rows are by their cells. A row whose key is blank or is itself the word is a total when a text of it says so; "Total
 * pressure probe" with an item of its own is a component.
 */
export class RowKinds {
  private readonly key: number;
  private readonly mass: number;
  private readonly numberColumns: readonly number[];
  private readonly headings: readonly string[];

  constructor({ columns }: MappedColumns) {
    const item = positionOf(columns, 'item');
    this.key = item === -1 ? positionOf(columns, 'part_number') : item;
    this.mass = positionOf(columns, 'mass');
    this.numberColumns = columns.flatMap(({ to }, index) =>
      to?.use === 'column' && isNumberColumn(to.column) ? [index] : [],
    );
    this.headings = columns.map(({ heading }) => same(heading));
  }

  kindOf({ cells }: GridRow): RowKind {
    const texts = cells.map((cell) => (typeof cell === 'string' ? cell.trim() : ''));
    if (this.isTotal(cells.map(cellText), texts)) return 'total';
    if (this.isHeading(texts)) return 'heading';
    const filled = cells.filter((cell) => cellText(cell) !== '');
    const alone =
      filled.length === 1 && typeof filled[0] === 'string' && !/^[+-]?[\d.,]+$/u.test(filled[0].trim());
    return alone && this.numberColumns.every((index) => cellText(cells[index]) === '') ? 'text' : 'row';
  }

  /** The first text of the row, by which people know it. */
  static words({ cells }: GridRow): string {
    return cells.map(cellText).find((text) => text !== '') ?? '';
  }

  private isTotal(all: readonly string[], texts: readonly string[]): boolean {
    if (this.mass !== -1 && all[this.mass] === '') return false;
    const key = this.key === -1 ? '' : (all[this.key] ?? '');
    const word = texts.findIndex((text) => SUM_WORD.test(text));
    if (word !== -1) return key === '' || word === this.key;
    const begins = texts.some((text) => SUM_BEGIN.test(text));
    if (begins && key === '') return true;
    // A key that begins so and stands alone among the texts: "Total wing", with figures only.
    return begins && SUM_BEGIN.test(key) && texts.filter((text) => text !== '').length === 1;
  }

  /** Most of its cells repeat the heading of their column. */
  private isHeading(texts: readonly string[]): boolean {
    let hits = 0;
    let filled = 0;
    for (const [index, text] of texts.entries()) {
      if (text === '') continue;
      filled += 1;
      const heading = this.headings[index] ?? '';
      if (heading !== '' && (heading === same(text) || (text.length > 2 && heading.includes(same(text)))))
        hits += 1;
    }
    return hits >= 2 && hits * 3 >= filled * 2;
  }
}

function same(text: string): string {
  return text.toLowerCase().replace(/\s+/gu, ' ').trim();
}
