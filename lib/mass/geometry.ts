import { type AxisTriple } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';

/**
 * The part of a frame issue that the algebra needs. Airframe components, m, rad.
 *
 * `reference` is the fixed point r0 near the aircraft about which accounts are kept (never the datum); `lateralPlane` the
 * lateral coordinate y0 of the plane of symmetry; `incidence` body x nose-up from the reference line; `lemac` the leading edge
 * of the mean aerodynamic chord of length `mac` (0 where no chord is known: then nothing is stated in per cent of it).
 */
export interface AirframeGeometry {
  readonly axes: AxisTriple;
  readonly lateralPlane: number;
  readonly incidence: number;
  readonly reference: AirframeVec;
  readonly lemac: AirframeVec;
  readonly mac: number;
  readonly span: number;
  readonly length: number;
}

/** A frame of which only the axis directions are known, seen from `reference`; its plane of symmetry is at 0. */
export function bareGeometry(axes: AxisTriple, reference: AirframeVec): AirframeGeometry {
  return {
    axes,
    lateralPlane: 0,
    incidence: 0,
    reference,
    lemac: [0, 0, 0],
    mac: 0,
    span: 0,
    length: 0,
  };
}
