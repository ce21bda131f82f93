import { addVec, dotVec, scaleVec, subVec } from '@/lib/numerics/vec3';

import { type AxisTriple, arrow } from './axes';
import { type AirframeVec } from './tags';

/**
 * CG in per cent of the mean aerodynamic chord, aft of its leading edge: 100 a.(r - r_LEMAC) / MAC, a the unit aft vector. The
 * incidence of the body axes plays no part. Null where no chord is known (mac not above 0).
 */
export function percentMac(
  cg: AirframeVec,
  lemac: AirframeVec,
  mac: number,
  axes: AxisTriple,
): number | null {
  if (!(mac > 0)) return null;
  return (100 * dotVec(arrow('aft', axes), subVec(cg, lemac))) / mac;
}

/** The point a quarter of the mean aerodynamic chord behind its leading edge, airframe components. */
export function quarterChord(lemac: AirframeVec, mac: number, axes: AxisTriple): AirframeVec {
  return addVec(lemac, scaleVec(mac / 4, arrow('aft', axes)));
}
