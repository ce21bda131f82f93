import { airframeToBody, tensorToBody } from '@/lib/frames/body';
import { momentsOf } from '@/lib/frames/products';
import { addVec } from '@/lib/numerics/vec3';

import { type Account, readAccount } from '../account';
import { type AirframeGeometry } from '../geometry';

/** The ten numbers of a result, in the order in which they are shown. */
export const TEN = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;
export type NameOfTen = (typeof TEN)[number];

/**
 * Mass (kg); CG in airframe components from the datum (m); moments and products about the CG in body axes (kg.m2), the products as
 * positive integrals.
 */
export type TenNumbers = Readonly<Record<NameOfTen, number>>;

/** The ten numbers that an account about the geometry's r0 says; null for a mass of zero or less, which has no CG. */
export function tenOf(account: Account, geometry: AirframeGeometry): TenNumbers | null {
  const reading = account.mass > 0 ? readAccount(account) : null;
  if (reading === null) return null;
  const [x, y, z] = addVec(geometry.reference, reading.place);
  const inertia = momentsOf(tensorToBody(airframeToBody(geometry.axes, geometry.incidence), reading.tensor));
  return { mass: account.mass, x, y, z, ...inertia };
}

/** a - b of each of the ten. */
export function tenDifference(a: TenNumbers, b: TenNumbers): TenNumbers {
  return mapTen((name) => a[name] - b[name]);
}

export function mapTen(of: (name: NameOfTen) => number): TenNumbers {
  return {
    mass: of('mass'),
    x: of('x'),
    y: of('y'),
    z: of('z'),
    ixx: of('ixx'),
    iyy: of('iyy'),
    izz: of('izz'),
    ixy: of('ixy'),
    ixz: of('ixz'),
    iyz: of('iyz'),
  };
}
