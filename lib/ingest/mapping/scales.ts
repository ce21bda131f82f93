import { listScales, type ScaledColumn, type Scales } from '@/lib/ingest/mass-list/columns';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { FACTORS, type Factor, type Unit } from '@/lib/units/table';
import { type ColumnUnit } from './unit-words';
import { type Mapping } from './mapping';

/** The factors of a mapped file: those of the list's declarations, but where a column is in a unit of its own. To SI in one step. */
export function mappedScales(declarations: ListDeclarations, columns: Mapping['columns']): Scales {
  const scales: Record<ScaledColumn, Factor> = { ...listScales(declarations) };
  const coverage = scales.mass_sigma.over / scales.mass.over;
  for (const { to } of columns) {
    if (to.use !== 'column' || to.unit === null || !isScaled(to.column, scales)) continue;
    const { times, over } = factorOf(to.unit);
    const product = /^i(?:xy|xz|yz)$/u.test(to.column) && declarations.products === 'negative';
    const sigma = to.column.endsWith('_sigma');
    scales[to.column] = { times: product ? -times : times, over: sigma ? over * coverage : over };
  }
  return scales;
}

function isScaled(column: string, scales: Scales): column is ScaledColumn {
  return Object.hasOwn(scales, column);
}

function factorOf(unit: ColumnUnit): Factor {
  switch (unit) {
    case 'deg':
      return { times: Math.PI, over: 180 };
    case 'rad':
    case 'fraction':
      return { times: 1, over: 1 };
    case 'percent':
      return { times: 1, over: 100 };
    default:
      return FACTORS[unit satisfies Unit];
  }
}
