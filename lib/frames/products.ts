import { type Sym3 } from '@/lib/numerics/sym3';

/**
 * Moments of inertia, and products of inertia as POSITIVE integrals (Ixy = ∫ x y dm): what users read and what every
 * output carries. Not tensor elements: the off-diagonals of the tensor are minus the products. kg.m2.
 */
export interface Moments {
  readonly ixx: number;
  readonly iyy: number;
  readonly izz: number;
  readonly ixy: number;
  readonly ixz: number;
  readonly iyz: number;
}

export const NO_MOMENTS: Moments = { ixx: 0, iyy: 0, izz: 0, ixy: 0, ixz: 0, iyz: 0 };

/** Whose sign a source's products carry: the integral, or minus it (the sign already in the tensor). */
export type ProductSign = 'positive' | 'negative';

/** The other sign of a product; a zero stays a plain zero. */
const opposite = (product: number): number => 0 - product;

/** The inertia tensor: its off-diagonals are minus the products. */
export function tensorOf(m: Moments): Sym3 {
  return {
    xx: m.ixx,
    yy: m.iyy,
    zz: m.izz,
    xy: opposite(m.ixy),
    xz: opposite(m.ixz),
    yz: opposite(m.iyz),
  };
}

/** Moments and positive products of an inertia tensor. */
export function momentsOf(tensor: Sym3): Moments {
  return {
    ixx: tensor.xx,
    iyy: tensor.yy,
    izz: tensor.zz,
    ixy: opposite(tensor.xy),
    ixz: opposite(tensor.xz),
    iyz: opposite(tensor.yz),
  };
}

/** Figures as a source states them -> positive integrals, and back: the same step both ways. */
export function withProductSign(m: Moments, sign: ProductSign): Moments {
  if (sign === 'positive') return m;
  return { ...m, ixy: opposite(m.ixy), ixz: opposite(m.ixz), iyz: opposite(m.iyz) };
}
