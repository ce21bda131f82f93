import { airframeToBody, toBody } from '@/lib/frames/body';
import { type BodyVec, type In } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { CompensatedSums } from '@/lib/numerics/sums';
import { type Sym3, outer } from '@/lib/numerics/sym3';
import { ZERO_VEC, addVec, scaleVec } from '@/lib/numerics/vec3';

import { spinArrow } from './axis';
import { shaftsWithoutSpeed } from './momentum';
import { type OperatingPoint, type Rotor } from './rotor';

export interface MomentumUncertainty {
  /** σ of hx, hy, hz in body axes, kg.m2/s. */
  readonly sigma: BodyVec;
  /** Covariance matrix of h in body axes, (kg.m2/s)2. */
  readonly covariance: In<'body', Sym3>;
  /** Rotors that state no σ of their polar inertia: it counts as certain. */
  readonly rotorsWithoutSigma: readonly string[];
  /** Shafts that carry a rotor and state no σ of their speed. */
  readonly shaftsWithoutSigma: readonly string[];
}

/**
 * Uncertainty of the angular momentum at one operating point, to first order (JCGM 100:2008, clause 5). h = Σ I n Ω e, n the gear
 * ratio: each polar inertia errs on its own, while the speed of a shaft errs for all rotors on it at once, so their changes are added,
 * with their signs, before they are squared. Gear ratios and axes are certain.
 *
 * @throws RangeError naming the shafts for which the point states no speed, or the rotor whose axis is not sound.
 */
export function momentumUncertainty(
  rotors: readonly Rotor[],
  point: Pick<OperatingPoint, 'code' | 'speeds'>,
  geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>,
): MomentumUncertainty {
  const missing = shaftsWithoutSpeed(rotors, point);
  if (missing.length > 0)
    throw new RangeError(`Operating point ${point.code} states no speed for: ${missing.join(', ')}.`);
  const a = airframeToBody(geometry.axes, geometry.incidence);
  const speeds = new Map(point.speeds.map((speed) => [speed.shaft, speed]));
  // Along each shaft: how h changes per rad/s of its speed.
  const perSpeed = new Map<string, BodyVec>();
  const changes: BodyVec[] = [];
  for (const { axis, gearRatio, shaft, polarInertia, polarInertiaSigma } of rotors) {
    const geared = scaleVec(gearRatio, toBody(a, spinArrow(axis, geometry.axes)));
    perSpeed.set(shaft, addVec(perSpeed.get(shaft) ?? ZERO_VEC, scaleVec(polarInertia, geared)));
    changes.push(scaleVec((polarInertiaSigma ?? 0) * (speeds.get(shaft)?.speed ?? NaN), geared));
  }
  for (const [shaft, change] of perSpeed) changes.push(scaleVec(speeds.get(shaft)?.sigma ?? 0, change));

  const sum = new CompensatedSums(6);
  for (const change of changes) {
    const { xx, yy, zz, xy, xz, yz } = outer(change);
    sum.add([xx, yy, zz, xy, xz, yz]);
  }
  const [xx = 0, yy = 0, zz = 0, xy = 0, xz = 0, yz = 0] = sum.values;
  return {
    sigma: [Math.sqrt(xx), Math.sqrt(yy), Math.sqrt(zz)],
    covariance: { xx, yy, zz, xy, xz, yz },
    rotorsWithoutSigma: rotors.filter((part) => part.polarInertiaSigma === null).map((part) => part.rotor),
    shaftsWithoutSigma: [...perSpeed.keys()].filter((shaft) => (speeds.get(shaft)?.sigma ?? null) === null),
  };
}
