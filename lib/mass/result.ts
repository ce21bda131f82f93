import { airframeToBody, tensorToBody } from '@/lib/frames/body';
import { percentMac } from '@/lib/frames/chord';
import { type Moments, momentsOf } from '@/lib/frames/products';
import { type AirframeVec, type In } from '@/lib/frames/tags';
import { type Sym3 } from '@/lib/numerics/sym3';
import { addVec, scaleVec } from '@/lib/numerics/vec3';

import { type Account, readAccount } from './account';
import { type AirframeGeometry } from './geometry';
import { type Principal, principalOf } from './principal';

export interface MassProperties {
  /** Airframe components from the datum, m. */
  readonly cg: AirframeVec;
  /** Per cent of the mean aerodynamic chord aft of its leading edge; null where the geometry has no chord. */
  readonly percentMac: number | null;
  /** About the CG in body axes, products as positive integrals, kg.m2. */
  readonly inertia: In<'body', Moments>;
  /** The same as a tensor: off-diagonals are minus the products. */
  readonly tensor: In<'body', Sym3>;
  readonly principal: Principal;
  /** k = sqrt(I/m) about the body axes, m; null where a moment is negative. */
  readonly radii: { readonly x: number; readonly y: number; readonly z: number } | null;
}

/** What an account says. Nothing with a mass of zero or less has a CG: then there is only mass and moment. */
export interface MassResult {
  /** kg */
  readonly mass: number;
  /** Σ m r about the datum in airframe components, kg.m. */
  readonly moment: AirframeVec;
  readonly properties: MassProperties | null;
}

function radiiOf(inertia: Moments, mass: number): MassProperties['radii'] {
  if (Math.min(inertia.ixx, inertia.iyy, inertia.izz) < 0) return null;
  return {
    x: Math.sqrt(inertia.ixx / mass),
    y: Math.sqrt(inertia.iyy / mass),
    z: Math.sqrt(inertia.izz / mass),
  };
}

/** The result of an account about the geometry's reference point. */
export function resultOf(account: Account, geometry: AirframeGeometry): MassResult {
  const { mass, first } = account;
  const { axes, incidence, reference, lemac, mac } = geometry;
  const moment = addVec(first, scaleVec(mass, reference));
  const reading = mass > 0 ? readAccount(account) : null;
  if (reading === null) return { mass, moment, properties: null };
  const cg = addVec(reference, reading.place);
  const tensor = tensorToBody(airframeToBody(axes, incidence), reading.tensor);
  const inertia = momentsOf(tensor);
  return {
    mass,
    moment,
    properties: {
      cg,
      percentMac: percentMac(cg, lemac, mac, axes),
      inertia,
      tensor,
      principal: principalOf(tensor),
      radii: radiiOf(inertia, mass),
    },
  };
}
