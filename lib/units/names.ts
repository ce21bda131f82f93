import {
  type AngularMomentumUnit,
  type InertiaUnit,
  type LengthUnit,
  type MassUnit,
  type Unit,
} from './table';

/** The units in which results leave: SI, or the customary ones of the United States (`?units=us`). */
export type UnitSystem = 'si' | 'us';
export const UNIT_SYSTEMS: readonly UnitSystem[] = ['si', 'us'];

export interface OutputUnits {
  readonly mass: MassUnit;
  readonly length: LengthUnit;
  readonly inertia: InertiaUnit;
  readonly angularMomentum: AngularMomentumUnit;
}

export const OUTPUT_UNITS: Readonly<Record<UnitSystem, OutputUnits>> = {
  si: { mass: 'kg', length: 'm', inertia: 'kg.m2', angularMomentum: 'kg.m2/s' },
  us: { mass: 'lb', length: 'in', inertia: 'slug.ft2', angularMomentum: 'slug.ft2/s' },
};

/** How a unit is set in print: `slug.ft2` as slug·ft². Codes in files and in the API stay plain. */
export function unitLabel(unit: Unit): string {
  return unit.replaceAll('.', '·').replaceAll('2', '²');
}

/**
 * The unit of `allowed` that `text` names, upper or lower case and surrounding blanks aside; null when it names none, for a
 * number without a declared unit is never guessed at.
 */
export function parseUnit<U extends Unit>(text: string, allowed: readonly U[]): U | null {
  const wanted = text.trim().toLowerCase();
  return allowed.find((unit) => unit.toLowerCase() === wanted) ?? null;
}
