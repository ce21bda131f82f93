import { type AirframeVec } from '@/lib/frames/tags';
import { CompensatedSum } from '@/lib/numerics/sums';

export interface Sums {
  /** kg */
  readonly mass: number;
  /** From the datum, m; null with a mass of zero or less. */
  readonly cg: AirframeVec | null;
}

/** Mass and CG of what stands at places; first moments are taken about `near`, a point of the aircraft, so that a far datum costs no digits. */
export function sumsOf(
  pieces: Iterable<{ readonly mass: number; readonly place: AirframeVec }>,
  near: AirframeVec,
): Sums {
  const mass = new CompensatedSum();
  const moments = [new CompensatedSum(), new CompensatedSum(), new CompensatedSum()] as const;
  for (const piece of pieces) {
    mass.add(piece.mass);
    for (const k of [0, 1, 2] as const) moments[k].addProduct(piece.mass, piece.place[k] - near[k]);
  }
  const total = mass.value;
  if (!(total > 0)) return { mass: total, cg: null };
  const along = (k: 0 | 1 | 2): number => near[k] + moments[k].value / total;
  return { mass: total, cg: [along(0), along(1), along(2)] };
}
