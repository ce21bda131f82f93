import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type ColumnUnit, type Dimension } from './unit-words';
import { type NumberStyle } from './number-style';

/** What becomes of a column of the file. `unit` null: as the list declares, or no unit at all. */
export type ColumnUse =
  | { readonly use: 'column'; readonly column: ListColumn; readonly unit: ColumnUnit | null }
  | { readonly use: 'extra' }
  | { readonly use: 'ignored' };

export interface MappedColumn {
  /** As the file has it, its header rows joined. */
  readonly heading: string;
  readonly to: ColumnUse;
}

/** Rows that are no components: totals, rows of one text alone (titles between rows, notes), repeated headings. */
export interface LeaveOut {
  readonly totals: boolean;
  readonly texts: boolean;
  readonly headings: boolean;
}

/** How one file is read into the contract's columns. Version 1. */
export interface Mapping {
  readonly version: 1;
  /** Null for a workbook. */
  readonly delimiter: Delimiter | null;
  readonly sheet: string | null;
  /** Lines of the file, or rows of the sheet, that hold the headings. */
  readonly header: { readonly first: number; readonly last: number };
  /** One for every column of the file, in its order. */
  readonly columns: readonly MappedColumn[];
  readonly numbers: NumberStyle;
  /** Mass and own inertia of a row are of one piece, or of all its pieces together. */
  readonly per: 'piece' | 'row';
  readonly leaveOut: LeaveOut;
}

/** A mapping in the making: null is what nobody has decided yet. */
export interface Draft {
  readonly delimiter: Delimiter | null;
  readonly sheet: string | null;
  readonly header: { readonly first: number; readonly last: number } | null;
  readonly columns: readonly { readonly heading: string; readonly to: ColumnUse | null }[];
  readonly numbers: NumberStyle | null;
  readonly per: 'piece' | 'row' | null;
  readonly leaveOut: { readonly [kind in keyof LeaveOut]: boolean | null };
}

/** What a contract column measures; null for texts and counts. */
export function dimensionOfColumn(column: ListColumn): Dimension | null {
  if (column === 'growth_percent') return 'share';
  const value = column.replace(/_sigma$/u, '');
  if (value === 'mass') return 'mass';
  if (value === 'x' || value === 'y' || value === 'z') return 'length';
  if (value === 'yaw' || value === 'pitch' || value === 'roll') return 'angle';
  return /^i[xyz]{2}$/u.test(value) ? 'inertia' : null;
}

export function isNumberColumn(column: ListColumn): boolean {
  return column === 'quantity' || dimensionOfColumn(column) !== null;
}

/** The position of a contract column in a file, or -1. */
export function positionOf(
  columns: readonly { readonly to: ColumnUse | null }[],
  column: ListColumn,
): number {
  return columns.findIndex(({ to }) => to?.use === 'column' && to.column === column);
}
