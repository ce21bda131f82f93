import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

import { type Sym3, normSym } from './sym3';
import { type Vec3 } from './vec3';

export interface Eigen {
  /** Ascending. */
  readonly values: Vec3;
  /** Unit eigenvectors in the order of `values`; their handedness and signs are arbitrary. */
  readonly vectors: readonly [Vec3, Vec3, Vec3];
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
  if (size === 0)
    return {
      values: [0, 0, 0],
      vectors: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
    };
  // Scaled to norm 1, so that grams and millimetres converge like tonnes and metres.
  const scaled = [
    [a.xx / size, a.xy / size, a.xz / size],
    [a.xy / size, a.yy / size, a.yz / size],
    [a.xz / size, a.yz / size, a.zz / size],
  ];
  const found = new EigenvalueDecomposition(new Matrix(scaled), { assumeSymmetric: true });
  const pairs = found.realEigenvalues.map((value, k) => {
    const [x = NaN, y = NaN, z = NaN] = found.eigenvectorMatrix.getColumn(k);
    return { value: value * size, vector: [x, y, z] as const };
  });
  pairs.sort((p, q) => p.value - q.value);
  const [first, second, third] = pairs;
  if (!first || !second || !third)
    throw new RangeError('The decomposition did not return three eigenvalues.');
  return {
    values: [first.value, second.value, third.value],
    vectors: [first.vector, second.vector, third.vector],
  };
}
