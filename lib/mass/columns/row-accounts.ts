import { type Placement } from '@/lib/mass/place';
import { type Mat3 } from '@/lib/numerics/mat3';
import { SPLITTER, productError, sumError } from '@/lib/numerics/sums';

import { congruenceInto, flatMatrix } from './congruence';
import { type RowColumns } from './row-columns';

const TEN = 10;

/**
 * `Placement.account` of rows that come by column: the same steps on the same numbers in the same order, so the same bits, without
 * an object on the way. Sums and products to twice the precision are those of `numerics/twice`.
 */
export class RowAccounts {
  /** The ten numbers of the account that was worked out last, and what rounding left out of each. */
  readonly numbers = new Float64Array(TEN);
  readonly rest = new Float64Array(TEN);
  /** CG of the row's pieces as seen from r0, and what rounding left out of it. */
  readonly place = new Float64Array(3);
  readonly #placeRest = new Float64Array(3);
  /** Second moment of one piece about its own CG: xx, yy, zz, xy, xz, yz, airframe components. */
  readonly #own = new Float64Array(6);
  readonly #image = {
    numbers: new Float64Array(TEN),
    rest: new Float64Array(TEN),
    place: new Float64Array(3),
    placeRest: new Float64Array(3),
    own: new Float64Array(6),
  };
  readonly #matrix: Float64Array;
  /** Sum and rest of o - r0. */
  readonly #base = new Float64Array(3);
  readonly #baseRest = new Float64Array(3);
  /** Twice the plane of symmetry, as seen from r0. */
  readonly #mirror: readonly [number, number];
  readonly #isHalf: boolean;

  constructor(readonly placement: Placement) {
    const { toAirframe, declarations, geometry, plane } = placement;
    this.#matrix = flatMatrix(toAirframe);
    for (const k of [0, 1, 2] as const) {
      const [origin, r0] = [declarations.pose.origin[k], -geometry.reference[k]];
      this.#base[k] = origin + r0;
      this.#baseRest[k] = sumError(origin, r0, origin + r0);
    }
    this.#mirror = [2 * plane[0], 2 * plane[1]];
    this.#isHalf = declarations.extent !== 'whole';
  }

  isMirrored(rows: RowColumns, row: number): boolean {
    return this.#isHalf || rows.pair[row] === 1;
  }

  /** Works out the account of all pieces of a row and of their mirror image where it has one. */
  take(rows: RowColumns, row: number): void {
    const { numbers } = rows;
    const mass = numbers.mass[row] ?? NaN;
    const quantity = numbers.quantity[row] ?? NaN;
    const hasOwn = rows.hasMoments[row] === 1;
    this.#takePlace(numbers.x[row] ?? NaN, numbers.y[row] ?? NaN, numbers.z[row] ?? NaN);
    if (hasOwn) this.#takeOwn(rows, row);
    accountAt(mass, this.place, this.#placeRest, hasOwn ? this.#own : null, this.numbers, this.rest);
    if (this.isMirrored(rows, row)) {
      this.#addImage(mass, hasOwn);
      scale(quantity, this.numbers, this.rest);
    } else if (quantity !== 1) scale(quantity, this.numbers, this.rest);
  }

  /** o + R P r - r0: `exactPlaceFrom`. */
  #takePlace(x: number, y: number, z: number): void {
    const matrix = this.#matrix;
    for (let k = 0; k < 3; k += 1) {
      let sum = this.#base[k] ?? NaN;
      let lost = this.#baseRest[k] ?? NaN;
      for (let j = 0; j < 3; j += 1) {
        const factor = matrix[3 * k + j] ?? NaN;
        if (factor === 0) continue;
        const coordinate = j === 0 ? x : j === 1 ? y : z;
        const product = factor * coordinate;
        const next = sum + product;
        lost += sumError(sum, product, next);
        // A product by 1 or -1 is exact.
        if (factor !== 1 && factor !== -1) lost += productError(factor, coordinate, product);
        sum = next;
      }
      const value = sum + lost;
      this.place[k] = value;
      this.#placeRest[k] = sumError(sum, lost, value);
    }
  }

  #takeOwn({ numbers }: RowColumns, row: number): void {
    const ixx = numbers.ixx[row] ?? NaN;
    const iyy = numbers.iyy[row] ?? NaN;
    const izz = numbers.izz[row] ?? NaN;
    congruenceInto(
      this.#own,
      this.axes(numbers, row),
      (iyy + izz - ixx) / 2,
      (ixx + izz - iyy) / 2,
      (ixx + iyy - izz) / 2,
      numbers.ixy[row] ?? NaN,
      numbers.ixz[row] ?? NaN,
      numbers.iyz[row] ?? NaN,
    );
  }

  /** The matrix from a row's own axes to airframe components, by rows. */
  axes(numbers: RowColumns['numbers'], row: number): Float64Array {
    const yaw = numbers.yaw[row] ?? NaN;
    const pitch = numbers.pitch[row] ?? NaN;
    const roll = numbers.roll[row] ?? NaN;
    if (yaw === 0 && pitch === 0 && roll === 0) return this.#matrix;
    const axes: Mat3 = this.placement.ownAxes({ orientation: { yaw, pitch, roll } });
    return flatMatrix(axes);
  }

  /** Whether a matrix that `axes` gave is that of all rows without a turn of their own. */
  isListAxes(axes: Float64Array): boolean {
    return axes === this.#matrix;
  }

  /** Adds the account of the mirror image of a piece. */
  #addImage(mass: number, hasOwn: boolean): void {
    const { lateral } = this.placement;
    const [twicePlane, twicePlaneRest] = this.#mirror;
    const image = this.#image;
    image.place.set(this.place);
    image.placeRest.set(this.#placeRest);
    const [across, acrossRest] = [-(this.place[lateral] ?? NaN), -(this.#placeRest[lateral] ?? NaN)];
    const sum = twicePlane + across;
    const low = sumError(twicePlane, across, sum) + (twicePlaneRest + acrossRest);
    image.place[lateral] = sum + low;
    image.placeRest[lateral] = low - (sum + low - sum);
    if (hasOwn) {
      const { own } = image;
      own.set(this.#own);
      // The two products with the lateral axis change sign.
      if (lateral !== 2) own[3] = 0 - (own[3] ?? NaN);
      if (lateral !== 1) own[4] = 0 - (own[4] ?? NaN);
      if (lateral !== 0) own[5] = 0 - (own[5] ?? NaN);
    }
    accountAt(mass, image.place, image.placeRest, hasOwn ? image.own : null, image.numbers, image.rest);
    const { numbers, rest } = this;
    for (let i = 0; i < TEN; i += 1) {
      const [a, b] = [numbers[i] ?? NaN, image.numbers[i] ?? NaN];
      const total = a + b;
      const left = sumError(a, b, total) + ((rest[i] ?? NaN) + (image.rest[i] ?? NaN));
      numbers[i] = total + left;
      rest[i] = left - (total + left - total);
    }
  }
}

/** k times an account, in place: `scaleAccount`. */
function scale(k: number, numbers: Float64Array, rest: Float64Array): void {
  for (let i = 0; i < TEN; i += 1) {
    const number = numbers[i] ?? NaN;
    const product = k * number;
    const low = productError(k, number, product) + k * (rest[i] ?? NaN);
    numbers[i] = product + low;
    rest[i] = low - (product + low - product);
  }
}

/**
 * The account of one body: `accountAt` of mass/account. Each factor is split for `productError` once, though it stands in
 * several products. `own` null: a point.
 */
function accountAt(
  mass: number,
  place: Float64Array,
  placeRest: Float64Array,
  own: Float64Array | null,
  numbers: Float64Array,
  rest: Float64Array,
): void {
  const x = place[0] ?? NaN;
  const y = place[1] ?? NaN;
  const z = place[2] ?? NaN;
  const xRest = placeRest[0] ?? NaN;
  const yRest = placeRest[1] ?? NaN;
  const zRest = placeRest[2] ?? NaN;
  const mHigh = high(mass);
  const mLow = mass - mHigh;
  const xHigh = high(x);
  const xLow = x - xHigh;
  const yHigh = high(y);
  const yLow = y - yHigh;
  const zHigh = high(z);
  const zLow = z - zHigh;

  const mx = mass * x;
  const mxLeft = left(mHigh, mLow, xHigh, xLow, mx) + mass * xRest;
  const px = mx + mxLeft;
  const pxRest = mxLeft - (px - mx);
  const my = mass * y;
  const myLeft = left(mHigh, mLow, yHigh, yLow, my) + mass * yRest;
  const py = my + myLeft;
  const pyRest = myLeft - (py - my);
  const mz = mass * z;
  const mzLeft = left(mHigh, mLow, zHigh, zLow, mz) + mass * zRest;
  const pz = mz + mzLeft;
  const pzRest = mzLeft - (pz - mz);

  const pxHigh = high(px);
  const pxLow = px - pxHigh;
  const pyHigh = high(py);
  const pyLow = py - pyHigh;
  const pzHigh = high(pz);
  const pzLow = pz - pzHigh;
  const xx = px * x;
  const yy = py * y;
  const zz = pz * z;
  const xy = px * y;
  const xz = px * z;
  const yz = py * z;
  numbers[0] = mass;
  numbers[1] = px;
  numbers[2] = py;
  numbers[3] = pz;
  rest[0] = 0;
  rest[1] = pxRest;
  rest[2] = pyRest;
  rest[3] = pzRest;
  keep(numbers, rest, 4, xx, left(pxHigh, pxLow, xHigh, xLow, xx) + (px * xRest + pxRest * x));
  keep(numbers, rest, 5, yy, left(pyHigh, pyLow, yHigh, yLow, yy) + (py * yRest + pyRest * y));
  keep(numbers, rest, 6, zz, left(pzHigh, pzLow, zHigh, zLow, zz) + (pz * zRest + pzRest * z));
  keep(numbers, rest, 7, xy, left(pxHigh, pxLow, yHigh, yLow, xy) + (px * yRest + pxRest * y));
  keep(numbers, rest, 8, xz, left(pxHigh, pxLow, zHigh, zLow, xz) + (px * zRest + pxRest * z));
  keep(numbers, rest, 9, yz, left(pyHigh, pyLow, zHigh, zLow, yz) + (py * zRest + pyRest * z));
  if (own === null) return;
  for (let element = 0; element < 6; element += 1) {
    const moved = numbers[4 + element] ?? NaN;
    const s = own[element] ?? NaN;
    const sum = moved + s;
    keep(numbers, rest, 4 + element, sum, sumError(moved, s, sum) + (rest[4 + element] ?? NaN));
  }
}

/** The upper half of a double's digits (Veltkamp). */
function high(a: number): number {
  const shift = SPLITTER * a;
  return shift - (shift - a);
}

/** `productError` of two numbers whose halves are known. */
function left(aHigh: number, aLow: number, bHigh: number, bLow: number, product: number): number {
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

/** A number and what is left of it, made disjoint. */
function keep(numbers: Float64Array, rest: Float64Array, at: number, value: number, lost: number): void {
  const sum = value + lost;
  numbers[at] = sum;
  rest[at] = lost - (sum - value);
}
