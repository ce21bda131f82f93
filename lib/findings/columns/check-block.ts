import { type RowBlock } from '@/lib/ingest/blocks/row-block';
import { DEFAULT_GROUP } from '@/lib/ingest/mass-list/component-row';
import { CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type Placement } from '@/lib/mass/place';

import { type RowContext } from '../context';
import { RowFacts } from '../row-facts';
import { ON_PLANE } from '../rows/sides';
import { NAMES_NO_SIDE, sideInBytes } from './side-in-bytes';
import { KeptRows } from './kept-rows';
import { ownMomentTraits } from './moment-traits';
import { TRAITS } from './traits';

const APPROVED = CHANGE_STATUSES.indexOf('approved');
const ESTIMATED = MATURITIES.indexOf('E');
const ACTUAL = MATURITIES.indexOf('A');

/** What several rules ask of the rows of a block, worked out once: the same numbers as `RowFacts` has, by column. */
export class CheckBlock {
  /** How many blocks there were before. */
  serial = 0;
  /** Bits of `TRAITS` of each row, and all of them together. */
  readonly traits: Int32Array;
  allTraits = 0;
  /** 1 for a counted row. */
  readonly counted: Uint8Array;
  /** Mass of all pieces and images, kg. */
  readonly total: Float64Array;
  /** CG of each row as it stands from the datum, airframe components one after another, m. */
  readonly place: readonly [Float64Array, Float64Array, Float64Array];
  /** How far that is right of the plane of symmetry, m. */
  readonly right: Float64Array;
  readonly isMirrored: Uint8Array;
  /** The side that a row's name tells: see `side-in-bytes`. */
  readonly side: Uint8Array;
  readonly kept = new KeptRows();
  readonly #facts: (RowFacts | null)[];
  readonly #unknown: boolean[] = [];
  readonly #isHalf: boolean;
  readonly #isOwnOrigin: boolean;
  /** Half the larger of span and length, m; 0 where it is not known. */
  readonly #half: number;
  readonly #extent: readonly { readonly from: number; readonly most: number }[];

  constructor(
    readonly rows: RowBlock,
    readonly placement: Placement,
    private readonly context: RowContext,
  ) {
    const size = rows.lines.length;
    this.traits = new Int32Array(size);
    this.counted = new Uint8Array(size);
    this.total = new Float64Array(size);
    this.place = [new Float64Array(size), new Float64Array(size), new Float64Array(size)];
    this.right = new Float64Array(size);
    this.isMirrored = new Uint8Array(size);
    this.side = new Uint8Array(size);
    this.#facts = Array.from({ length: size }, () => null);
    const { declarations, geometry } = placement;
    this.#isHalf = declarations.extent !== 'whole';
    this.#isOwnOrigin = declarations.pose.origin.some((each) => each !== 0);
    this.#half = Math.max(context.geometry?.span ?? 0, context.geometry?.length ?? 0) / 2;
    this.#extent = extentOf(geometry);
  }

  /** To be called for every block. */
  load(): void {
    this.serial += 1;
    this.#facts.fill(null, 0, this.rows.rows);
    this.#takePlaces();
    this.#takeSides();
    this.#takeTraits();
  }

  /** The row as an object, the same one as long as the block is at hand. */
  readonly facts = (row: number): RowFacts => {
    const known = this.#facts[row];
    if (known !== null && known !== undefined) return known;
    const made = new RowFacts(this.rows.component(row), this.placement);
    this.#facts[row] = made;
    return made;
  };

  #takePlaces(): void {
    const { rows, placement } = this;
    const { x, y, z, mass, quantity } = rows.numbers;
    const { origin } = placement.declarations.pose;
    for (const k of [0, 1, 2] as const) {
      const [a, b, c] = placement.toAirframe[k];
      const place = this.place[k];
      for (let row = 0; row < rows.rows; row += 1)
        place[row] = origin[k] + (a * (x[row] ?? NaN) + b * (y[row] ?? NaN) + c * (z[row] ?? NaN));
    }
    const { lateral, geometry } = placement;
    const across = this.place[lateral];
    const sign = geometry.axes[lateral] === 'right' ? 1 : -1;
    for (let row = 0; row < rows.rows; row += 1) {
      const isMirrored = this.#isHalf || rows.pair[row] === 1;
      this.isMirrored[row] = isMirrored ? 1 : 0;
      this.counted[row] = rows.memo[row] === 1 ? 0 : 1;
      this.right[row] = sign * ((across[row] ?? NaN) - geometry.lateralPlane);
      this.total[row] = (mass[row] ?? NaN) * ((quantity[row] ?? NaN) * (isMirrored ? 2 : 1));
    }
  }

  /** By the description, or else the item, as `RowFacts.side`. */
  #takeSides(): void {
    const { rows, side } = this;
    const { item, description } = rows.texts;
    for (let row = 0; row < rows.rows; row += 1) {
      const told = sideInBytes(rows.bytes, description.start[row] ?? 0, description.end[row] ?? 0);
      side[row] =
        told === NAMES_NO_SIDE ? sideInBytes(rows.bytes, item.start[row] ?? 0, item.end[row] ?? 0) : told;
    }
  }

  #takeTraits(): void {
    const { rows, counted, traits, right, isMirrored } = this;
    const { mass, x, y, z, growth } = rows.numbers;
    const { memo, pair, hasMoments, hasSigma, maturity, status, group } = rows;
    const ungrouped = rows.groups.indexOf(DEFAULT_GROUP);
    let all = 0;
    for (let row = 0; row < rows.rows; row += 1) {
      const m = mass[row] ?? NaN;
      let bits = 0;
      if (m < 0) bits |= TRAITS.negative;
      if (pair[row] === 1) bits |= TRAITS.pair;
      if (memo[row] === 1) bits |= TRAITS.memo;
      if (counted[row] === 1) {
        if (m === 0) bits |= TRAITS.massless;
        else if (x[row] === 0 && y[row] === 0 && z[row] === 0 && !this.#isOwnOrigin) bits |= TRAITS.onDatum;
        if (maturity[row] === MATURITIES.length) bits |= TRAITS.noMaturity;
        if (group[row] === ungrouped) bits |= TRAITS.noGroup;
        if (status[row] !== APPROVED) bits |= TRAITS.waiting;
        const grown = growth[row] ?? NaN;
        if (maturity[row] === ACTUAL && grown > 0) bits |= TRAITS.grownActual;
        if (maturity[row] === ESTIMATED && grown <= 0) bits |= TRAITS.ungrownEstimate;
        if (isMirrored[row] === 1 && Math.abs(right[row] ?? NaN) < ON_PLANE) bits |= TRAITS.onPlane;
        if (hasSigma[row] === 1 && this.#isVague(row)) bits |= TRAITS.vague;
        if (hasMoments[row] === 1) bits |= ownMomentTraits(rows.numbers, row, this.#half);
        if (this.#extent.length > 0 && this.#isOutside(row)) bits |= TRAITS.outside;
        if (this.context.groups !== undefined && this.#isUnknown(group[row] ?? 0))
          bits |= TRAITS.unknownGroup;
      }
      traits[row] = bits;
      all |= bits;
    }
    this.allTraits = all;
  }

  #isVague(row: number): boolean {
    const {
      mass,
      ixx,
      iyy,
      izz,
      mass_sigma: m,
      ixx_sigma: a,
      iyy_sigma: b,
      izz_sigma: c,
    } = this.rows.numbers;
    const isLarger = (sigma: Float64Array, value: Float64Array): boolean =>
      (sigma[row] ?? NaN) > Math.abs(value[row] ?? NaN);
    return isLarger(m, mass) || isLarger(a, ixx) || isLarger(b, iyy) || isLarger(c, izz);
  }

  /** Whether a place is outside the aircraft, or within it by less than a share that rounding could bridge. */
  #isOutside(row: number): boolean {
    for (const [k, { from, most }] of this.#extent.entries())
      if (Math.abs((this.place[k]?.[row] ?? NaN) - from) > most) return true;
    return false;
  }

  #isUnknown(group: number): boolean {
    return (this.#unknown[group] ??= this.context.groups?.isUnknown(this.rows.groups[group] ?? '') ?? false);
  }
}

/** The extent of an aircraft by axis, as `rows/place` has it; empty where span, length or chord are not known. */
function extentOf({ axes, span, length, mac, lemac, lateralPlane }: Placement['geometry']) {
  if (!(span > 0 && length > 0 && mac > 0)) return [];
  return axes.map((direction, k) => {
    if (direction === 'left' || direction === 'right') return { from: lateralPlane, most: span / 2 };
    const most = direction === 'aft' || direction === 'forward' ? length : Math.max(span, length);
    return { from: lemac[k] ?? NaN, most };
  });
}
