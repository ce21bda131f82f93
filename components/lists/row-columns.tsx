import { type CellValue, type DataColumn } from '@/components/data-table/column';
import { type ListRow, type RowTotals } from '@/lib/contracts/list-rows';
import { groupingOf, ownColumn, type SortColumn } from '@/lib/contracts/list-view';
import { type ListColumn, MOMENTS, PLACES } from '@/lib/ingest/mass-list/columns';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

export type RowColumn = DataColumn<ListRow> & { readonly id: Exclude<SortColumn, 'position'> };

/**
 * All columns that the rows of a list can show, its own ones last: figures as the list states them, its units and axes in the heads,
 * edited rows marked. Which of them are shown unless others are chosen, `isUsual` tells.
 */
export function rowColumns(
  { massUnit, lengthUnit, inertiaUnit, axes, kind }: ListDeclarations,
  own: readonly string[],
): readonly RowColumn[] {
  const value =
    (column: ListColumn) =>
    (row: ListRow): CellValue =>
      row.cells[column] ?? null;
  const text = (id: ListColumn, title: string, width: number): RowColumn => ({
    id,
    title,
    kind: 'text',
    width,
    value: value(id),
  });
  const number = (
    id: ListColumn,
    title: string,
    unit: string | null,
    decimals: number,
    width = 112,
  ): RowColumn => ({
    id,
    title,
    ...(unit === null ? {} : { unit }),
    kind: 'number',
    decimals,
    width,
    value: value(id),
  });
  const [mass, length, inertia] = [unitLabel(massUnit), unitLabel(lengthUnit), unitLabel(inertiaUnit)];
  return [
    text('item', 'Item', 152),
    text('description', 'Description', 224),
    text('group', 'Group', 176),
    text('part_number', 'Part number', 152),
    number('quantity', 'Quantity', null, 0, 88),
    number('mass', 'Mass', mass, 4),
    number('x', `x ${axes[0]}`, length, 4, 120),
    number('y', `y ${axes[1]}`, length, 4, 120),
    number('z', `z ${axes[2]}`, length, 4, 120),
    number('ixx', 'Ixx', inertia, 4, 144),
    number('iyy', 'Iyy', inertia, 4, 144),
    number('izz', 'Izz', inertia, 4, 144),
    number('ixy', 'Ixy', inertia, 4, 144),
    number('ixz', 'Ixz', inertia, 4, 144),
    number('iyz', 'Iyz', inertia, 4, 144),
    text('category', 'Category', 104),
    text('maturity', 'Maturity', 88),
    number('growth_percent', 'Growth', '%', 2, 96),
    text('part_revision', 'Part revision', 112),
    text('parent', 'Assembly', 152),
    text('counting', 'Counting', 96),
    number('yaw', 'Yaw', 'deg', 3, 96),
    number('pitch', 'Pitch', 'deg', 3, 96),
    number('roll', 'Roll', 'deg', 3, 96),
    text('symmetry', 'Symmetry', 96),
    number('mass_sigma', 'Mass σ', mass, 4),
    ...PLACES.map((place) => number(`${place}_sigma`, `${place} σ`, length, 4)),
    ...MOMENTS.map((moment) => number(`${moment}_sigma`, `${upper(moment)} σ`, inertia, 4, 144)),
    text('source', 'Source', 176),
    text('source_date', 'Source date', 112),
    text('note', 'Note', 224),
    ...(kind === 'adjustments' ? [text('change_ref', 'Change', 128), text('status', 'Status', 96)] : []),
    ...own.map((name): RowColumn => ({
      id: ownColumn(name),
      title: name,
      kind: 'text',
      width: 152,
      value: (row) => (Object.hasOwn(row.own, name) ? (row.own[name] ?? null) : null),
    })),
  ];
}

const upper = (name: string): string => name.charAt(0).toUpperCase() + name.slice(1);

const USUAL: readonly string[] = [
  'item',
  'description',
  'group',
  'part_number',
  'quantity',
  'mass',
  ...PLACES,
  ...MOMENTS,
  'category',
  'maturity',
  'growth_percent',
];

/** Whether a column is shown unless others are chosen. */
export const isUsual = ({ id }: Pick<RowColumn, 'id'>): boolean => USUAL.includes(id);

/** Columns by whose values rows can be put into groups. */
export function groupingColumns(columns: readonly RowColumn[]): readonly RowColumn[] {
  return columns.filter(({ id }) => groupingOf(id) !== undefined);
}

/** What stands under the columns: sums, and the CG under the coordinates. */
export function totalCells(totals: RowTotals): Readonly<Record<string, CellValue>> {
  return {
    quantity: totals.pieces,
    mass: totals.mass,
    x: totals.cg?.[0] ?? null,
    y: totals.cg?.[1] ?? null,
    z: totals.cg?.[2] ?? null,
  };
}
