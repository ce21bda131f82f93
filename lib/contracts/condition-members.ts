import { airframeToBody } from '@/lib/frames/body';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Moments } from '@/lib/frames/products';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassResult } from '@/lib/mass/result';
import { type GroupTotal, type RollUp } from '@/lib/mass/roll-up';
import { fromSi } from '@/lib/units/convert';
import { OUTPUT_UNITS, type UnitSystem } from '@/lib/units/names';

/*
 * The members of a condition and of a roll-up as the API states them (contract section 3). SI unless asked for US units; `cg` in
 * airframe axes from the datum, `inertia` about the CG in body axes with products as positive integrals.
 */

interface Scales {
  readonly mass: (value: number) => number;
  readonly length: (value: number) => number;
  readonly inertia: (value: number) => number;
}

function scalesOf(system: UnitSystem): Scales {
  if (system === 'si') return { mass: (value) => value, length: (value) => value, inertia: (value) => value };
  const units = OUTPUT_UNITS[system];
  return {
    mass: (value) => fromSi(value, units.mass),
    length: (value) => fromSi(value, units.length),
    inertia: (value) => fromSi(value, units.inertia),
  };
}

const place = ([x, y, z]: AirframeVec, scale: (value: number) => number) => ({
  x: scale(x),
  y: scale(y),
  z: scale(z),
});

function inertiaMember(inertia: Moments, scale: (value: number) => number) {
  const ixx = scale(inertia.ixx);
  const iyy = scale(inertia.iyy);
  const izz = scale(inertia.izz);
  const ixy = scale(inertia.ixy);
  const ixz = scale(inertia.ixz);
  const iyz = scale(inertia.iyz);
  const minus = (value: number): number => 0 - value;
  return {
    ixx,
    iyy,
    izz,
    ixy,
    ixz,
    iyz,
    tensor: [
      [ixx, minus(ixy), minus(ixz)],
      [minus(ixy), iyy, minus(iyz)],
      [minus(ixz), minus(iyz), izz],
    ],
  };
}

/** Mass, CG, inertia, principal axes and radii of gyration of one result; what a mass of zero or less does not have is absent. */
export function massMembers(result: MassResult, system: UnitSystem) {
  const scales = scalesOf(system);
  const mass = scales.mass(result.mass);
  if (result.properties === null) return { mass };
  const { cg, percentMac, inertia, principal, radii } = result.properties;
  return {
    mass,
    cg: { airframe: place(cg, scales.length), ...(percentMac === null ? {} : { percentMac }) },
    inertia: inertiaMember(inertia, scales.inertia),
    principal: {
      moments: principal.moments.map(scales.inertia),
      axes: principal.axes.map((axis) => [...axis]),
    },
    ...(radii === null
      ? {}
      : {
          radiiOfGyration: {
            x: scales.length(radii.x),
            y: scales.length(radii.y),
            z: scales.length(radii.z),
          },
        }),
  };
}

/** The members that a condition and a roll-up share. */
export function rollUpMembers(rollUp: RollUp, system: UnitSystem) {
  const { mass: predictedMass, ...predicted } = massMembers(rollUp.predicted, system);
  return {
    basis: 'basic' as const,
    ...massMembers(rollUp.basic, system),
    predictedMass,
    predicted: { mass: predictedMass, ...predicted },
  };
}

/** A group's line in a roll-up: its inertia is about its own CG. */
export function groupMember(group: GroupTotal, system: UnitSystem) {
  const { mass, cg, inertia } = { cg: undefined, inertia: undefined, ...massMembers(group.basic, system) };
  return {
    group: group.group,
    rows: group.rows,
    mass,
    ...(cg === undefined ? {} : { cg: { airframe: cg.airframe } }),
    ...(inertia === undefined ? {} : { inertia }),
  };
}

/** The conventions that every answer states beside its numbers. */
export function conventionsOf(geometry: AirframeGeometry, system: UnitSystem, incidenceDeg: number) {
  const units = OUTPUT_UNITS[system];
  return {
    bodyAxes: 'origin at the CG; x forward, y right, z down',
    products: 'positive integral',
    tensor: 'off-diagonals are minus the products',
    spin: 'right-hand rule',
    airframeAxes: { x: geometry.axes[0], y: geometry.axes[1], z: geometry.axes[2] },
    incidenceDeg,
    airframeToBody: airframeToBody(geometry.axes, geometry.incidence).map((row) => [...row]),
    units,
  };
}
