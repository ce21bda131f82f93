import { mirrorSym } from '@/lib/frames/reflection';
import { ACCOUNT_LENGTH } from '@/lib/mass/uncertainty/sums';

import { congruenceInto } from './congruence';
import { type RowAccounts } from './row-accounts';
import { type RowColumns } from './row-columns';

export const TRIANGLE = (ACCOUNT_LENGTH * (ACCOUNT_LENGTH + 1)) / 2;

/** The moments of which one is 1 and the others are 0. */
const UNITS = Array.from({ length: 6 }, (_, k) =>
  Float64Array.from({ length: 6 }, (__, j) => (j === k ? 1 : 0)),
);

/**
 * `covarianceOf(effectsOf(row))` of rows that come by column: the same steps in the same order, so the same bits, without an object on
 * the way for rows in the axes of their list.
 */
export class RowCovariances {
  /** Upper triangle by rows of the covariance of the row that was taken last. */
  readonly triangle = new Float64Array(TRIANGLE);
  readonly #effect = new Float64Array(ACCOUNT_LENGTH);
  readonly #moments = new Float64Array(6);
  readonly #second = new Float64Array(6);

  /** A row must have been placed by `accounts` before it is taken. */
  constructor(readonly accounts: RowAccounts) {}

  take(rows: RowColumns, row: number): void {
    const { numbers } = rows;
    const { accounts } = this;
    this.triangle.fill(0);
    const quantity = numbers.quantity[row] ?? NaN;
    const mass = numbers.mass[row] ?? NaN;
    const axes = accounts.axes(numbers, row);
    const both = accounts.isMirrored(rows, row);
    const massSigma = numbers.mass_sigma[row] ?? NaN;
    if (massSigma > 0) {
      this.#ofMass(numbers, row, axes);
      this.#add(quantity * massSigma, both);
    }
    const { x_sigma: x, y_sigma: y, z_sigma: z } = numbers;
    for (let k = 0; k < 3; k += 1) {
      const sigma = (k === 0 ? x : k === 1 ? y : z)[row] ?? NaN;
      if (!(sigma > 0)) continue;
      this.#ofCoordinate(mass, k);
      this.#add(quantity * sigma, both);
    }
    this.#ofMoment(numbers.ixx_sigma[row] ?? NaN, 0, axes, quantity, both);
    this.#ofMoment(numbers.iyy_sigma[row] ?? NaN, 1, axes, quantity, both);
    this.#ofMoment(numbers.izz_sigma[row] ?? NaN, 2, axes, quantity, both);
    this.#ofMoment(numbers.ixy_sigma[row] ?? NaN, 3, axes, quantity, both);
    this.#ofMoment(numbers.ixz_sigma[row] ?? NaN, 4, axes, quantity, both);
    this.#ofMoment(numbers.iyz_sigma[row] ?? NaN, 5, axes, quantity, both);
  }

  #ofMoment(sigma: number, k: number, axes: Float64Array, quantity: number, both: boolean): void {
    if (!(sigma > 0)) return;
    const effect = this.#effect;
    effect.fill(0);
    this.#takeSecond(UNITS[k] ?? this.#moments, axes);
    for (let element = 0; element < 6; element += 1) effect[4 + element] = this.#second[element] ?? NaN;
    this.#add(quantity * sigma, both);
  }

  /** S in airframe components of moments and positive products in a row's own axes. */
  #takeSecond(moments: Float64Array, axes: Float64Array): void {
    const ixx = moments[0] ?? NaN;
    const iyy = moments[1] ?? NaN;
    const izz = moments[2] ?? NaN;
    congruenceInto(
      this.#second,
      axes,
      (iyy + izz - ixx) / 2,
      (ixx + izz - iyy) / 2,
      (ixx + iyy - izz) / 2,
      moments[3] ?? NaN,
      moments[4] ?? NaN,
      moments[5] ?? NaN,
    );
  }

  /** ∂(m, p, Q)/∂m: own moments without a σ of their own scale with the mass. */
  #ofMass(numbers: RowColumns['numbers'], row: number, axes: Float64Array): void {
    const moments = this.#moments;
    const effect = this.#effect;
    const second = this.#second;
    const mass = numbers.mass[row] ?? NaN;
    moments[0] = perKilogram(numbers.ixx, numbers.ixx_sigma, mass, row);
    moments[1] = perKilogram(numbers.iyy, numbers.iyy_sigma, mass, row);
    moments[2] = perKilogram(numbers.izz, numbers.izz_sigma, mass, row);
    moments[3] = perKilogram(numbers.ixy, numbers.ixy_sigma, mass, row);
    moments[4] = perKilogram(numbers.ixz, numbers.ixz_sigma, mass, row);
    moments[5] = perKilogram(numbers.iyz, numbers.iyz_sigma, mass, row);
    this.#takeSecond(moments, axes);
    const { place } = this.accounts;
    const x = place[0] ?? NaN;
    const y = place[1] ?? NaN;
    const z = place[2] ?? NaN;
    effect[0] = 1;
    effect[1] = x;
    effect[2] = y;
    effect[3] = z;
    effect[4] = (second[0] ?? NaN) + x * x;
    effect[5] = (second[1] ?? NaN) + y * y;
    effect[6] = (second[2] ?? NaN) + z * z;
    effect[7] = (second[3] ?? NaN) + x * y;
    effect[8] = (second[4] ?? NaN) + x * z;
    effect[9] = (second[5] ?? NaN) + y * z;
  }

  #ofCoordinate(mass: number, k: number): void {
    const effect = this.#effect;
    const { place, placement } = this.accounts;
    const [toX, toY, toZ] = placement.toAirframe;
    const a = toX[k] ?? NaN;
    const b = toY[k] ?? NaN;
    const c = toZ[k] ?? NaN;
    const x = place[0] ?? NaN;
    const y = place[1] ?? NaN;
    const z = place[2] ?? NaN;
    effect[0] = 0;
    effect[1] = mass * a;
    effect[2] = mass * b;
    effect[3] = mass * c;
    effect[4] = mass * (2 * a * x);
    effect[5] = mass * (2 * b * y);
    effect[6] = mass * (2 * c * z);
    effect[7] = mass * (a * y + b * x);
    effect[8] = mass * (a * z + c * x);
    effect[9] = mass * (b * z + c * y);
  }

  /** Adds k² a aᵀ, a the effect and, with `both`, that on the mirror image as well. */
  #add(k: number, both: boolean): void {
    const { triangle } = this;
    const effect = this.#effect;
    if (both) this.#addMirrored();
    for (let i = 0; i < ACCOUNT_LENGTH; i += 1) effect[i] = k * (effect[i] ?? NaN);
    let at = 0;
    for (let i = 0; i < ACCOUNT_LENGTH; i += 1) {
      const first = effect[i] ?? NaN;
      if (first !== 0)
        for (let j = i; j < ACCOUNT_LENGTH; j += 1)
          triangle[at + j - i] = (triangle[at + j - i] ?? NaN) + first * (effect[j] ?? NaN);
      at += ACCOUNT_LENGTH - i;
    }
  }

  /** Adds to the effect that on the mirror image, as `row-effects` says. */
  #addMirrored(): void {
    const effect = this.#effect;
    const at = (i: number): number => effect[i] ?? NaN;
    const { lateral, plane } = this.accounts.placement;
    const mass = at(0);
    const twice = 2 * plane[0];
    const k = twice * mass;
    const first = [0, 1, 2].map((i) => (i === lateral ? -at(1 + i) : at(1 + i)));
    const n = [0, 1, 2].map((i) => (i === lateral ? 1 : 0));
    const second = mirrorSym({ xx: at(4), yy: at(5), zz: at(6), xy: at(7), xz: at(8), yz: at(9) }, lateral);
    const elements = [second.xx, second.yy, second.zz, second.xy, second.xz, second.yz];
    effect[0] = mass + mass;
    for (let i = 0; i < 3; i += 1) effect[1 + i] = at(1 + i) + ((first[i] ?? NaN) + k * (n[i] ?? NaN));
    for (const [element, [i, j]] of ELEMENTS.entries()) {
      const [ni, nj, fi, fj] = [n[i] ?? NaN, n[j] ?? NaN, first[i] ?? NaN, first[j] ?? NaN];
      const turned = i === j ? 2 * ni * fi : ni * fj + nj * fi;
      effect[4 + element] = at(4 + element) + ((elements[element] ?? NaN) + twice * (turned + k * (ni * nj)));
    }
  }
}

/** Rows and columns of xx, yy, zz, xy, xz, yz. */
const ELEMENTS = [
  [0, 0],
  [1, 1],
  [2, 2],
  [0, 1],
  [0, 2],
  [1, 2],
] as const;

function perKilogram(moments: Float64Array, sigmas: Float64Array, mass: number, row: number): number {
  return mass !== 0 && Number.isNaN(sigmas[row]) ? (moments[row] ?? NaN) / mass : 0;
}
