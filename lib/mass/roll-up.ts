import { type Moments, NO_MOMENTS, tensorOf } from '@/lib/frames/products';
import { type AirframeVec, type In } from '@/lib/frames/tags';
import { CompensatedSum } from '@/lib/numerics/sums';
import { halfTraceMinus } from '@/lib/numerics/sym3';
import { subVec } from '@/lib/numerics/vec3';

import { type Account, AccountSum, accountOfBody } from './account';
import { allowanceFor, type GroupAllowance, pathsUp } from './allowances';
import { CATEGORIES, type Category, type ChangeStatus, MATURITIES, type Maturity } from './component';
import { type AirframeGeometry } from './geometry';
import { type MassResult, resultOf } from './result';
import { type Subtotal } from './subtotals';

/** The program's mass growth allowance per maturity, a fraction of mass, for rows that state none; `groups` states others. */
export type GrowthAllowances = Readonly<Record<Maturity, number>> & {
  readonly groups?: readonly GroupAllowance[];
};

export const NO_GROWTH: GrowthAllowances = { E: 0, C: 0, A: 0 };

/** A named item of a condition: mass (kg), place from the datum and own moments (kg.m2) in airframe components. It does not grow. */
export interface OnBoardItem {
  readonly name: string;
  readonly mass: number;
  readonly position: AirframeVec;
  readonly moments?: In<'airframe', Moments>;
}

export interface RollUpOptions {
  /** Which adjustments count; approved ones only unless said otherwise. */
  readonly statuses?: readonly ChangeStatus[];
  /** Which categories count; all unless said otherwise. */
  readonly categories?: readonly Category[];
}

/** Basic mass, kg, by the maturity that rows state. */
export type MassByMaturity = Readonly<Record<Maturity | 'none', number>>;

/** The rows of one group path, without those of the paths below it. */
export interface GroupTotal {
  readonly group: string;
  readonly rows: number;
  readonly pieces: number;
  readonly memoRows: number;
  readonly basic: MassResult;
  readonly predicted: MassResult;
  readonly basicAccount: Account;
  readonly predictedAccount: Account;
  /** Absent in results that were stored before it was kept. */
  readonly byMaturity?: MassByMaturity;
}

export interface RollUp {
  readonly rows: number;
  readonly pieces: number;
  readonly memoRows: number;
  /** Mass, kg, of rows that state no growth and have no maturity, or one without an allowance: predicted as basic. */
  readonly ungrownMass: number;
  /** Lists and items on board, without growth. */
  readonly basic: MassResult;
  /** The same with growth. */
  readonly predicted: MassResult;
  /** The accounts behind these two. */
  readonly basicAccount: Account;
  readonly predictedAccount: Account;
  /** In the order of their paths. */
  readonly groups: readonly GroupTotal[];
  /** The items on board alone; mass 0 without any. */
  readonly onBoard: MassResult;
  /** Of the lists, without the items on board. Absent in results that were stored before it was kept. */
  readonly byMaturity?: MassByMaturity;
}

/** Running counts and sums of whatever is added up: a group, a branch of groups, the whole. */
class Tally {
  rows = 0;
  pieces = 0;
  memoRows = 0;
  readonly basic = new AccountSum();
  readonly predicted = new AccountSum();
  readonly maturity = new MaturitySum();

  count(part: Pick<Subtotal, 'rows' | 'pieces' | 'memoRows'>): void {
    this.rows += part.rows;
    this.pieces += part.pieces;
    this.memoRows += part.memoRows;
  }

  addTally(other: Tally): void {
    this.count(other);
    for (const maturity of [...MATURITIES, 'none'] as const)
      this.maturity.add(maturity, other.maturity.masses[maturity]);
    this.basic.add(other.basic.account);
    this.predicted.add(other.predicted.account);
  }

  total(geometry: AirframeGeometry): Omit<GroupTotal, 'group'> {
    const [basicAccount, predictedAccount] = [this.basic.account, this.predicted.account];
    return {
      rows: this.rows,
      pieces: this.pieces,
      memoRows: this.memoRows,
      basic: resultOf(basicAccount, geometry),
      predicted: resultOf(predictedAccount, geometry),
      basicAccount,
      predictedAccount,
      byMaturity: this.maturity.masses,
    };
  }
}

/** Mass by maturity, added up without loss. */
class MaturitySum {
  readonly #sums = {
    E: new CompensatedSum(),
    C: new CompensatedSum(),
    A: new CompensatedSum(),
    none: new CompensatedSum(),
  };

  add(maturity: Maturity | 'none', mass: number): void {
    this.#sums[maturity].add(mass);
  }

  get masses(): MassByMaturity {
    const { E, C, A, none } = this.#sums;
    return { E: E.value, C: C.value, A: A.value, none: none.value };
  }
}

function tallyOf(tallies: Map<string, Tally>, group: string): Tally {
  const tally = tallies.get(group) ?? new Tally();
  tallies.set(group, tally);
  return tally;
}

/** Paths compare level by level, so that `Wing/Spars` stands before `Wing tips`. */
function byPath(a: GroupTotal, b: GroupTotal): number {
  const [p, q] = [a.group.split('/'), b.group.split('/')];
  for (let level = 0; level < Math.min(p.length, q.length); level += 1) {
    const [left = '', right = ''] = [p[level], q[level]];
    if (left !== right) return left < right ? -1 : 1;
  }
  return p.length - q.length;
}

/** The account, about r0, of an item on board. */
export function accountOfItem(item: OnBoardItem, geometry: AirframeGeometry): Account {
  const own = halfTraceMinus(tensorOf(item.moments ?? NO_MOMENTS));
  return accountOfBody(item.mass, subVec(item.position, geometry.reference), own);
}

/**
 * Adds up the subtotals of any number of lists and the items on board. All subtotals must have been kept about the reference
 * point of this same geometry.
 */
export function rollUp(
  subtotals: Iterable<Subtotal>,
  items: Iterable<OnBoardItem>,
  geometry: AirframeGeometry,
  allowances: GrowthAllowances,
  options: RollUpOptions = {},
): RollUp {
  const { statuses = ['approved'], categories = CATEGORIES } = options;
  const whole = new Tally();
  const groups = new Map<string, Tally>();
  const ungrown = new CompensatedSum();
  for (const part of subtotals) {
    if (!statuses.includes(part.status) || !categories.includes(part.category)) continue;
    const allowance = allowanceFor(allowances, part.group, part.maturity).fraction;
    if (allowance === 0) ungrown.add(part.unstatedBasic.mass);
    const tally = tallyOf(groups, part.group);
    tally.count(part);
    tally.maturity.add(part.maturity ?? 'none', part.basic.mass);
    tally.basic.add(part.basic);
    tally.predicted.add(part.statedPredicted);
    tally.predicted.add(part.unstatedBasic, 1 + allowance);
  }
  // The accounts of the groups hold twice the digits, so that adding them loses nothing against adding every part.
  for (const tally of groups.values()) whole.addTally(tally);
  const onBoard = new AccountSum();
  for (const item of items) onBoard.add(accountOfItem(item, geometry));
  whole.basic.add(onBoard.account);
  whole.predicted.add(onBoard.account);
  return {
    ...whole.total(geometry),
    ungrownMass: ungrown.value,
    groups: [...groups].map(([group, tally]) => ({ group, ...tally.total(geometry) })).sort(byPath),
    onBoard: resultOf(onBoard.account, geometry),
  };
}

/** Every group path and every path above one, each with all that is below it: `Wing` holds `Wing/Spars` and `Wing/Ribs`. */
export function groupBranches(groups: readonly GroupTotal[], geometry: AirframeGeometry): GroupTotal[] {
  return joinedTotals(groups, geometry, pathsUp);
}

/** The same groups by other names; those that come to have one name are one. */
export function renamedGroups(
  groups: readonly GroupTotal[],
  geometry: AirframeGeometry,
  nameOf: (group: string) => string,
): GroupTotal[] {
  return joinedTotals(groups, geometry, (group) => [nameOf(group)]);
}

function joinedTotals(
  groups: readonly GroupTotal[],
  geometry: AirframeGeometry,
  namesOf: (group: string) => readonly string[],
): GroupTotal[] {
  const joined = new Map<string, Tally>();
  const known = groups.every(({ byMaturity }) => byMaturity !== undefined);
  for (const part of groups) {
    for (const name of namesOf(part.group)) {
      const tally = tallyOf(joined, name);
      tally.count(part);
      for (const code of [...MATURITIES, 'none'] as const)
        tally.maturity.add(code, part.byMaturity?.[code] ?? 0);
      tally.basic.add(part.basicAccount);
      tally.predicted.add(part.predictedAccount);
    }
  }
  return [...joined]
    .map(([group, tally]) => ({ group, ...tally.total(geometry) }))
    .map(({ byMaturity, ...total }) => (known && byMaturity ? { ...total, byMaturity } : total))
    .sort(byPath);
}
