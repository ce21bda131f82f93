import { type Moments } from '@/lib/frames/products';
import { type ListDeclarations, type UncertaintyMeaning } from '@/lib/mass/declarations';
import { FACTORS, type Factor } from '@/lib/units/table';

export type MomentName = keyof Moments;
export const MOMENTS: readonly MomentName[] = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'];
export type PlaceName = 'x' | 'y' | 'z';
export const PLACES: readonly PlaceName[] = ['x', 'y', 'z'];
export type AngleName = 'yaw' | 'pitch' | 'roll';
export const ANGLES: readonly AngleName[] = ['yaw', 'pitch', 'roll'];
export type ValueName = 'mass' | PlaceName | MomentName;
export const VALUES: readonly ValueName[] = ['mass', ...PLACES, ...MOMENTS];
export type SigmaColumn = `${ValueName}_sigma`;
/** Columns whose numbers carry a unit, an angle or a percent. */
export type ScaledColumn = ValueName | SigmaColumn | AngleName | 'growth_percent';

const TEXT_COLUMNS = [
  'item',
  'part_number',
  'part_revision',
  'description',
  'group',
  'category',
  'parent',
  'counting',
  'quantity',
] as const;
const EVIDENCE_COLUMNS = ['source', 'source_date', 'note'] as const;
/** Columns of lists of kind `adjustments` only. */
export const CHANGE_COLUMNS = ['change_ref', 'status'] as const;

/** The columns of a component mass list (contract section 1). */
export type ListColumn =
  | (typeof TEXT_COLUMNS)[number]
  | ScaledColumn
  | 'symmetry'
  | 'maturity'
  | (typeof EVIDENCE_COLUMNS)[number]
  | (typeof CHANGE_COLUMNS)[number];

export const LIST_COLUMNS: readonly ListColumn[] = [
  ...TEXT_COLUMNS,
  'mass',
  ...PLACES,
  ...MOMENTS,
  ...ANGLES,
  'symmetry',
  'maturity',
  'growth_percent',
  ...VALUES.map((value): SigmaColumn => `${value}_sigma`),
  ...EVIDENCE_COLUMNS,
  ...CHANGE_COLUMNS,
];

export const NEEDED_COLUMNS: readonly ListColumn[] = ['mass', 'x', 'y', 'z'];

/** SI value = file value * times / over; `times` is negative for products declared as negative integrals. */
export type Scales = Readonly<Record<ScaledColumn, Factor>>;

/** How many standard deviations a stated figure is; a half-width is of a uniform distribution (JCGM 100:2008, 4.3.7). */
const COVERAGE: Readonly<Record<UncertaintyMeaning, number>> = {
  '1sigma': 1,
  '2sigma': 2,
  '3sigma': 3,
  'half-width': Math.sqrt(3),
};

/** The factors of a list's columns. Throws a RangeError for a unit, sign or meaning that is not declared. */
export function listScales(declarations: ListDeclarations): Scales {
  const { massUnit, lengthUnit, inertiaUnit, products, uncertainty } = declarations;
  const mass = declared(FACTORS[massUnit], 'mass_unit', massUnit);
  const length = declared(FACTORS[lengthUnit], 'length_unit', lengthUnit);
  const inertia = declared(FACTORS[inertiaUnit], 'inertia_unit', inertiaUnit);
  const coverage = declared(COVERAGE[uncertainty], 'uncertainty', uncertainty);
  const sign = declared({ positive: 1, negative: -1 }[products], 'products', products);
  const product = { times: sign * inertia.times, over: inertia.over };
  const massSigma = shrink(mass, coverage);
  const lengthSigma = shrink(length, coverage);
  const inertiaSigma = shrink(inertia, coverage);
  const degree = { times: Math.PI, over: 180 };
  return {
    mass,
    x: length,
    y: length,
    z: length,
    ixx: inertia,
    iyy: inertia,
    izz: inertia,
    ixy: product,
    ixz: product,
    iyz: product,
    yaw: degree,
    pitch: degree,
    roll: degree,
    growth_percent: { times: 1, over: 100 },
    mass_sigma: massSigma,
    x_sigma: lengthSigma,
    y_sigma: lengthSigma,
    z_sigma: lengthSigma,
    ixx_sigma: inertiaSigma,
    iyy_sigma: inertiaSigma,
    izz_sigma: inertiaSigma,
    ixy_sigma: inertiaSigma,
    ixz_sigma: inertiaSigma,
    iyz_sigma: inertiaSigma,
  };
}

/** A figure of the file in SI. */
export function scaled(value: number, { times, over }: Factor): number {
  return (value * times) / over + 0;
}

function shrink({ times, over }: Factor, by: number): Factor {
  return { times, over: over * by };
}

function declared<T>(value: T | undefined, name: string, given: string): T {
  if (value === undefined)
    throw new RangeError(`The list declares no ${name} that is known: ${String(given)}.`);
  return value;
}
