import { Matrix } from 'ml-matrix';

/** What the triple product of two 10x10 matrices may round by, as a share of the sizes of its terms. */
const ROUNDING = 32 * Number.EPSILON;

/**
 * C U Cᵀ: the covariance matrix of results whose derivatives by some inputs are the rows of C, U the covariance matrix of the inputs
 * (law of propagation, JCGM 100:2008, 5.2.2, equation 13, in matrix form). A variance that is no more than the rounding of its terms
 * is zero, and so is what goes with it.
 */
export function propagate(
  derivatives: readonly (readonly number[])[],
  covariance: readonly (readonly number[])[],
): number[][] {
  const c = new Matrix(derivatives.map((row) => [...row]));
  const u = new Matrix(covariance.map((row) => [...row]));
  const product = (left: Matrix, middle: Matrix): Matrix => left.mmul(middle).mmul(left.transpose());
  const result = product(c, u);
  const sizes = product(Matrix.abs(c), Matrix.abs(u));
  const certain = result.diagonal().map((variance, i) => variance <= ROUNDING * sizes.get(i, i));
  return result.to2DArray().map((row, i) => row.map((value, j) => (certain[i] || certain[j] ? 0 : value)));
}
