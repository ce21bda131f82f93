import { type Mat3 } from '@/lib/numerics/mat3';

export function flatMatrix(matrix: Mat3): Float64Array {
  return Float64Array.from(matrix.flat());
}

/** `congruence` of numerics/sym3 without an object: M a Mᵀ, xx, yy, zz, xy, xz, yz; the same sums in the same order. */
export function congruenceInto(
  result: Float64Array,
  matrix: Float64Array,
  xx: number,
  yy: number,
  zz: number,
  xy: number,
  xz: number,
  yz: number,
): void {
  for (let row = 0; row < 3; row += 1) {
    const x = matrix[3 * row] ?? NaN;
    const y = matrix[3 * row + 1] ?? NaN;
    const z = matrix[3 * row + 2] ?? NaN;
    const ax = xx * x + xy * y + xz * z;
    const ay = xy * x + yy * y + yz * z;
    const az = xz * x + yz * y + zz * z;
    result[row] = x * ax + y * ay + z * az;
    // The rows before this one, with it: xy of y; xz and yz of z.
    for (let other = 0; other < row; other += 1)
      result[row + other + 2] =
        (matrix[3 * other] ?? NaN) * ax +
        (matrix[3 * other + 1] ?? NaN) * ay +
        (matrix[3 * other + 2] ?? NaN) * az;
  }
}
