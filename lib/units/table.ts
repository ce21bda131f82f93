/*
 * The one factor table. A factor is a fraction `times / over`, so that g and mm divide by a whole number instead of multiplying
 * by a rounded 0.001. Sources: NIST SP 811 (2008), appendix B.8: the pound, the inch and the foot are exact by definition,
 * standard gravity is the value of the 3rd CGPM (1901). Everything else is computed from these.
 */

/** kg in a pound, exact. "lb" is always mass. */
export const POUND = 0.45359237;
/** m in an inch, exact. */
export const INCH = 0.0254;
/** m in a foot, exact. */
export const FOOT = 0.3048;
/** Standard acceleration of gravity, m/s2, exact. */
export const STANDARD_GRAVITY = 9.80665;
/** kg in a slug: 1 lbf.s2/ft. */
export const SLUG = (POUND * STANDARD_GRAVITY) / FOOT;

export type MassUnit = 'kg' | 'g' | 'lb' | 'slug';
export type LengthUnit = 'm' | 'mm' | 'in' | 'ft';
export type InertiaUnit =
  'kg.m2' | 'kg.mm2' | 'g.mm2' | 'lb.in2' | 'lb.ft2' | 'slug.ft2' | 'slug.in2' | 'lbf.ft.s2' | 'lbf.in.s2';
export type AngularMomentumUnit = 'kg.m2/s' | 'slug.ft2/s';
export type Unit = MassUnit | LengthUnit | InertiaUnit | AngularMomentumUnit;

export const MASS_UNITS: readonly MassUnit[] = ['kg', 'g', 'lb', 'slug'];
export const LENGTH_UNITS: readonly LengthUnit[] = ['m', 'mm', 'in', 'ft'];
export const INERTIA_UNITS: readonly InertiaUnit[] = [
  'kg.m2',
  'kg.mm2',
  'g.mm2',
  'lb.in2',
  'lb.ft2',
  'slug.ft2',
  'slug.in2',
  'lbf.ft.s2',
  'lbf.in.s2',
];

/** SI value = value * times / over. */
export interface Factor {
  readonly times: number;
  readonly over: number;
}

const one: Factor = { times: 1, over: 1 };
const times = (factor: number): Factor => ({ times: factor, over: 1 });
const over = (divisor: number): Factor => ({ times: 1, over: divisor });

export const FACTORS: Readonly<Record<Unit, Factor>> = {
  kg: one,
  g: over(1000),
  lb: times(POUND),
  slug: times(SLUG),

  m: one,
  mm: over(1000),
  in: times(INCH),
  ft: times(FOOT),

  'kg.m2': one,
  'kg.mm2': over(1e6),
  'g.mm2': over(1e9),
  'lb.in2': times(POUND * INCH * INCH),
  'lb.ft2': times(POUND * FOOT * FOOT),
  'slug.ft2': times(POUND * STANDARD_GRAVITY * FOOT),
  'slug.in2': times(SLUG * INCH * INCH),
  'lbf.ft.s2': times(POUND * STANDARD_GRAVITY * FOOT),
  'lbf.in.s2': times(POUND * STANDARD_GRAVITY * INCH),

  'kg.m2/s': one,
  'slug.ft2/s': times(POUND * STANDARD_GRAVITY * FOOT),
};
