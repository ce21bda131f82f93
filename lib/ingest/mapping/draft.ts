import { type Draft, dimensionOfColumn, type ColumnUse, type Mapping } from './mapping';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { readHeading } from './heading';
import { dimensionOf } from './unit-words';

/** A mapping as a draft that leaves nothing open. */
export function draftOf(mapping: Mapping): Draft {
  const { delimiter, sheet, header, columns, numbers, per, leaveOut } = mapping;
  return { delimiter, sheet, header, columns, numbers, per, leaveOut };
}

/** The draft with another use of one column. */
export function withUse(draft: Draft, index: number, to: ColumnUse | null): Draft {
  return {
    ...draft,
    columns: draft.columns.map((column, at) => (at === index ? { ...column, to } : column)),
  };
}

/** A column of the file as a column of the contract, in the unit that its heading says where it says one that fits. */
export function asColumn(column: ListColumn, heading: string): ColumnUse {
  const wanted = dimensionOfColumn(column);
  const { unit } = readHeading(heading);
  if (wanted === null) return { use: 'column', column, unit: null };
  if (unit !== null && dimensionOf(unit) === wanted) return { use: 'column', column, unit };
  return { use: 'column', column, unit: wanted === 'angle' ? 'deg' : wanted === 'share' ? 'percent' : null };
}
