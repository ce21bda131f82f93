import { type Selectable } from 'kysely';
import { type RowVersionsTable } from '@/db/schema/lists';
import { type Component, type ComponentSigma } from '@/lib/mass/component';

/** The order in which a row's ten standard uncertainties are stored. */
export const SIGMA_FIELDS = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;

/** The columns that say where a stored row stands, in the order in which a row is written. */
export const PLACE_COLUMNS = [
  'list_no',
  'row_no',
  'sort_key',
  'fingerprint',
] as const satisfies readonly (keyof RowVersionsTable)[];

/** The columns of what a row says, in the order in which a row is written. */
export const VALUE_COLUMNS = [
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
] as const satisfies readonly (keyof RowVersionsTable)[];

export type StoredRow = Selectable<RowVersionsTable>;

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
