import { CompensatedSums } from '@/lib/numerics/sums';

/** Numbers of an account, and rows of its covariance matrix. */
export const ACCOUNT_LENGTH = 10;

/** Elements of a symmetric 10x10 matrix. */
const TRIANGLE = (ACCOUNT_LENGTH * (ACCOUNT_LENGTH + 1)) / 2;

/** How many numbers the uncertainty of an account is kept as. */
export const UNCERTAINTY_LENGTH = TRIANGLE + 2;

/**
 * How uncertain an account is, to first order: the covariance matrix of its ten numbers about r0. Errors of different rows are
 * independent, so the matrices of sets of rows simply add, and everything that a result needs about any CG is a linear map of the
 * sum. (The monomials of σm² up to degree 4 and of m² C up to degree 2 are its elements.)
 */
export interface AccountUncertainty {
  /** Σ |m| of all rows, kg: removals count as what they take away. */
  readonly mass: number;
  /** The part of it in rows that state a σ of their mass, zero too, kg. */
  readonly massWithSigma: number;
  /** Upper triangle by rows, in the order of the account's numbers: m; p; Qxx, Qyy, Qzz, Qxy, Qxz, Qyz. SI. */
  readonly covariance: readonly number[];
}

/** The same, as it may be added. */
type Summand = Omit<AccountUncertainty, 'covariance'> & { readonly covariance: ArrayLike<number> };

export const CERTAIN: AccountUncertainty = {
  mass: 0,
  massWithSigma: 0,
  covariance: Array.from({ length: TRIANGLE }, () => 0),
};

/** Upper triangle by rows of Σ a aᵀ over some changes of an account's numbers. */
export function covarianceOf(effects: readonly (readonly number[])[]): Float64Array {
  const triangle = new Float64Array(TRIANGLE);
  for (const a of effects) {
    let row = 0;
    for (let i = 0; i < ACCOUNT_LENGTH; i += 1) {
      const left = a[i] ?? NaN;
      // Own moments move nothing but Q, places no mass.
      if (left !== 0)
        for (let j = i; j < ACCOUNT_LENGTH; j += 1) {
          const at = row + j - i;
          triangle[at] = (triangle[at] ?? NaN) + left * (a[j] ?? NaN);
        }
      row += ACCOUNT_LENGTH - i;
    }
  }
  return triangle;
}

/** The covariance matrix in full, by rows. */
export function covarianceMatrix({ covariance }: Pick<AccountUncertainty, 'covariance'>): number[][] {
  const matrix = Array.from({ length: ACCOUNT_LENGTH }, () =>
    Array.from({ length: ACCOUNT_LENGTH }, () => 0),
  );
  let at = 0;
  for (let i = 0; i < ACCOUNT_LENGTH; i += 1)
    for (let j = i; j < ACCOUNT_LENGTH; j += 1) {
      const value = covariance[at] ?? NaN;
      for (const [row, column] of [
        [i, j],
        [j, i],
      ] as const)
        (matrix[row] ?? [])[column] = value;
      at += 1;
    }
  return matrix;
}

/** The order in which an uncertainty is stored: Σ |m|, its part with a σ, then the 55 of the covariance matrix. */
export function toNumbers({ mass, massWithSigma, covariance }: AccountUncertainty): number[] {
  return [mass, massWithSigma, ...covariance];
}

/** @throws RangeError unless there are exactly 57 finite numbers. */
export function fromNumbers(numbers: readonly number[]): AccountUncertainty {
  if (numbers.length !== UNCERTAINTY_LENGTH || !numbers.every(Number.isFinite))
    throw new RangeError(
      `The uncertainty of an account is ${UNCERTAINTY_LENGTH} finite numbers, not [${numbers.join(', ')}].`,
    );
  const [mass = 0, massWithSigma = 0, ...covariance] = numbers;
  return { mass, massWithSigma, covariance };
}

/** Adds uncertainties of different rows one after another, in any number and any order. */
export class UncertaintySum {
  readonly #masses = new CompensatedSums(2);
  readonly #covariance = new CompensatedSums(TRIANGLE);

  /** Adds that of k times an account, as growth makes it: masses with k, variances with k². */
  add({ mass, massWithSigma, covariance }: Summand, k = 1): void {
    this.#masses.add([mass, massWithSigma], Math.abs(k));
    this.#covariance.add(covariance, k * k);
  }

  /** Adds a mass of which nothing is said to be uncertain, kg. */
  addWithoutSigma(mass: number): void {
    this.#masses.add([Math.abs(mass), 0]);
  }

  get uncertainty(): AccountUncertainty {
    const [mass = 0, massWithSigma = 0] = this.#masses.values;
    return { mass, massWithSigma, covariance: this.#covariance.values };
  }
}
