import { carriedPose } from '@/lib/frames/carry';
import { type IssueChange, NO_CHANGE, changedPlace, changedPlaceFrom } from '@/lib/frames/issue-change';
import { type AirframeTwice } from '@/lib/frames/pose';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Mat3 } from '@/lib/numerics/mat3';
import { propagate } from '@/lib/numerics/propagate';
import { type Twice, addTwice, timesTwice } from '@/lib/numerics/twice';

import { type Account, fromNumbers, toNumbers } from './account';
import { type ListDeclarations } from './declarations';
import { type AirframeGeometry } from './geometry';
import { type Subtotal } from './subtotals';
import { type UncertaintySubtotal } from './uncertainty/book';
import { ACCOUNT_LENGTH, type AccountUncertainty, covarianceMatrix } from './uncertainty/sums';

type Index = 0 | 1 | 2;

/** Where the six elements of a second moment stand in their matrix, in the order of an account's numbers. */
const ELEMENTS: readonly (readonly [Index, Index])[] = [
  [0, 0],
  [1, 1],
  [2, 2],
  [0, 1],
  [0, 2],
  [1, 2],
];

/**
 * An account placed elsewhere, exactly but for rounding at twice the precision: r' = M r + d gives p' = M p + m d and
 * Q' = M Q Mᵀ + (M p) dᵀ + d (M p)ᵀ + m d dᵀ (the congruence of the pseudo-inertia; Wensing, Kim and Slotine 2018). `d` is the old
 * reference point as seen from the new one; M a rotation or a reflection.
 */
export function placeAccount(account: Account, m: Mat3, d: AirframeTwice): Account {
  const numbers = toNumbers(account);
  const ten = numbers.map((value, i): Twice => [value, account.rest?.[i] ?? 0]);
  const at = (i: number): Twice => ten[i] ?? [NaN, NaN];
  const mass = at(0);
  const element = (i: Index, j: Index): Twice =>
    at(4 + ELEMENTS.findIndex(([p, q]) => (p === i && q === j) || (p === j && q === i)));
  const sumOf = (terms: readonly Twice[]): Twice => terms.reduce(addTwice, [0, 0]);
  const INDICES: readonly Index[] = [0, 1, 2];
  const along = (row: readonly number[], vector: readonly Twice[]): Twice =>
    sumOf(vector.map((part, k) => timesTwice([row[k] ?? NaN, 0], part)));
  const turned = m.map((row) => along(row, [at(1), at(2), at(3)]));
  const moved = (i: Index): Twice => addTwice(turned[i] ?? [NaN, NaN], timesTwice(mass, d[i]));
  const second = ([i, j]: readonly [Index, Index]): Twice => {
    const right = INDICES.map((k) =>
      along(
        m[j],
        INDICES.map((l) => element(k, l)),
      ),
    );
    return sumOf([
      along(m[i], right),
      timesTwice(turned[i] ?? [NaN, NaN], d[j]),
      timesTwice(d[i], turned[j] ?? [NaN, NaN]),
      timesTwice(timesTwice(mass, d[i]), d[j]),
    ]);
  };
  const placed = [mass, ...INDICES.map(moved), ...ELEMENTS.map(second)];
  const values = placed.map(([value]) => value);
  return fromNumbers(account.rest === undefined ? values : [...values, ...placed.map(([, rest]) => rest)]);
}

/**
 * What was summed in one frame issue, as it stands in another: every set of bodies is carried over as it lies in space. That goes
 * for mirror images too. A pair, or a half list, was mirrored across the plane of symmetry of the issue that its list is stated in,
 * because that plane is what its author meant; its image is a body like any other and is carried over with the rest. Where the newer
 * issue has its plane elsewhere on the aircraft, the pair is therefore not symmetric about that one.
 */
export class IssueConversion {
  readonly #d: AirframeTwice;
  readonly #linear: readonly (readonly number[])[];

  constructor(
    readonly change: IssueChange,
    readonly from: AirframeGeometry,
    readonly to: AirframeGeometry,
  ) {
    this.#d = changedPlaceFrom(to.reference, change, from.reference);
    const columns = Array.from({ length: ACCOUNT_LENGTH }, (_, j) =>
      toNumbers(
        placeAccount(
          fromNumbers(Array.from({ length: ACCOUNT_LENGTH }, (__, i) => (i === j ? 1 : 0))),
          change.matrix,
          this.#d,
        ),
      ),
    );
    this.#linear = Array.from({ length: ACCOUNT_LENGTH }, (_, i) =>
      columns.map((column) => column[i] ?? NaN),
    );
  }

  /** Both are the same issue, and nothing is converted. */
  get isSame(): boolean {
    return this.from === this.to;
  }

  /** A place from the datum, m. */
  place(place: AirframeVec): AirframeVec {
    return changedPlace(this.change, place);
  }

  /** What a list declares, its frame staying where it is on the aircraft: of rows that stand for no mirror image the same. */
  declarations(declared: ListDeclarations): ListDeclarations {
    const { axes, pose } = declared;
    return this.isSame
      ? declared
      : { ...declared, pose: carriedPose(axes, pose, this.change, this.from.axes, this.to.axes) };
  }

  /** From an account about the reference point of the one issue to that of the same bodies about the other's. */
  account(account: Account): Account {
    return placeAccount(account, this.change.matrix, this.#d);
  }

  /** The ten numbers are a linear map L of the former ten, so their covariance is L U Lᵀ. */
  uncertainty(uncertainty: AccountUncertainty): AccountUncertainty {
    const matrix = propagate(this.#linear, covarianceMatrix(uncertainty));
    return { ...uncertainty, covariance: matrix.flatMap((row, i) => row.slice(i)) };
  }

  subtotal<T extends Subtotal>(subtotal: T): T {
    return {
      ...subtotal,
      basic: this.account(subtotal.basic),
      statedPredicted: this.account(subtotal.statedPredicted),
      unstatedBasic: this.account(subtotal.unstatedBasic),
    };
  }

  uncertaintySubtotal<T extends UncertaintySubtotal>(subtotal: T): T {
    return {
      ...subtotal,
      basic: this.uncertainty(subtotal.basic),
      statedPredicted: this.uncertainty(subtotal.statedPredicted),
      unstatedBasic: this.uncertainty(subtotal.unstatedBasic),
    };
  }
}

/** Nothing is converted: both are the same issue. */
export function noConversion(geometry: AirframeGeometry): IssueConversion {
  return new IssueConversion(NO_CHANGE, geometry, geometry);
}
