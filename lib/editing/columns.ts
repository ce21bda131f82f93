import {
  ANGLES,
  CHANGE_COLUMNS,
  LIST_COLUMNS,
  type ListColumn,
  MOMENTS,
  PLACES,
  VALUES,
} from '@/lib/ingest/mass-list/columns';
import { type ListKind } from '@/lib/mass/declarations';

const NUMBERS: ReadonlySet<string> = new Set<string>([
  'quantity',
  'mass',
  ...PLACES,
  ...MOMENTS,
  ...ANGLES,
  'growth_percent',
  ...VALUES.map((value) => `${value}_sigma`),
]);

/** Whether a column of the contract holds numbers. Columns of a list's own hold texts. */
export function isNumberColumn(column: string): boolean {
  return NUMBERS.has(column);
}

/** The contract's columns that a list of this kind has. */
export function columnsOfKind(kind: ListKind): readonly ListColumn[] {
  const left: readonly ListColumn[] = kind === 'components' ? CHANGE_COLUMNS : [];
  return LIST_COLUMNS.filter((column) => !left.includes(column));
}
