import { fromSi } from '@/lib/units/convert';
import { type Unit } from '@/lib/units/table';

import { shown } from './watch';

/** The unit of US screens beside each SI unit. */
const BESIDE = {
  kg: 'lb',
  m: 'in',
  'kg.m2': 'slug.ft2',
} as const satisfies Partial<Record<Unit, Unit>>;

export type SiUnit = keyof typeof BESIDE;

/**
 * `12.3 kg (27.12 lb)`: an SI value for a sentence that is kept with a roll-up or a baseline and read by people who work in either system.
 */
export function bothUnits(value: number, unit: SiUnit): string {
  const other = BESIDE[unit];
  return `${shown(value)} ${unit} (${shown(fromSi(value, other))} ${other})`;
}
