import { type Moments } from '@/lib/frames/products';
import { asTyped, toSi } from '@/lib/units/convert';
import { type InertiaUnit } from '@/lib/units/table';

/** Decimal places of a number as it prints: 2 for 12.25, 5 for 3e-5, 0 for 1200. */
function decimals(value: number): number {
  const [digits = '', exponent = '0'] = String(value).split('e');
  const [, fraction = ''] = digits.split('.');
  return Math.max(0, fraction.length - Number(exponent));
}

/** Whole numbers do not say how they were rounded (3 may be exact): they excuse this share of tr S at most. */
const WHOLE_NUMBERS = 0.01;

/**
 * What rounding in the source can do to an eigenvalue of S, kg.m2: each printed figure is off by half a unit of its last
 * place, the finest place among the six counting for all. A diagonal of S is half the sum of three moments, an off-diagonal
 * one product; by Gershgorin an eigenvalue moves by at most 1.5 half-units, and 2 more where products are stated.
 */
export function roundingOfPrinted(moments: Moments, unit: InertiaUnit): number {
  const printed = Object.values(moments).map((moment: number) => asTyped(moment, unit));
  const places = Math.max(...printed.map(decimals));
  const halfUnit = toSi(0.5 * 10 ** -places, unit);
  const hasProducts = moments.ixy !== 0 || moments.ixz !== 0 || moments.iyz !== 0;
  const rounding = (hasProducts ? 3.5 : 1.5) * halfUnit;
  if (places > 0) return rounding;
  const traceOfS = Math.abs(moments.ixx + moments.iyy + moments.izz) / 2;
  return Math.min(rounding, WHOLE_NUMBERS * traceOfS);
}
