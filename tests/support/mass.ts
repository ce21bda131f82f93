import { type AxisTriple } from '@/lib/frames/axes';
import { NO_POSE } from '@/lib/frames/pose';
import { NO_MOMENTS } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry, bareGeometry } from '@/lib/mass/geometry';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';

/** Body axes as airframe axes: what a result says in body axes is what the rows say. */
export const BODY_AXES: AxisTriple = ['forward', 'right', 'down'];

export const NO_TURN = { yaw: 0, pitch: 0, roll: 0 };

/** A row with one piece at the origin, and what the test says of it. SI. */
export function aComponent(said: Partial<Component>): Component {
  return {
    item: 'A-1',
    partNumber: null,
    partRevision: null,
    description: null,
    group: 'Ungrouped',
    category: 'empty',
    parent: null,
    counting: 'counted',
    quantity: 1,
    mass: 1,
    position: [0, 0, 0],
    moments: NO_MOMENTS,
    orientation: NO_TURN,
    pair: false,
    maturity: null,
    growth: null,
    sigma: null,
    source: null,
    sourceDate: null,
    note: null,
    changeRef: null,
    status: 'approved',
    extra: {},
    ...said,
  };
}

/** A whole list in SI and body axes, and what the test says of it. */
export function declarations(said: Partial<ListDeclarations> = {}): ListDeclarations {
  return {
    massUnit: 'kg',
    lengthUnit: 'm',
    inertiaUnit: 'kg.m2',
    products: 'positive',
    axes: BODY_AXES,
    pose: NO_POSE,
    kind: 'components',
    extent: 'whole',
    uncertainty: '1sigma',
    marking: null,
    ...said,
  };
}

/** An airframe in body axes with r0 at its datum, and what the test says of it. */
export function geometry(said: Partial<AirframeGeometry> = {}): AirframeGeometry {
  return { ...bareGeometry(BODY_AXES, [0, 0, 0]), ...said };
}

export const diagonal = ([ixx, iyy, izz]: Vec3, mass = 1): Component['moments'] => ({
  ...NO_MOMENTS,
  ixx: mass * ixx,
  iyy: mass * iyy,
  izz: mass * izz,
});

/** Largest difference of two symmetric matrices as a share of the largest element of the second. */
export function relativeDifference(a: Sym3, b: Sym3): number {
  const keys = ['xx', 'yy', 'zz', 'xy', 'xz', 'yz'] as const;
  const size = Math.max(...keys.map((key) => Math.abs(b[key])));
  return Math.max(...keys.map((key) => Math.abs(a[key] - b[key]))) / size;
}

/** The properties of a result that must have some. */
export function properties<P>(result: { readonly properties: P | null }): P {
  if (result.properties === null) throw new Error('The result has no mass and so no properties.');
  return result.properties;
}
