import { type ReactNode } from 'react';

export type CellValue = string | number | null;

/** What a page says about a column. Values are in the column's unit and in full precision: they are sorted, copied and exported. */
export interface DataColumn<Row> {
  readonly id: string;
  readonly title: string;
  /** As printed in the head, e.g. `kg·m²`. */
  readonly unit?: string;
  readonly kind: 'text' | 'number';
  readonly value: (row: Row) => CellValue;
  /** px; a default by kind. */
  readonly width?: number;
  /** Most decimals shown; a number with fewer shows its own. Default 3. */
  readonly decimals?: number;
  /** Shown instead of the value: a link, a severity. */
  readonly cell?: (row: Row) => ReactNode;
  /** What stands in the foot and in subtotals, over the rows in question. */
  readonly total?: (rows: readonly Row[]) => CellValue;
  /** Looked through by the text filter. Default: text columns are, numbers are not. */
  readonly searched?: boolean;
}

export const DEFAULT_DECIMALS = 3;

export function columnWidth<Row>(column: DataColumn<Row>): number {
  return column.width ?? (column.kind === 'number' ? 112 : 176);
}

/** Decimals of a number as it was written, at most `most`. */
export function ownDecimals(value: number, most: number): number {
  const text = String(value);
  if (text.includes('e')) return most;
  const point = text.indexOf('.');
  return point < 0 ? 0 : Math.min(most, text.length - point - 1);
}

/** `Mass (kg)`: a column's name where its unit has no place of its own. */
export function columnName<Row>(column: DataColumn<Row>): string {
  return column.unit ? `${column.title} (${column.unit})` : column.title;
}
