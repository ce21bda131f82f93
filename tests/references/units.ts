/*
 * I1. Factors to SI from the definitions of the pound, the inch and standard gravity, worked out in exact rational arithmetic
 * outside this project. Definitions: NIST SP 811 (2008), appendix B; NASA SP-7012 prints 1 slug = 14.593902937206362 kg and
 * 1 slug.ft2 = 1.35581794833 kg.m2.
 */
export const FACTORS_TO_SI = [
  { unit: 'lb', si: 0.45359237 },
  { unit: 'slug', si: 14.593902937206364 },
  { unit: 'ft', si: 0.3048 },
  { unit: 'in', si: 0.0254 },
  { unit: 'slug.ft2', si: 1.3558179483314003 },
  { unit: 'lb.ft2', si: 0.0421401100938048 },
  { unit: 'lb.in2', si: 0.0002926396534292 },
  { unit: 'lbf.in.s2', si: 0.1129848290276167 },
  { unit: 'slug.in2', si: 0.009415402418968058 },
  { unit: 'lbf.ft.s2', si: 1.3558179483314003 },
  { unit: 'slug.ft2/s', si: 1.3558179483314003 },
] as const;

/** Ratios between units of the trade, same source. */
export const RATIOS = [
  { one: 'slug.ft2', other: 'lb.in2', ratio: 4633.062992125984 },
  { one: 'slug.ft2', other: 'lb.ft2', ratio: 32.17404855643045 },
  { one: 'slug', other: 'lb', ratio: 32.17404855643045 },
  { one: 'kg.m2', other: 'slug.ft2', ratio: 0.7375621492772654 },
  { one: 'kg.m2', other: 'lb.in2', ratio: 3417.171898209399 },
  { one: 'kg', other: 'lb', ratio: 2.2046226218487757 },
] as const;
