import { type AxisTriple } from '@/lib/frames/axes';
import { type Vec3 } from '@/lib/numerics/vec3';

/**
 * The part of a frame issue that the algebra needs. Airframe components, m, rad.
 *
 * `reference` is the fixed point r0 near the aircraft about which accounts are kept (never the datum); `lateralPlane` the
 * lateral coordinate y0 of the plane of symmetry; `incidence` body x nose-up from the reference line; `lemac` the leading edge
 * of the mean aerodynamic chord of length `mac`.
 */
export interface AirframeGeometry {
  readonly axes: AxisTriple;
  readonly lateralPlane: number;
  readonly incidence: number;
  readonly reference: Vec3;
  readonly lemac: Vec3;
  readonly mac: number;
  readonly span: number;
  readonly length: number;
}
