import { tensorOf } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { hasOwnMoments } from '@/lib/mass/physical';
import { type Placement } from '@/lib/mass/place';
import { type Sym3, congruence } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { spinArrow, spinAxisProblem } from '@/lib/rotors/axis';
import { type Rotor } from '@/lib/rotors/rotor';

import { bothUnits } from '../both-units';
import { ROWS_NAMED } from '../finding';
import { type RotatingParts, type RotorRule } from '../rule';
import { counted } from '../watch';

/** The inertia tensor of one piece of a row about its own CG, airframe components, kg.m2: what `RotatingParts.carriers` holds. */
export function carrierTensor(
  component: Pick<Component, 'moments' | 'orientation'>,
  placement: Placement,
): Sym3 {
  return congruence(placement.ownAxes(component), tensorOf(component.moments));
}

/** The moment of a tensor about a unit arrow. */
function about([x, y, z]: Vec3, j: Sym3): number {
  return j.xx * x * x + j.yy * y * y + j.zz * z * z + 2 * (j.xy * x * y + j.xz * x * z + j.yz * y * z);
}

/** Figures of rotor and row are from two sources and rounded: they may differ by this share. */
const ROUNDED = 0.02;

/** The moment of the row that carries a rotor about its shaft, kg.m2; null where it is not known or not stated. */
function carried(rotor: Rotor, { carriers, geometry }: RotatingParts): number | null {
  if (carriers === undefined || geometry === undefined || rotor.component === null) return null;
  const tensor = carriers.get(rotor.component);
  if (tensor === undefined || spinAxisProblem(rotor.axis) !== null) return null;
  const moment = about(spinArrow(rotor.axis, geometry.axes), tensor);
  return hasOwnMoments({ ixx: tensor.xx, iyy: tensor.yy, izz: tensor.zz, ixy: 0, ixz: 0, iyz: 0 })
    ? moment
    : null;
}

export const polarBeyondCarrier: RotorRule = {
  id: 'polar-beyond-component',
  severity: 'warning',
  sees: 'A rotor whose polar inertia is more than 2 % larger than the moment, about the shaft, of the row that carries it.',
  why: 'The rotor is part of that row, and no part has more inertia about an axis than the whole: a unit, the wrong row, or the inertia of the engine’s side of a gear.',
  remedy: 'Check the polar inertia and its unit, the row that the rotor names and that row’s moments.',
  source:
    'First principles: moments about parallel axes through the own CGs add to no more than that of the whole',
  look: (parts) => {
    const found = parts.rotors.flatMap((rotor) => {
      const moment = carried(rotor, parts);
      return moment !== null && rotor.polarInertia > (1 + ROUNDED) * moment ? [{ ...rotor, moment }] : [];
    });
    const [first] = found;
    if (first === undefined) return null;
    const headline = counted(
      found.length,
      'rotor has more inertia than the row that carries it',
      'rotors have more inertia than the rows that carry them',
    );
    return {
      message: `${headline}. First, ${first.rotor}: ${bothUnits(first.polarInertia, 'kg.m2')}, ${first.component ?? ''} ${bothUnits(first.moment, 'kg.m2')} about the shaft.`,
      rows: found.slice(0, ROWS_NAMED).map(({ rotor }) => rotor),
      count: found.length,
    };
  },
};

export const carrierMissing: RotorRule = {
  id: 'rotor-component-missing',
  severity: 'warning',
  sees: 'A rotor that names a list row which does not exist.',
  why: 'The row that carries its mass was removed or renamed: the rotor may turn while its mass is in no list.',
  remedy: 'Name the row that carries it now, as list/item.',
  source: 'Common practice, no source',
  look: ({ rotors, carriers }) => {
    if (carriers === undefined) return null;
    const found = rotors.filter(({ component }) => component !== null && !carriers.has(component));
    const [first] = found;
    if (first === undefined) return null;
    return {
      message: `${counted(found.length, 'rotor names a row that is not there', 'rotors name rows that are not there')}. First, ${first.rotor}: ${first.component ?? ''}.`,
      rows: found.slice(0, ROWS_NAMED).map(({ rotor }) => rotor),
      count: found.length,
    };
  },
};

export const withoutCarrier: RotorRule = {
  id: 'rotor-without-component',
  severity: 'note',
  sees: 'A rotor that names no list row that carries its mass.',
  why: 'The airframe tensor counts each rotor as if locked. Whether its mass is in a list, nobody can tell.',
  remedy: 'Name the row in the column component, as list/item.',
  source: 'Common practice, no source',
  look: ({ rotors }) => {
    const found = rotors.filter(({ component }) => component === null);
    const [first] = found;
    if (first === undefined) return null;
    return {
      message: `${counted(found.length, 'rotor names', 'rotors name')} no row that carries the mass. First, ${first.rotor}.`,
      rows: found.slice(0, ROWS_NAMED).map(({ rotor }) => rotor),
      count: found.length,
    };
  },
};
