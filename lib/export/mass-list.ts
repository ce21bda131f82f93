import { csvLine } from '@/lib/export/csv';
import { typedNumber } from '@/lib/export/typed-number';
import {
  CHANGE_COLUMNS,
  LIST_COLUMNS,
  type ListColumn,
  type ScaledColumn,
  listScales,
} from '@/lib/ingest/mass-list/columns';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

/** A row as the file holds it: numbers in the list's own units and signs, null where a cell is blank. */
export type ListCells = Readonly<Record<ListColumn, string | number | null>>;

/** Writes the lines of a mass list one after another, CRLF included. */
export interface MassListWriter {
  readonly columns: readonly ListColumn[];
  readonly header: string;
  cells(component: Component): ListCells;
  line(component: Component): string;
  /** The line of a row given cell by cell; `own` holds the texts of the list's own columns. */
  lineOf(cells: ListCells, own: Readonly<Record<string, string>>): string;
}

/**
 * A writer of the contract's CSV in the units and signs that the list declares; `own` names the list's own columns, in order.
 * What it writes reads back as the same components.
 */
export function massListWriter(declarations: ListDeclarations, own: readonly string[]): MassListWriter {
  const scales = listScales(declarations);
  const left: readonly ListColumn[] = declarations.kind === 'components' ? CHANGE_COLUMNS : [];
  const columns = LIST_COLUMNS.filter((column) => !left.includes(column));
  const cells = (component: Component): ListCells =>
    cellsOf(component, (value, column) => (value === null ? null : typedNumber(value, scales[column])));
  const lineOf: MassListWriter['lineOf'] = (row, texts) =>
    csvLine([...columns.map((column) => row[column]), ...own.map((name) => ownText(texts, name))]);
  return {
    columns,
    header: csvLine([...columns, ...own]),
    cells,
    line: (component) => lineOf(cells(component), component.extra),
    lineOf,
  };
}

function ownText(texts: Readonly<Record<string, string>>, name: string): string | null {
  return Object.hasOwn(texts, name) ? (texts[name] ?? null) : null;
}

function cellsOf(
  row: Component,
  typed: (value: number | null, column: ScaledColumn) => number | null,
): ListCells {
  const { moments, position, orientation, sigma } = row;
  return {
    item: row.item,
    part_number: row.partNumber,
    part_revision: row.partRevision,
    description: row.description,
    group: row.group,
    category: row.category,
    parent: row.parent,
    counting: row.counting,
    quantity: row.quantity,
    mass: typed(row.mass, 'mass'),
    x: typed(position[0], 'x'),
    y: typed(position[1], 'y'),
    z: typed(position[2], 'z'),
    ixx: typed(moments.ixx, 'ixx'),
    iyy: typed(moments.iyy, 'iyy'),
    izz: typed(moments.izz, 'izz'),
    ixy: typed(moments.ixy, 'ixy'),
    ixz: typed(moments.ixz, 'ixz'),
    iyz: typed(moments.iyz, 'iyz'),
    yaw: typed(orientation.yaw, 'yaw'),
    pitch: typed(orientation.pitch, 'pitch'),
    roll: typed(orientation.roll, 'roll'),
    symmetry: row.pair ? 'pair' : null,
    maturity: row.maturity,
    growth_percent: typed(row.growth, 'growth_percent'),
    mass_sigma: typed(sigma?.mass ?? null, 'mass_sigma'),
    x_sigma: typed(sigma?.x ?? null, 'x_sigma'),
    y_sigma: typed(sigma?.y ?? null, 'y_sigma'),
    z_sigma: typed(sigma?.z ?? null, 'z_sigma'),
    ixx_sigma: typed(sigma?.ixx ?? null, 'ixx_sigma'),
    iyy_sigma: typed(sigma?.iyy ?? null, 'iyy_sigma'),
    izz_sigma: typed(sigma?.izz ?? null, 'izz_sigma'),
    ixy_sigma: typed(sigma?.ixy ?? null, 'ixy_sigma'),
    ixz_sigma: typed(sigma?.ixz ?? null, 'ixz_sigma'),
    iyz_sigma: typed(sigma?.iyz ?? null, 'iyz_sigma'),
    source: row.source,
    source_date: row.sourceDate,
    note: row.note,
    change_ref: row.changeRef,
    status: row.status,
  };
}
