import { TensorPlate } from '@/components/mass/tensor-plate';
import { type ListRow } from '@/lib/contracts/list-rows';
import { listScales, MOMENTS, scaled } from '@/lib/ingest/mass-list/columns';
import { type Moments, NO_MOMENTS } from '@/lib/frames/products';
import { type ListDeclarations } from '@/lib/mass/declarations';

/** A row's own tensor as a plate: whatever sign the list states its products with, the plate says which it shows. */
export function OwnTensor({
  row,
  declarations,
}: {
  readonly row: ListRow;
  readonly declarations: ListDeclarations;
}) {
  const moments = momentsOf(row, declarations);
  if (Object.values(moments).every((value) => value === 0)) return null;
  const turned = ['yaw', 'pitch', 'roll'].some(
    (angle) => row.cells[angle as 'yaw'] !== undefined && row.cells[angle as 'yaw'] !== 0,
  );
  const [x, y, z] = declarations.axes;
  return (
    <TensorPlate
      moments={moments}
      unit={declarations.inertiaUnit}
      title={turned ? 'Inertia about its own CG, own axes' : 'Inertia about its own CG, list axes'}
      axes={turned ? { x: 'own', y: 'own', z: 'own' } : { x, y, z }}
    />
  );
}

function momentsOf({ cells }: ListRow, declarations: ListDeclarations): Moments {
  const scales = listScales(declarations);
  const moments: Record<keyof Moments, number> = { ...NO_MOMENTS };
  for (const name of MOMENTS) {
    const cell = cells[name];
    if (typeof cell === 'number') moments[name] = scaled(cell, scales[name]);
  }
  return moments;
}
