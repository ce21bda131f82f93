import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

import { type Sym3, normSym } from './sym3';
import { type Vec3 } from './vec3';

export interface Eigen {
  /** Ascending. */
  readonly values: Vec3;
  /** Unit eigenvectors in the order of `values`; their handedness and signs are arbitrary. */
  readonly vectors: readonly [Vec3, Vec3, Vec3];
}

/** Exact, and what most component tensors are. */
function eigenDiagonal({ xx, yy, zz }: Sym3): Eigen {
  const pairs: { value: number; vector: Vec3 }[] = [
    { value: xx, vector: [1, 0, 0] },
    { value: yy, vector: [0, 1, 0] },
    { value: zz, vector: [0, 0, 1] },
  ];
  return ascending(pairs);
}

function ascending(pairs: { readonly value: number; readonly vector: Vec3 }[]): Eigen {
  const [first, second, third] = pairs.sort((p, q) => p.value - q.value);
  if (!first || !second || !third) throw new RangeError('A 3x3 matrix has three eigenvalues.');
  return {
    values: [first.value, second.value, third.value],
    vectors: [first.vector, second.vector, third.vector],
  };
}

/**
 * Eigenvalues and eigenvectors of a symmetric 3x3 matrix.
 *
 * @throws RangeError when an element is not finite.
 */
export function eigenSym(a: Sym3): Eigen {
  const size = normSym(a);
  if (!Number.isFinite(size))
    throw new RangeError('A matrix with an element that is not finite has no eigenvalues.');
  if (size === 0) return eigenDiagonal(a);
  // Scaled to norm 1, so that grams and millimetres converge like tonnes and metres. What is then below 1e-30 cannot be seen in any
  // eigenvalue, and its square may underflow inside the decomposition, which divides by it.
  const part = (element: number): number => (Math.abs(element) < 1e-30 * size ? 0 : element / size);
  const [xy, xz, yz] = [part(a.xy), part(a.xz), part(a.yz)];
  if (xy === 0 && xz === 0 && yz === 0) return eigenDiagonal(a);
  const scaled = [
    [part(a.xx), xy, xz],
    [xy, part(a.yy), yz],
    [xz, yz, part(a.zz)],
  ];
  const found = new EigenvalueDecomposition(new Matrix(scaled), { assumeSymmetric: true });
  return ascending(
    found.realEigenvalues.map((value, k) => {
      const [x = NaN, y = NaN, z = NaN] = found.eigenvectorMatrix.getColumn(k);
      return { value: value * size, vector: [x, y, z] };
    }),
  );
}
