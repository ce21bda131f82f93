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
