import { type ListRow } from '@/lib/contracts/list-rows';
import { type Moments, NO_MOMENTS } from '@/lib/frames/products';
import { ANGLES, listScales, MOMENTS, PLACES, scaled } from '@/lib/ingest/mass-list/columns';
import { type Component } from '@/lib/mass/component';
import { type Part } from '@/lib/mass/contributions/effects';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';

/** A shown row with what places it, in SI. */
export type PlacedRow = Pick<
  Component,
  'mass' | 'position' | 'moments' | 'orientation' | 'quantity' | 'pair'
>;

/** The row as its list states it, in SI and list axes; null where it has no mass or place. */
export function placedRow({ cells }: ListRow, declarations: ListDeclarations): PlacedRow | null {
  const scales = listScales(declarations);
  const figure = (name: keyof typeof scales): number | null => {
    const cell = cells[name];
    return typeof cell === 'number' ? scaled(cell, scales[name]) : null;
  };
  const mass = figure('mass');
  const [x, y, z] = PLACES.map(figure);
  if (mass === null || typeof x !== 'number' || typeof y !== 'number' || typeof z !== 'number') return null;
  const moments: Record<keyof Moments, number> = { ...NO_MOMENTS };
  for (const name of MOMENTS) moments[name] = figure(name) ?? 0;
  const [yaw = 0, pitch = 0, roll = 0] = ANGLES.map((angle) => figure(angle) ?? 0);
  return {
    mass,
    position: [x, y, z],
    moments,
    orientation: { yaw, pitch, roll },
    quantity: typeof cells.quantity === 'number' ? cells.quantity : 1,
    pair: cells.symmetry === 'pair',
  };
}

/** Its accounts about the geometry's r0. */
export function partOfRow(row: PlacedRow, declarations: ListDeclarations, geometry: AirframeGeometry): Part {
  return new Placement(declarations, geometry).parts(row);
}

/** Whether a row is summed where rows of some categories are: counted, and approved where it is an adjustment. */
export function isSummed({ cells }: ListRow, categories: readonly string[]): boolean {
  return (
    (cells.counting ?? 'counted') === 'counted' &&
    (cells.status ?? 'approved') === 'approved' &&
    categories.includes(String(cells.category ?? 'empty'))
  );
}
