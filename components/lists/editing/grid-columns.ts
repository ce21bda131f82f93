import { type DataColumn } from '@/components/data-table/column';

import { columnsOfKind, isNumberColumn } from '@/lib/editing/columns';
import { type Texts } from '@/lib/editing/edits';
import { type BaseRow } from '@/lib/editing/sheet';
import { CHANGE_COLUMNS, MOMENTS, type ListColumn } from '@/lib/ingest/mass-list/columns';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

/** A column of the editing grid; `choices` are the words that it takes. */
export interface GridColumn extends DataColumn<BaseRow> {
  readonly width: number;
  readonly choices?: readonly string[];
}

const CHOICES: Readonly<Partial<Record<ListColumn, readonly string[]>>> = {
  category: CATEGORIES,
  counting: ['counted', 'memo'],
  symmetry: ['pair'],
  maturity: MATURITIES,
  status: CHANGE_STATUSES,
};

const WIDTHS: Readonly<Partial<Record<ListColumn, number>>> = {
  item: 168,
  description: 224,
  group: 176,
  quantity: 80,
  maturity: 80,
  symmetry: 88,
  growth_percent: 96,
  part_revision: 112,
  yaw: 80,
  pitch: 80,
  roll: 80,
  note: 224,
};

/** The order in which a row is read: what it is, how much and where, then the rest. */
const FIRST: readonly ListColumn[] = [
  'item',
  'description',
  'group',
  'quantity',
  'mass',
  'x',
  'y',
  'z',
  ...MOMENTS,
  'category',
  'maturity',
  'growth_percent',
  'symmetry',
  'note',
];

/** What a column holds in rows that say nothing by it. */
const DEFAULTS: Readonly<Record<string, string>> = { yaw: '0', pitch: '0', roll: '0', counting: 'counted' };

/** Columns that are not shown at first, for none of some rows says anything by them. */
export function unusedColumns(columns: readonly GridColumn[], rows: readonly Texts[]): readonly string[] {
  const always: readonly string[] = [...FIRST, ...CHANGE_COLUMNS];
  return columns
    .map(({ id }) => id)
    .filter((id) => !always.includes(id) && !rows.some((row) => (row[id] ?? '') !== (DEFAULTS[id] ?? '')));
}

/** The contract's columns in the units, axes and signs of the list, then the list's own. */
export function gridColumns(declarations: ListDeclarations, own: readonly string[]): readonly GridColumn[] {
  const columns = columnsOfKind(declarations.kind);
  const ordered = [...FIRST, ...columns.filter((column) => !FIRST.includes(column))];
  return [
    ...ordered.map((column): GridColumn => {
      const unit = unitOf(column, declarations);
      const choices = CHOICES[column];
      return {
        id: column,
        title: titleOf(column, declarations.axes),
        kind: isNumberColumn(column) ? 'number' : 'text',
        width: WIDTHS[column] ?? (isNumberColumn(column) ? 112 : 144),
        value: (row) => row.texts[column] ?? null,
        ...(unit === null ? {} : { unit }),
        ...(choices === undefined ? {} : { choices }),
      };
    }),
    ...own.map((name): GridColumn => ({
      id: name,
      title: name,
      kind: 'text',
      width: 128,
      value: (row) => row.texts[name] ?? null,
    })),
  ];
}

const TITLES: Readonly<Partial<Record<string, string>>> = {
  growth_percent: 'Growth',
  part_number: 'Part number',
  part_revision: 'Part revision',
  source_date: 'Source date',
  change_ref: 'Change reference',
};

function titleOf(column: string, axes: ListDeclarations['axes']): string {
  const sigma = /^(.+)_sigma$/.exec(column)?.[1];
  if (sigma !== undefined) return `${titleOf(sigma, axes)}, sigma`;
  if (/^i[xyz]{2}$/.test(column)) return `I${column.slice(1)}`;
  const axis = ['x', 'y', 'z'].indexOf(column);
  if (axis >= 0) return `${column} ${axes[axis] ?? ''}`;
  return TITLES[column] ?? `${(column[0] ?? '').toUpperCase()}${column.slice(1)}`;
}

function unitOf(column: string, { massUnit, lengthUnit, inertiaUnit }: ListDeclarations): string | null {
  const value = column.replace(/_sigma$/, '');
  if (value === 'mass') return unitLabel(massUnit);
  if (['x', 'y', 'z'].includes(value)) return unitLabel(lengthUnit);
  if (/^i[xyz]{2}$/.test(value)) return unitLabel(inertiaUnit);
  if (['yaw', 'pitch', 'roll'].includes(value)) return 'deg';
  return value === 'growth_percent' ? '%' : null;
}
