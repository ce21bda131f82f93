import { type Mat3 } from './mat3';
import { type Vec3 } from './vec3';

/** A symmetric 3x3 matrix by its six MATRIX elements: `xy` of an inertia tensor is minus the product of inertia. */
export interface Sym3 {
  readonly xx: number;
  readonly yy: number;
  readonly zz: number;
  readonly xy: number;
  readonly xz: number;
  readonly yz: number;
}

export const ZERO_SYM: Sym3 = { xx: 0, yy: 0, zz: 0, xy: 0, xz: 0, yz: 0 };

/** a + k b. */
export function addSym(a: Sym3, b: Sym3, k = 1): Sym3 {
  return {
    xx: a.xx + k * b.xx,
    yy: a.yy + k * b.yy,
    zz: a.zz + k * b.zz,
    xy: a.xy + k * b.xy,
    xz: a.xz + k * b.xz,
    yz: a.yz + k * b.yz,
  };
}

export function scaleSym(k: number, a: Sym3): Sym3 {
  return { xx: k * a.xx, yy: k * a.yy, zz: k * a.zz, xy: k * a.xy, xz: k * a.xz, yz: k * a.yz };
}

/** v vᵀ. */
export function outer(v: Vec3): Sym3 {
  const [x, y, z] = v;
  return { xx: x * x, yy: y * y, zz: z * z, xy: x * y, xz: x * z, yz: y * z };
}

/** u vᵀ + v uᵀ. */
export function symmetricProduct(u: Vec3, v: Vec3): Sym3 {
  return {
    xx: 2 * u[0] * v[0],
    yy: 2 * u[1] * v[1],
    zz: 2 * u[2] * v[2],
    xy: u[0] * v[1] + u[1] * v[0],
    xz: u[0] * v[2] + u[2] * v[0],
    yz: u[1] * v[2] + u[2] * v[1],
  };
}

export function trace(a: Sym3): number {
  return a.xx + a.yy + a.zz;
}

/** tr(a) 1 - a: the inertia tensor of a second moment matrix. */
export function traceMinus(a: Sym3): Sym3 {
  return { xx: a.yy + a.zz, yy: a.xx + a.zz, zz: a.xx + a.yy, xy: -a.xy, xz: -a.xz, yz: -a.yz };
}

/** ½ tr(a) 1 - a: the second moment matrix of an inertia tensor, the inverse of `traceMinus`. */
export function halfTraceMinus(a: Sym3): Sym3 {
  return {
    xx: (a.yy + a.zz - a.xx) / 2,
    yy: (a.xx + a.zz - a.yy) / 2,
    zz: (a.xx + a.yy - a.zz) / 2,
    xy: -a.xy,
    xz: -a.xz,
    yz: -a.yz,
  };
}

/** M a Mᵀ. */
export function congruence(m: Mat3, a: Sym3): Sym3 {
  const form = (u: Vec3, v: Vec3): number =>
    u[0] * (a.xx * v[0] + a.xy * v[1] + a.xz * v[2]) +
    u[1] * (a.xy * v[0] + a.yy * v[1] + a.yz * v[2]) +
    u[2] * (a.xz * v[0] + a.yz * v[1] + a.zz * v[2]);
  const [x, y, z] = m;
  return {
    xx: form(x, x),
    yy: form(y, y),
    zz: form(z, z),
    xy: form(x, y),
    xz: form(x, z),
    yz: form(y, z),
  };
}

export function symToMat(a: Sym3): Mat3 {
  return [
    [a.xx, a.xy, a.xz],
    [a.xy, a.yy, a.yz],
    [a.xz, a.yz, a.zz],
  ];
}

/** Frobenius norm. */
export function normSym(a: Sym3): number {
  return Math.hypot(a.xx, a.yy, a.zz, Math.SQRT2 * a.xy, Math.SQRT2 * a.xz, Math.SQRT2 * a.yz);
}
