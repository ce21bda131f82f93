import { airframeToBody, toBody } from '@/lib/frames/body';
import { lateralIndex } from '@/lib/frames/reflection';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type RollUp } from '@/lib/mass/roll-up';
import { subVec } from '@/lib/numerics/vec3';
import { degrees } from '@/lib/units/convert';

import { bothUnits } from '../both-units';
import { type WholeRule } from '../rule';
import { shown } from '../watch';
import { isAircraft } from './shape';

/** A product below this share of Izz says nothing about the layout. */
const SMALL = 0.01;

/** Σ m x z of the groups' and the items' CGs as points about the total CG, body axes, kg.m2. */
function layoutIxz({ basic, groups, onBoard }: RollUp, geometry: AirframeGeometry): number {
  const { properties } = basic;
  if (properties === null) return 0;
  const a = airframeToBody(geometry.axes, geometry.incidence);
  return [...groups.map((group) => group.basic), onBoard].reduce((sum, part) => {
    if (part.properties === null) return sum;
    const [x, , z] = toBody(a, subVec(part.properties.cg, properties.cg));
    return sum + part.mass * x * z;
  }, 0);
}

export const ixzNegative: WholeRule = {
  id: 'ixz-negative',
  severity: 'note',
  sees: 'A condition of an aircraft with Ixz (positive integral) below -1 % of Izz, which its groups’ places do not explain.',
  why: 'With the tail above the CG, ∫xz dm in body axes is positive: mass behind (x < 0) lies above (z < 0). A negative one is often a source whose products have the other sign.',
  remedy:
    'Check the product sign that the lists declare and the axes of their sources. A low tail or a heavy low nose can make it real.',
  source:
    'Common practice; of twelve published aircraft one has it negative: A-4D, Teper, NASA CR-96008 (1969), table III-A',
  look: (whole, geometry) => {
    const { properties } = whole.basic;
    if (properties === null || !isAircraft(geometry)) return null;
    const { ixx, izz, ixz } = properties.inertia;
    if (ixz >= -SMALL * izz || layoutIxz(whole, geometry) < -SMALL * izz) return null;
    const angle = degrees(Math.atan2(2 * ixz, izz - ixx)) / 2;
    return {
      message: `Ixz is ${bothUnits(ixz, 'kg.m2')} (positive integral, body axes): the principal x axis is turned by ${shown(Math.abs(angle))} degrees from body x, nose up. Most aircraft have it nose down.`,
      rows: [],
      count: 1,
    };
  },
};

export const ixzAgainstLayout: WholeRule = {
  id: 'ixz-against-layout',
  severity: 'note',
  sees: 'A condition whose Ixz has the other sign than Σ m x z of its groups’ CGs, both beyond 1 % of Izz.',
  why: 'The own products of some rows or groups outweigh the layout and turn its sign: their product sign is probably not the one that the list declares.',
  remedy: 'Check the product sign that the lists declare, beginning with the rows of the largest own Ixz.',
  source: 'First principles: Ixz = Σ (own Ixz + m x z)',
  look: (whole, geometry) => {
    const { properties } = whole.basic;
    if (properties === null || !isAircraft(geometry)) return null;
    const { izz, ixz } = properties.inertia;
    const layout = layoutIxz(whole, geometry);
    if (ixz * layout >= 0 || Math.min(Math.abs(ixz), Math.abs(layout)) <= SMALL * izz) return null;
    return {
      message: `Ixz is ${bothUnits(ixz, 'kg.m2')}, while the CGs of the groups alone give ${bothUnits(layout, 'kg.m2')} (positive integrals, body axes).`,
      rows: [],
      count: 1,
    };
  },
};

/** A CG off the plane by more than this share of half the span is not a matter of a harness here and a pump there. */
const OFF_PLANE = 0.01;

export const lateralCg: WholeRule = {
  id: 'lateral-cg',
  severity: 'note',
  sees: 'A condition whose CG is off the plane of symmetry by more than 1 % of half the span.',
  why: 'A half list declared whole, a missing twin or a wrong sign moves the CG sideways; so does a store on one side.',
  remedy: 'Look at what drives the lateral CG; say so where the asymmetry is meant.',
  source: 'Common practice, no source',
  look: ({ basic: { properties } }, geometry) => {
    if (properties === null || !isAircraft(geometry)) return null;
    const { axes, lateralPlane, span } = geometry;
    const lateral = lateralIndex(axes);
    const off = properties.cg[lateral] - lateralPlane;
    if (Math.abs(off) <= (OFF_PLANE * span) / 2) return null;
    const side = off > 0 === (axes[lateral] === 'right') ? 'right' : 'left';
    return {
      message: `The CG is ${bothUnits(Math.abs(off), 'm')} to the ${side} of the plane of symmetry, ${shown((200 * Math.abs(off)) / span)} % of half the span.`,
      rows: [],
      count: 1,
    };
  },
};

/** Ixy over sqrt(Ixx Iyy), Iyz over sqrt(Iyy Izz): a symmetric aircraft has 0, one beyond this share an asymmetry to know of. */
const ASYMMETRIC = 0.03;

export const lateralProducts: WholeRule = {
  id: 'lateral-products',
  severity: 'note',
  sees: 'A condition with |Ixy| above 3 % of the root of Ixx Iyy, or |Iyz| above 3 % of the root of Iyy Izz.',
  why: 'They couple roll and yaw with pitch, which a symmetric aircraft does not do: a half list declared whole, a missing twin or a sign, or an asymmetry that is meant.',
  remedy: 'Look at what drives the product; tell the simulation team where it is meant.',
  source: 'First principles for the symmetry; common practice, no source, for the share',
  look: ({ basic: { properties } }, geometry) => {
    if (properties === null || !isAircraft(geometry)) return null;
    const { ixx, iyy, izz, ixy, iyz } = properties.inertia;
    const parts = [
      { name: 'Ixy', product: ixy, share: ixy / Math.sqrt(ixx * iyy) },
      { name: 'Iyz', product: iyz, share: iyz / Math.sqrt(iyy * izz) },
    ]
      .filter(({ share }) => Math.abs(share) > ASYMMETRIC)
      .map(
        ({ name, product, share }) =>
          `${name} ${bothUnits(product, 'kg.m2')}, ${shown(100 * Math.abs(share))} % of the root of its two moments`,
      );
    return parts.length === 0
      ? null
      : { message: `The aircraft is not symmetric: ${parts.join('; ')}.`, rows: [], count: 1 };
  },
};
