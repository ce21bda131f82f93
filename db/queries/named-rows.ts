import { type Db } from '@/db/client';
import { type Component } from '@/lib/mass/component';

export type NamedRow = Pick<Component, 'item' | 'mass' | 'moments' | 'orientation'>;

/** The rows of a revision that have one of these items, in no order. */
export async function rowsNamed(db: Db, revisionId: string, items: readonly string[]): Promise<NamedRow[]> {
  if (items.length === 0) return [];
  const rows = await db
    .selectFrom('mass_rows')
    .select(['item', 'mass', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz', 'yaw', 'pitch', 'roll'])
    .where('revision_id', '=', revisionId)
    .where('item', 'in', items)
    .execute();
  return rows.map(({ item, mass, yaw, pitch, roll, ...moments }) => ({
    item,
    mass,
    moments,
    orientation: { yaw, pitch, roll },
  }));
}
