import { type Placement } from '@/lib/mass/place';
import { type Mat3 } from '@/lib/numerics/mat3';
import { productError, sumError } from '@/lib/numerics/sums';
import { type Sym3, congruence, halfTraceMinus } from '@/lib/numerics/sym3';

import { type RowColumns } from './row-columns';

const TEN = 10;
const NO_MOMENTS = new Float64Array(6);

/**
 * `Placement.account` of rows that come by column: the same steps on the same numbers in the same order, so the same bits, without
 * an object on the way. The sum and product of two numbers to twice the precision are those of `numerics/twice`.
 */
export class RowAccounts {
  /** The ten numbers of the account that was worked out last, and what rounding left out of each. */
  readonly numbers = new Float64Array(TEN);
  readonly rest = new Float64Array(TEN);
  /** CG of the row's pieces as seen from r0, and what rounding left out of it. */
  readonly place = new Float64Array(3);
  readonly placeRest = new Float64Array(3);
  /** Second moment of one piece about its own CG: xx, yy, zz, xy, xz, yz, airframe components. */
  readonly own = new Float64Array(6);
  readonly #image = new Float64Array(TEN);
  readonly #imageRest = new Float64Array(TEN);
  readonly #imagePlace = new Float64Array(3);
  readonly #imagePlaceRest = new Float64Array(3);
  readonly #imageOwn = new Float64Array(6);
  readonly #matrix: Float64Array;
  /** Sum and rest of o - r0. */
  readonly #base = new Float64Array(3);
  readonly #baseRest = new Float64Array(3);
  /** Twice the plane of symmetry, as seen from r0. */
  readonly #mirror: readonly [number, number];
  readonly #isHalf: boolean;

  constructor(readonly placement: Placement) {
    const { toAirframe, declarations, geometry, plane } = placement;
    this.#matrix = Float64Array.from(toAirframe.flat());
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
    this.takePlace(rows, row);
    if (hasOwn) this.#takeOwn(rows, row);
    else this.own.set(NO_MOMENTS);
    accountAt(mass, this.place, this.placeRest, this.own, hasOwn, this.numbers, this.rest);
    if (this.isMirrored(rows, row)) {
      this.#addImage(mass, hasOwn);
      scale(quantity, this.numbers, this.rest);
    } else if (quantity !== 1) scale(quantity, this.numbers, this.rest);
  }

  /** o + R P r - r0: `exactPlaceFrom`. */
  takePlace({ numbers }: RowColumns, row: number): void {
    const matrix = this.#matrix;
    const x = numbers.x[row] ?? NaN;
    const y = numbers.y[row] ?? NaN;
    const z = numbers.z[row] ?? NaN;
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
      this.placeRest[k] = sumError(sum, lost, value);
    }
  }

  #takeOwn({ numbers }: RowColumns, row: number): void {
    const at = (column: 'ixx' | 'iyy' | 'izz' | 'ixy' | 'ixz' | 'iyz'): number => numbers[column][row] ?? NaN;
    // Off-diagonals: minus the tensor's, which are minus the products.
    const second: Sym3 = halfTraceMinus({
      xx: at('ixx'),
      yy: at('iyy'),
      zz: at('izz'),
      xy: 0 - at('ixy'),
      xz: 0 - at('ixz'),
      yz: 0 - at('iyz'),
    });
    const { xx, yy, zz, xy, xz, yz } = congruence(this.ownAxes(numbers, row), second);
    const { own } = this;
    own[0] = xx;
    own[1] = yy;
    own[2] = zz;
    own[3] = xy;
    own[4] = xz;
    own[5] = yz;
  }

  ownAxes(numbers: RowColumns['numbers'], row: number): Mat3 {
    const yaw = numbers.yaw[row] ?? NaN;
    const pitch = numbers.pitch[row] ?? NaN;
    const roll = numbers.roll[row] ?? NaN;
    if (yaw === 0 && pitch === 0 && roll === 0) return this.placement.toAirframe;
    return this.placement.ownAxes({ orientation: { yaw, pitch, roll } });
  }

  /** Adds the account of the mirror image of a piece. */
  #addImage(mass: number, hasOwn: boolean): void {
    const { lateral } = this.placement;
    const [twicePlane, twicePlaneRest] = this.#mirror;
    const image = this.#imagePlace;
    const imageRest = this.#imagePlaceRest;
    image.set(this.place);
    imageRest.set(this.placeRest);
    const [across, acrossRest] = [-(this.place[lateral] ?? NaN), -(this.placeRest[lateral] ?? NaN)];
    const sum = twicePlane + across;
    const low = sumError(twicePlane, across, sum) + (twicePlaneRest + acrossRest);
    image[lateral] = sum + low;
    imageRest[lateral] = low - (sum + low - sum);
    const own = this.#imageOwn;
    own.set(this.own);
    // The two products with the lateral axis change sign.
    if (lateral !== 2) own[3] = 0 - (own[3] ?? NaN);
    if (lateral !== 1) own[4] = 0 - (own[4] ?? NaN);
    if (lateral !== 0) own[5] = 0 - (own[5] ?? NaN);
    accountAt(mass, image, imageRest, own, hasOwn, this.#image, this.#imageRest);
    const { numbers, rest } = this;
    for (let i = 0; i < TEN; i += 1) {
      const [a, b] = [numbers[i] ?? NaN, this.#image[i] ?? NaN];
      const total = a + b;
      const left = sumError(a, b, total) + ((rest[i] ?? NaN) + (this.#imageRest[i] ?? NaN));
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

/** The account of one body: `accountAt`. */
function accountAt(
  mass: number,
  place: Float64Array,
  placeRest: Float64Array,
  own: Float64Array,
  hasOwn: boolean,
  numbers: Float64Array,
  rest: Float64Array,
): void {
  numbers[0] = mass;
  rest[0] = 0;
  for (let k = 0; k < 3; k += 1) {
    const r = place[k] ?? NaN;
    const product = mass * r;
    const low = productError(mass, r, product) + mass * (placeRest[k] ?? NaN);
    numbers[1 + k] = product + low;
    rest[1 + k] = low - (product + low - product);
  }
  for (let element = 0; element < 6; element += 1) {
    const i = element < 3 ? element : element === 5 ? 1 : 0;
    const j = element < 3 ? element : element === 3 ? 1 : 2;
    const p = numbers[1 + i] ?? NaN;
    const r = place[j] ?? NaN;
    const product = p * r;
    let low = productError(p, r, product) + (p * (placeRest[j] ?? NaN) + (rest[1 + i] ?? NaN) * r);
    let high = product + low;
    low -= high - product;
    if (hasOwn) {
      const s = own[element] ?? NaN;
      const sum = high + s;
      const left = sumError(high, s, sum) + low;
      high = sum + left;
      low = left - (high - sum);
    }
    numbers[4 + element] = high;
    rest[4 + element] = low;
  }
}
