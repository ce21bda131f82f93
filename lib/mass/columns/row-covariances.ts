import { mirrorSym } from '@/lib/frames/reflection';
import { ACCOUNT_LENGTH } from '@/lib/mass/uncertainty/sums';
import { type Mat3 } from '@/lib/numerics/mat3';
import { type Sym3, congruence, halfTraceMinus } from '@/lib/numerics/sym3';

import { type RowAccounts } from './row-accounts';
import { type RowColumns } from './row-columns';

const TRIANGLE = (ACCOUNT_LENGTH * (ACCOUNT_LENGTH + 1)) / 2;
const ELEMENTS = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;
const COORDINATES = ['x', 'y', 'z'] as const;

type Elements = readonly [number, number, number, number, number, number];

/** The moments of which one is 1 and the others are 0. */
function unit(k: number): Elements {
  const at = (j: number): number => (j === k ? 1 : 0);
  return [at(0), at(1), at(2), at(3), at(4), at(5)];
}

/**
 * `covarianceOf(effectsOf(row))` of rows that come by column: the same steps in the same order, so the same bits, without an object on
 * the way for rows in the axes of their list.
 */
export class RowCovariances {
  /** Upper triangle by rows of the covariance of the row that was taken last. */
  readonly triangle = new Float64Array(TRIANGLE);
  readonly #effect = new Float64Array(ACCOUNT_LENGTH);
  readonly #unitsAlong: readonly Sym3[];

  /** Rows must have been placed by `accounts` before they are taken. */
  constructor(readonly accounts: RowAccounts) {
    this.#unitsAlong = ELEMENTS.map((_, k) => secondOf(accounts.placement.toAirframe, unit(k)));
  }

  take(rows: RowColumns, row: number): void {
    const { numbers } = rows;
    const { triangle, accounts } = this;
    triangle.fill(0);
    const quantity = numbers.quantity[row] ?? NaN;
    const axes = accounts.ownAxes(numbers, row);
    const both = accounts.isMirrored(rows, row);
    const massSigma = numbers.mass_sigma[row] ?? NaN;
    if (massSigma > 0) {
      this.#ofMass(rows, row, axes);
      this.#add(quantity * massSigma, both);
    }
    for (let k = 0; k < 3; k += 1) {
      const sigma = numbers[`${COORDINATES[k] ?? 'x'}_sigma`][row] ?? NaN;
      if (!(sigma > 0)) continue;
      this.#ofCoordinate(numbers.mass[row] ?? NaN, k);
      this.#add(quantity * sigma, both);
    }
    for (let k = 0; k < 6; k += 1) {
      const sigma = numbers[`${ELEMENTS[k] ?? 'ixx'}_sigma`][row] ?? NaN;
      if (!(sigma > 0)) continue;
      this.#effect.fill(0);
      const along = axes === accounts.placement.toAirframe ? this.#unitsAlong[k] : undefined;
      this.#setSecond(along ?? secondOf(axes, unit(k)));
      this.#add(quantity * sigma, both);
    }
  }

  #setSecond({ xx, yy, zz, xy, xz, yz }: Sym3): void {
    const effect = this.#effect;
    effect[4] = xx;
    effect[5] = yy;
    effect[6] = zz;
    effect[7] = xy;
    effect[8] = xz;
    effect[9] = yz;
  }

  /** ∂(m, p, Q)/∂m: own moments without a σ of their own scale with the mass. */
  #ofMass({ numbers }: RowColumns, row: number, axes: Mat3): void {
    const effect = this.#effect;
    const mass = numbers.mass[row] ?? NaN;
    const part = (element: (typeof ELEMENTS)[number]): number =>
      mass !== 0 && Number.isNaN(numbers[`${element}_sigma`][row])
        ? (numbers[element][row] ?? NaN) / mass
        : 0;
    const { xx, yy, zz, xy, xz, yz } = secondOf(axes, [
      part('ixx'),
      part('iyy'),
      part('izz'),
      part('ixy'),
      part('ixz'),
      part('iyz'),
    ]);
    const [x = NaN, y = NaN, z = NaN] = this.accounts.place;
    effect[0] = 1;
    effect[1] = x;
    effect[2] = y;
    effect[3] = z;
    effect[4] = xx + x * x;
    effect[5] = yy + y * y;
    effect[6] = zz + z * z;
    effect[7] = xy + x * y;
    effect[8] = xz + x * z;
    effect[9] = yz + y * z;
  }

  #ofCoordinate(mass: number, k: number): void {
    const effect = this.#effect;
    const { toAirframe } = this.accounts.placement;
    const [a, b, c] = [toAirframe[0][k] ?? NaN, toAirframe[1][k] ?? NaN, toAirframe[2][k] ?? NaN];
    const [x = NaN, y = NaN, z = NaN] = this.accounts.place;
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
    const image = both ? this.#mirrored() : null;
    for (let i = 0; i < ACCOUNT_LENGTH; i += 1) effect[i] = k * ((effect[i] ?? NaN) + (image?.[i] ?? 0));
    let at = 0;
    for (let i = 0; i < ACCOUNT_LENGTH; i += 1) {
      const left = effect[i] ?? NaN;
      if (left === 0) {
        at += ACCOUNT_LENGTH - i;
        continue;
      }
      for (let j = i; j < ACCOUNT_LENGTH; j += 1) {
        triangle[at] = (triangle[at] ?? NaN) + left * (effect[j] ?? NaN);
        at += 1;
      }
    }
  }

  /** The effect on the mirror image: as `row-effects` says. */
  #mirrored(): readonly number[] {
    const [
      mass = NaN,
      px = NaN,
      py = NaN,
      pz = NaN,
      xx = NaN,
      yy = NaN,
      zz = NaN,
      xy = NaN,
      xz = NaN,
      yz = NaN,
    ] = this.#effect;
    const { lateral, plane } = this.accounts.placement;
    const [at] = plane;
    const first = [px, py, pz].map((part, k) => (k === lateral ? -part : part));
    const [fx = NaN, fy = NaN, fz = NaN] = first;
    const n = [0, 1, 2].map((k) => (k === lateral ? 1 : 0));
    const [nx = NaN, ny = NaN, nz = NaN] = n;
    const second = mirrorSym({ xx, yy, zz, xy, xz, yz }, lateral);
    const [twice, k] = [2 * at, 2 * at * mass];
    return [
      mass,
      ...first.map((part, i) => part + k * (n[i] ?? NaN)),
      second.xx + twice * (2 * nx * fx + k * (nx * nx)),
      second.yy + twice * (2 * ny * fy + k * (ny * ny)),
      second.zz + twice * (2 * nz * fz + k * (nz * nz)),
      second.xy + twice * (nx * fy + ny * fx + k * (nx * ny)),
      second.xz + twice * (nx * fz + nz * fx + k * (nx * nz)),
      second.yz + twice * (ny * fz + nz * fy + k * (ny * nz)),
    ];
  }
}

/** S in airframe components of moments and positive products in the axes whose matrix to airframe components is given. */
function secondOf(axes: Mat3, [ixx, iyy, izz, ixy, ixz, iyz]: Elements): Sym3 {
  return congruence(
    axes,
    halfTraceMinus({ xx: ixx, yy: iyy, zz: izz, xy: 0 - ixy, xz: 0 - ixz, yz: 0 - iyz }),
  );
}
