import { type AccountQuantity } from '@/lib/baselines/mass-account';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

export const QUANTITY_NAMES: Readonly<Record<AccountQuantity, string>> = {
  mass: 'Mass',
  cgx: 'CG x',
  cgy: 'CG y',
  cgz: 'CG z',
  ixx: 'Ixx',
  iyy: 'Iyy',
  izz: 'Izz',
  ixy: 'Ixy',
  ixz: 'Ixz',
  iyz: 'Iyz',
};

export interface ShownQuantity {
  readonly name: string;
  readonly unit: string;
  /** From SI. */
  readonly shown: (value: number) => number;
}

/** A quantity of the mass account as a reader sees it. */
export function shownQuantity(quantity: AccountQuantity, units: OutputUnits): ShownQuantity {
  const unit: Unit =
    quantity === 'mass' ? units.mass : quantity.startsWith('cg') ? units.length : units.inertia;
  return {
    name: QUANTITY_NAMES[quantity],
    unit: unitLabel(unit),
    shown: (value) => fromSi(value, unit),
  };
}
