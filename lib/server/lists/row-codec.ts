import { type Selectable } from 'kysely';
import { type MassRowsTable } from '@/db/schema/lists';
import { type Component, type ComponentSigma } from '@/lib/mass/component';

/** The order in which a row's ten standard uncertainties are stored. */
export const SIGMA_FIELDS = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;

/** The columns of a stored row in the order that COPY sends them; `revision_id` goes before. */
export const ROW_COLUMNS = [
  'position',
  'line',
  'item',
  'part_number',
  'part_revision',
  'description',
  'group_path',
  'category',
  'parent',
  'counting',
  'quantity',
  'mass',
  'x',
  'y',
  'z',
  'ixx',
  'iyy',
  'izz',
  'ixy',
  'ixz',
  'iyz',
  'yaw',
  'pitch',
  'roll',
  'pair',
  'maturity',
  'growth',
  'sigma',
  'source',
  'source_date',
  'note',
  'change_ref',
  'status',
  'extra',
] as const satisfies readonly (keyof MassRowsTable)[];

export type StoredRow = Selectable<MassRowsTable>;

type Value = string | number | boolean | null | readonly (number | null)[];

/** A component as the values of `ROW_COLUMNS`. */
export function rowValues(component: Component, position: number, line: number | null): Value[] {
  const { position: place, moments, orientation, sigma, extra } = component;
  return [
    position,
    line,
    component.item,
    component.partNumber,
    component.partRevision,
    component.description,
    component.group,
    component.category,
    component.parent,
    component.counting,
    component.quantity,
    component.mass,
    place[0],
    place[1],
    place[2],
    moments.ixx,
    moments.iyy,
    moments.izz,
    moments.ixy,
    moments.ixz,
    moments.iyz,
    orientation.yaw,
    orientation.pitch,
    orientation.roll,
    component.pair,
    component.maturity,
    component.growth,
    sigma === null ? null : SIGMA_FIELDS.map((field) => sigma[field]),
    component.source,
    component.sourceDate,
    component.note,
    component.changeRef,
    component.status,
    Object.keys(extra).length === 0 ? null : JSON.stringify(extra),
  ];
}

/** One line of PostgreSQL's COPY text format; numbers in the shortest form that reads back to the same bits. */
export function copyLine(values: readonly Value[]): string {
  return `${values.map(copyField).join('\t')}\n`;
}

function copyField(value: Value): string {
  if (value === null) return '\\N';
  if (typeof value === 'string') return escapeText(value);
  if (typeof value === 'object')
    return `{${value.map((one) => (one === null ? 'NULL' : String(one))).join(',')}}`;
  return String(value);
}

function escapeText(text: string): string {
  return text.replace(/[\\\t\n\r]/g, (character) => ESCAPES[character] ?? character);
}

const ESCAPES: Readonly<Record<string, string>> = { '\\': '\\\\', '\t': '\\t', '\n': '\\n', '\r': '\\r' };

/** A stored row as the component it came from. */
export function componentOf(row: StoredRow): Component {
  return {
    item: row.item,
    partNumber: row.part_number,
    partRevision: row.part_revision,
    description: row.description,
    group: row.group_path,
    category: row.category,
    parent: row.parent,
    counting: row.counting,
    quantity: row.quantity,
    mass: row.mass,
    position: [row.x, row.y, row.z],
    moments: { ixx: row.ixx, iyy: row.iyy, izz: row.izz, ixy: row.ixy, ixz: row.ixz, iyz: row.iyz },
    orientation: { yaw: row.yaw, pitch: row.pitch, roll: row.roll },
    pair: row.pair,
    maturity: row.maturity,
    growth: row.growth,
    sigma: sigmaOf(row.sigma),
    source: row.source,
    sourceDate: row.source_date,
    note: row.note,
    changeRef: row.change_ref,
    status: row.status,
    extra: row.extra ?? {},
  };
}

function sigmaOf(stored: readonly (number | null)[] | null): ComponentSigma | null {
  if (stored === null) return null;
  const [mass, x, y, z, ixx, iyy, izz, ixy, ixz, iyz] = stored;
  return {
    mass: mass ?? null,
    x: x ?? null,
    y: y ?? null,
    z: z ?? null,
    ixx: ixx ?? null,
    iyy: iyy ?? null,
    izz: izz ?? null,
    ixy: ixy ?? null,
    ixz: ixz ?? null,
    iyz: iyz ?? null,
  };
}
