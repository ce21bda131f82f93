import { airframeToBody, tensorToBody } from '@/lib/frames/body';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassProperties } from '@/lib/mass/result';
import { type RollUp } from '@/lib/mass/roll-up';
import { type Sym3, addSym, halfTraceMinus, outer, scaleSym, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3, scaleVec } from '@/lib/numerics/vec3';
import { INERTIA_UNITS } from '@/lib/units/table';

import { bothUnits } from '../both-units';
import { type WholeRule } from '../rule';
import { unitSlips } from '../unit-slips';
import { shown } from '../watch';
import { isAircraft } from './shape';

/**
 * Rx = 2 kx / span, Ry = 2 ky / length, Rz = 4 kz / (span + length): ranges of published aircraft and of a table of classes, rounded
 * outward. The weights, moments and spans are published, the lengths and the table from memory.
 */
export const CLASS_BAND = [
  [0.18, 0.35],
  [0.28, 0.52],
  [0.3, 0.73],
] as const;

const BAND_SOURCE =
  'Published aircraft (NASA CR-96008, CR-2144, TM-2015-218675) with lengths from memory, and Raymer, Aircraft Design: A Conceptual Approach, table 16.1, from memory, unverified';

/** Rx, Ry, Rz of a tensor; null where a moment is negative. */
export function radiiOf(tensor: Sym3, mass: number, { span, length }: AirframeGeometry): Vec3 | null {
  if (Math.min(tensor.xx, tensor.yy, tensor.zz) < 0) return null;
  const radius = (moment: number): number => Math.sqrt(moment / mass);
  return [
    (2 * radius(tensor.xx)) / span,
    (2 * radius(tensor.yy)) / length,
    (4 * radius(tensor.zz)) / (span + length),
  ];
}

/** -1 below its band, 0 within, 1 above, for each of Rx, Ry, Rz. */
function against(radii: Vec3): number[] {
  return CLASS_BAND.map(([low, high], k) => {
    const radius = radii[k] ?? NaN;
    if (radius < low) return -1;
    return radius > high ? 1 : 0;
  });
}

/** How far radii are, by their factors, from the middles of the bands. */
function fromMiddle(radii: Vec3): number {
  return CLASS_BAND.reduce((sum, [low, high], k) => {
    const away = Math.log((radii[k] ?? NaN) / Math.sqrt(low * high));
    return sum + away * away;
  }, 0);
}

const isWithin = (radii: Vec3 | null): boolean =>
  radii !== null && against(radii).every((side) => side === 0);

interface Known {
  readonly mass: number;
  readonly properties: MassProperties;
  readonly radii: Vec3;
}

function knownOf({ basic: { mass, properties } }: RollUp, geometry: AirframeGeometry): Known | null {
  if (properties === null || !isAircraft(geometry)) return null;
  const radii = radiiOf(properties.tensor, mass, geometry);
  return radii === null ? null : { mass, properties, radii };
}

export const beyondSpanOrLength: WholeRule = {
  id: 'radius-beyond-extent',
  severity: 'blocker',
  sees: 'A condition whose mass would have to lie, in the mean, farther from its CG than half the span, half the length, or in height half the larger of the two.',
  why: 'No distribution of mass inside the aircraft has such moments: a unit, two columns exchanged, or a mass or size of the wrong aircraft.',
  remedy: 'Check the units and the order of the moments, the mass, and span and length of the frame issue.',
  source: 'First principles: ∫ξ² dm ≤ m (L/2)² for a body of extent L (Bhatia and Davis 2000)',
  look: ({ basic: { mass, properties } }, geometry) => {
    if (properties === null || !isAircraft(geometry)) return null;
    const { span, length } = geometry;
    const second = halfTraceMinus(properties.tensor);
    const found = [
      { name: 'along', square: second.xx, half: length / 2, of: 'length' },
      { name: 'across', square: second.yy, half: span / 2, of: 'span' },
      {
        name: 'in height',
        square: second.zz,
        half: Math.max(span, length) / 2,
        of: 'larger of span and length',
      },
    ]
      .map((each) => ({ ...each, radius: Math.sqrt(Math.max(each.square, 0) / mass) }))
      .filter(({ radius, half }) => radius > half);
    if (found.length === 0) return null;
    const parts = found.map(
      ({ name, radius, half, of }) =>
        `${name} ${bothUnits(radius, 'm')} against ${bothUnits(half, 'm')}, half the ${of}`,
    );
    return { message: `The mass would lie outside the aircraft: ${parts.join('; ')}.`, rows: [], count: 1 };
  },
};

export const totalUnitSlip: WholeRule = {
  id: 'total-unit-slip',
  severity: 'warning',
  sees: 'A condition whose three radii of gyration are all too large, or all too small, for an aircraft of its span and length, and right in another inertia unit (32.174, 144, 12, 4633.06 ...).',
  why: 'One factor explains all three: the heaviest rows, or all, are probably in another unit than their list declares.',
  remedy: 'Check the inertia unit, and the mass unit, that the lists declare.',
  source: `${BAND_SOURCE}; factors from NIST SP 811 (2008), appendix B`,
  look: (whole, geometry) => {
    const known = knownOf(whole, geometry);
    if (known === null) return null;
    const { radii } = known;
    const sides = against(radii);
    const [first] = sides;
    if (first === undefined || first === 0 || !sides.every((side) => side === first)) return null;
    // A radius goes with the root of a moment. Which unit was declared is not known here: any two units may have been exchanged.
    const factors = INERTIA_UNITS.flatMap((declared) =>
      unitSlips(declared, INERTIA_UNITS, 3)
        .filter(({ isTwice, factor }) => !isTwice && (first > 0 ? factor > 1 : factor < 1))
        .map((slip) => ({ declared, ...slip })),
    );
    const [found] = factors
      .map((slip) => ({ ...slip, scaled: scaleVec(1 / Math.sqrt(slip.factor), radii) }))
      .filter(({ scaled }) => isWithin(scaled))
      .sort((a, b) => fromMiddle(a.scaled) - fromMiddle(b.scaled));
    if (found === undefined) return null;
    const times = shown(Math.max(found.factor, 1 / found.factor));
    return {
      message: `The moments are about ${times} times too ${first > 0 ? 'large' : 'small'} for this span and length, as ${found.unit} for ${found.declared} would be.`,
      rows: [],
      count: 1,
    };
  },
};

export const totalAboutDatum: WholeRule = {
  id: 'total-about-datum',
  severity: 'warning',
  sees: 'A condition whose Iyy and Izz are too large for its span and length, and right when the transfer from the datum to the CG is taken off.',
  why: 'The moments of the heaviest rows were probably stated about the datum, and the transfer was counted twice.',
  remedy: 'State each row’s moments about its own CG.',
  source: `First principles: J about the datum = J about the CG + m (r² 1 - r rᵀ). ${BAND_SOURCE}`,
  look: (whole, geometry) => {
    const known = knownOf(whole, geometry);
    if (known === null) return null;
    const { mass, properties, radii } = known;
    const sides = against(radii);
    if (sides[1] !== 1 || sides[2] !== 1) return null;
    const transfer = tensorToBody(
      airframeToBody(geometry.axes, geometry.incidence),
      traceMinus(scaleSym(mass, outer(properties.cg))),
    );
    if (!isWithin(radiiOf(addSym(properties.tensor, transfer, -1), mass, geometry))) return null;
    const { iyy, izz } = properties.inertia;
    return {
      message: `Iyy ${bothUnits(iyy, 'kg.m2')} and Izz ${bothUnits(izz, 'kg.m2')} look taken about the datum: without the transfer from there they are those of an aircraft of this size.`,
      rows: [],
      count: 1,
    };
  },
};

export const radiiOutsideClass: WholeRule = {
  id: 'radii-outside-class',
  severity: 'note',
  sees: 'A condition with a radius of gyration outside what aircraft have: 2 kx/span 0.18 to 0.35, 2 ky/length 0.28 to 0.52, 4 kz/(span + length) 0.30 to 0.73.',
  why: 'Radii over span and length are much alike from one aircraft to the next, so that a missing list, a wrong unit or a wrong place shows.',
  remedy: 'Check that all lists are in and look at what drives the moment.',
  source: BAND_SOURCE,
  look: (whole, geometry) => {
    const known = knownOf(whole, geometry);
    if (known === null) return null;
    const sides = against(known.radii);
    const names = ['2 kx/span', '2 ky/length', '4 kz/(span + length)'];
    const parts = names.flatMap((name, k) => {
      const band = CLASS_BAND[k];
      if (band === undefined || sides[k] === 0) return [];
      return [`${name} ${shown(known.radii[k] ?? NaN)}, of aircraft ${band[0]} to ${band[1]}`];
    });
    return parts.length === 0
      ? null
      : { message: `Radii of gyration are unusual: ${parts.join('; ')}.`, rows: [], count: 1 };
  },
};
