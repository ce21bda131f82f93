import { airframeToBody, toBody } from '@/lib/frames/body';
import { type BodyVec, type In } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Mat3 } from '@/lib/numerics/mat3';
import { CompensatedSum } from '@/lib/numerics/sums';
import { scaleVec } from '@/lib/numerics/vec3';

import { spinArrow } from './axis';
import { type OperatingPoint, type Rotor } from './rotor';

export interface RotorMomentum {
  readonly rotor: string;
  /** Of the rotor about its own axis (shaft speed times gear ratio), rad/s. */
  readonly speed: number;
  /** h = I Ω e in body axes, kg.m2/s. */
  readonly momentum: BodyVec;
}

export interface AngularMomentum {
  readonly rotors: readonly RotorMomentum[];
  /** Σ h in body axes, kg.m2/s. */
  readonly total: BodyVec;
  /** G of the total: G w = h × w. */
  readonly gyroMatrix: In<'body', Mat3>;
}

/** G(h), the matrix for which G w = h × w, in body axes (which are right-handed); kg.m2/s. */
export function gyroMatrix(h: BodyVec): In<'body', Mat3> {
  const [x, y, z] = h;
  return [
    [0, 0 - z, y],
    [z, 0, 0 - x],
    [0 - y, x, 0],
  ];
}

/** Shafts that rotors hang on and for which the operating point states no speed. */
export function shaftsWithoutSpeed(
  rotors: readonly Rotor[],
  point: Pick<OperatingPoint, 'speeds'>,
): string[] {
  const known = new Set(point.speeds.map(({ shaft }) => shaft));
  return [...new Set(rotors.map(({ shaft }) => shaft))].filter((shaft) => !known.has(shaft));
}

/**
 * Angular momentum of the rotating parts relative to the airframe at one operating point. The airframe tensor counts each rotor
 * as if locked; this is the extra.
 *
 * @throws RangeError naming the shafts for which the point states no speed, or the rotor whose axis is not sound.
 */
export function angularMomentum(
  rotors: readonly Rotor[],
  point: Pick<OperatingPoint, 'code' | 'speeds'>,
  geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>,
): AngularMomentum {
  const missing = shaftsWithoutSpeed(rotors, point);
  if (missing.length > 0)
    throw new RangeError(`Operating point ${point.code} states no speed for: ${missing.join(', ')}.`);
  const speeds = new Map(point.speeds.map(({ shaft, speed }) => [shaft, speed]));
  const a = airframeToBody(geometry.axes, geometry.incidence);
  const each = rotors.map((part): RotorMomentum => {
    const speed = part.gearRatio * (speeds.get(part.shaft) ?? NaN);
    const arrow = toBody(a, spinArrow(part.axis, geometry.axes));
    return { rotor: part.rotor, speed, momentum: scaleVec(part.polarInertia * speed, arrow) };
  });
  const sumOf = (k: 0 | 1 | 2): number => {
    const sum = new CompensatedSum();
    for (const { momentum } of each) sum.add(momentum[k]);
    return sum.value;
  };
  const total: BodyVec = [sumOf(0), sumOf(1), sumOf(2)];
  return { rotors: each, total, gyroMatrix: gyroMatrix(total) };
}
