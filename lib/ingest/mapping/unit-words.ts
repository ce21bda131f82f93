import {
  INERTIA_UNITS,
  type InertiaUnit,
  LENGTH_UNITS,
  type LengthUnit,
  MASS_UNITS,
  type MassUnit,
} from '@/lib/units/table';

/** The unit that a column of a file is in, where it is not as its list declares. */
export type ColumnUnit = MassUnit | LengthUnit | InertiaUnit | 'deg' | 'rad' | 'percent' | 'fraction';

/** What a column measures, and with it which units it may be in. */
export type Dimension = 'mass' | 'length' | 'inertia' | 'angle' | 'share';

export const UNITS_OF: Readonly<Record<Dimension, readonly ColumnUnit[]>> = {
  mass: MASS_UNITS,
  length: LENGTH_UNITS,
  inertia: INERTIA_UNITS,
  angle: ['deg', 'rad'],
  share: ['percent', 'fraction'],
};

/* Spellings as people write them (common practice, no source), after `spelled`. */
const MASS: Readonly<Record<string, MassUnit>> = {
  kg: 'kg',
  kgs: 'kg',
  kilogram: 'kg',
  kilograms: 'kg',
  g: 'g',
  gr: 'g',
  gram: 'g',
  grams: 'g',
  lb: 'lb',
  lbs: 'lb',
  lbm: 'lb',
  pound: 'lb',
  pounds: 'lb',
  slug: 'slug',
  slugs: 'slug',
};
const LENGTH: Readonly<Record<string, LengthUnit>> = {
  m: 'm',
  metre: 'm',
  metres: 'm',
  meter: 'm',
  meters: 'm',
  mm: 'mm',
  millimetre: 'mm',
  millimetres: 'mm',
  millimeter: 'mm',
  millimeters: 'mm',
  in: 'in',
  ins: 'in',
  inch: 'in',
  inches: 'in',
  '"': 'in',
  ft: 'ft',
  foot: 'ft',
  feet: 'ft',
};
const OTHER: Readonly<Record<string, ColumnUnit>> = {
  deg: 'deg',
  degs: 'deg',
  degree: 'deg',
  degrees: 'deg',
  '°': 'deg',
  rad: 'rad',
  radian: 'rad',
  radians: 'rad',
  '%': 'percent',
  percent: 'percent',
  pct: 'percent',
};
const FORCES = new Set(['lbf', 'lb', 'lbs']);

/** The unit that a text spells, or null: "lbs", "slug-ft^2", "kg m²", "lbf·in·s²". */
export function unitOf(text: string): ColumnUnit | null {
  const plain = spelled(text);
  return MASS[plain] ?? LENGTH[plain] ?? OTHER[plain] ?? inertiaOf(plain);
}

/** Whether a text looks like a unit, known or not ("cm", "N", "kg/m"): short, with letters, and no words. */
export function looksLikeUnit(text: string): boolean {
  return /^[a-zµ°%"/^.·⋅*\-²³\d ]{1,14}$/iu.test(text.trim()) && /[a-zµ°%"]/iu.test(text) && unitShape(text);
}

export function dimensionOf(unit: ColumnUnit): Dimension {
  const dimensions: readonly Dimension[] = ['mass', 'length', 'inertia', 'angle', 'share'];
  const found = dimensions.find((dimension) => UNITS_OF[dimension].includes(unit));
  if (found === undefined) throw new RangeError(`There is no unit ${unit}.`);
  return found;
}

function spelled(text: string): string {
  return text
    .toLowerCase()
    .replace(/²|\^ ?2|\*\*2|sq(?:uared)?\b/gu, '2')
    .replace(/³|\^ ?3/gu, '3')
    .replace(/[\s.·⋅*\-_×]+/gu, ' ')
    .trim();
}

/** mass length2, or force length time2. */
function inertiaOf(plain: string): InertiaUnit | null {
  const squared = /^([a-z]+) ?(mm|m|in|inch|inches|ft|feet) ?2$/u.exec(plain);
  if (squared !== null) {
    const [, mass = '', length = ''] = squared;
    return known(`${MASS[mass] ?? ''}.${LENGTH[length] ?? ''}2`);
  }
  const run = /^(kg|g|lb|slug)(mm|m|in|ft)2$/u.exec(plain);
  if (run !== null) return known(`${run[1] ?? ''}.${run[2] ?? ''}2`);
  const dynamic = /^(lbf|lbs|lb) (in|inch|inches|ft|feet) (?:s|sec) ?2$/u.exec(plain);
  if (dynamic === null || !FORCES.has(dynamic[1] ?? '')) return null;
  return known(`lbf.${LENGTH[dynamic[2] ?? ''] ?? ''}.s2`);
}

function known(unit: string): InertiaUnit | null {
  return INERTIA_UNITS.find((one) => one === unit) ?? null;
}

/** A unit has no part longer than `slugs`, and few parts. */
function unitShape(text: string): boolean {
  const parts = spelled(text).split(/[ /]/u);
  return parts.length <= 4 && parts.every((part) => part.length <= 6);
}
