export type MassUnit = 'kg' | 'g' | 'lb' | 'slug';
export type LengthUnit = 'm' | 'mm' | 'in' | 'ft';
export type InertiaUnit =
  | 'kg.m2'
  | 'kg.mm2'
  | 'g.mm2'
  | 'lb.in2'
  | 'lb.ft2'
  | 'slug.ft2'
  | 'slug.in2'
  | 'lbf.ft.s2'
  | 'lbf.in.s2';
