import { type RowBlock } from '@/lib/ingest/blocks/row-block';

import { LEAST_TRANSFER, MOST_TRANSFER, leastTrace } from '../rows/size';
import { TRAITS } from './traits';

/** By so much a figure has to be beyond doubt: far more than the rounding of the few operations that lead to it. */
const DOUBT = 1e-9;
/** leastTrace(m)³ = this m⁵: the comparison without its fractional power. */
const LEAST_CUBED = leastTrace(1) ** 3;

/**
 * The traits of a row with own moments. Each is a bound that is cheap and errs to one side: a row without the trait cannot be one that
 * the rule sees, a row with it may be.
 */
export function ownMomentTraits(numbers: RowBlock['numbers'], row: number, half: number): number {
  const mass = Math.abs(numbers.mass[row] ?? NaN);
  const sign = (numbers.mass[row] ?? NaN) < 0 ? -1 : 1;
  const ixx = sign * (numbers.ixx[row] ?? NaN);
  const iyy = sign * (numbers.iyy[row] ?? NaN);
  const izz = sign * (numbers.izz[row] ?? NaN);
  // Diagonal of S.
  const xx = (iyy + izz - ixx) / 2;
  const yy = (ixx + izz - iyy) / 2;
  const zz = (ixx + iyy - izz) / 2;
  const trace = xx + yy + zz;
  let bits = 0;
  if (!isSurelyReal(numbers, row, xx, yy, zz)) bits |= TRAITS.tensor;
  const cube = trace * trace * trace;
  const least = LEAST_CUBED * mass * mass * mass * mass * mass;
  if (!(cube > least * (1 + DOUBT)) || least < 1e-280) bits |= TRAITS.dense;
  if (half > 0 && !(Math.max(xx, yy, zz) < mass * half * half * (1 - DOUBT))) bits |= TRAITS.reach;
  const x = numbers.x[row] ?? NaN;
  const y = numbers.y[row] ?? NaN;
  const z = numbers.z[row] ?? NaN;
  const transfer = mass * (x * x + y * y + z * z);
  if (trace >= LEAST_TRANSFER * (1 - DOUBT) * transfer && trace <= MOST_TRANSFER * (1 + DOUBT) * transfer)
    bits |= TRAITS.transfer;
  return bits;
}

/** Whether S is positive definite beyond doubt: its leading minors are (Sylvester), each by a share of what it is made of. */
function isSurelyReal(
  numbers: RowBlock['numbers'],
  row: number,
  xx: number,
  yy: number,
  zz: number,
): boolean {
  const sign = (numbers.mass[row] ?? NaN) < 0 ? -1 : 1;
  const xy = sign * (numbers.ixy[row] ?? NaN);
  const xz = sign * (numbers.ixz[row] ?? NaN);
  const yz = sign * (numbers.iyz[row] ?? NaN);
  const trace = xx + yy + zz;
  if (!(Math.min(xx, yy, zz) > DOUBT * trace)) return false;
  if (xy === 0 && xz === 0 && yz === 0) return true;
  const minor = xx * yy - xy * xy;
  const determinant = zz * minor - xx * yz * yz - yy * xz * xz + 2 * xy * xz * yz;
  return minor > DOUBT * xx * yy && determinant > DOUBT * xx * yy * zz;
}
