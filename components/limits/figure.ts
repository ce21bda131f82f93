import { type Limit, type LimitQuantity } from '@/lib/loading/limits';
import { asTyped } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

/** The unit that a limited quantity is shown in; null for % of the mean chord. */
export function unitOf(quantity: LimitQuantity, units: OutputUnits): Unit | null {
  if (quantity === 'mass') return units.mass;
  if (quantity === 'percentMac') return null;
  return quantity.startsWith('cg') ? units.length : units.inertia;
}

/** A limit's value as it was typed, in the units that are shown. */
export function limitFigure(
  { quantity, value }: Pick<Limit, 'quantity' | 'value'>,
  units: OutputUnits,
): { readonly value: number; readonly unit: string; readonly label: string } {
  const unit = unitOf(quantity, units);
  return unit === null
    ? { value, unit: '% MAC', label: '% MAC' }
    : { value: asTyped(value, unit), unit, label: unitLabel(unit) };
}

/** A limit as the texts of its form. */
export function limitFields(
  limit: Limit & { readonly id: string },
  units: OutputUnits,
): Readonly<Record<string, string>> {
  const { value, unit } = limitFigure(limit, units);
  return {
    id: limit.id,
    quantity: limit.quantity,
    sense: limit.sense,
    kind: limit.kind,
    group: limit.group,
    condition: limit.condition ?? '',
    value: String(value),
    unit,
    source: limit.source,
    source_date: limit.sourceDate,
    from: limit.from,
    until: limit.until ?? '',
  };
}
