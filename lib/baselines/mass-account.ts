import { type Moments } from '@/lib/frames/products';
import { type ConditionResult } from '@/lib/loading/configuration';
import { type Account, AccountSum, NOTHING, toNumbers } from '@/lib/mass/account';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassResult, resultOf } from '@/lib/mass/result';
import { accountOfItem } from '@/lib/mass/roll-up';

/** What can be accounted for: kg; CG in airframe components, m; moments and positive products about the CG in body axes, kg.m2. */
export const ACCOUNT_QUANTITIES = [
  'mass',
  'cgx',
  'cgy',
  'cgz',
  'ixx',
  'iyy',
  'izz',
  'ixy',
  'ixz',
  'iyz',
] as const;
export type AccountQuantity = (typeof ACCOUNT_QUANTITIES)[number];

/** The items on board of a condition stand last, as a group of their own that no list can have. */
export const ON_BOARD = '';

/** A step no greater than this share of the quantity is what rounding leaves, not a change. */
const ROUNDING = 1e-13;

export interface AccountSide {
  readonly geometry: AirframeGeometry;
  readonly condition: Pick<ConditionResult, 'items' | 'rollUp'>;
}

export interface AccountStep {
  /** A group path, or `ON_BOARD`. */
  readonly group: string;
  /** Whether there are paths below it, which make steps of their own `within` it. */
  readonly deeper: boolean;
  /** The quantity before this group is replaced, and after. */
  readonly from: number;
  readonly to: number;
}

export interface MassAccount {
  readonly before: number;
  readonly after: number;
  /** Each begins where the one before it ended; the first begins at `before`, the last ends at `after`. */
  readonly steps: readonly AccountStep[];
  /** Groups that do not change the quantity. */
  readonly unchanged: number;
}

/**
 * One side's quantity turned into the other's, a group at a time in the order of their paths: a step is the change when that
 * group's account before is replaced by its account after. Products of masses and arms make the steps of CG and tensor depend
 * on that order; their sum does not. Both ends are the stored results, so that what rounding leaves lies in the outermost steps.
 * `within` a group path the steps are those of the paths below it, and together make that group's own step.
 *
 * @throws RangeError when `accountRefusal` has something to say.
 */
export function massAccount(
  before: AccountSide,
  after: AccountSide,
  quantity: AccountQuantity,
  within: string | null = null,
): MassAccount {
  const refusal = accountRefusal(before, after, quantity);
  if (refusal !== null) throw new RangeError(refusal);
  const leaves = pairedLeaves(before, after);
  const levelAt = (index: number): number => {
    if (index === 0) return stored(before, quantity);
    if (index === leaves.length) return stored(after, quantity);
    return levelOf(leaves, index, after.geometry, quantity);
  };
  const branches = branchesOf(leaves, within);
  const steps = branches
    .filter(({ changed }) => changed)
    .map(({ group, deeper, first, end }) => ({ group, deeper, from: levelAt(first), to: levelAt(end) }))
    .filter(({ from, to }) => Math.abs(to - from) > ROUNDING * Math.max(Math.abs(from), Math.abs(to)));
  const ends = {
    before: levelAt(branches[0]?.first ?? 0),
    after: levelAt(branches.at(-1)?.end ?? leaves.length),
  };
  return {
    ...ends,
    steps: joinedUp(steps, ends),
    unchanged: branches.length - steps.length,
  };
}

/** Why an account cannot be drawn up, in a sentence; null when it can. Mass needs nothing but two masses. */
export function accountRefusal(
  before: AccountSide,
  after: AccountSide,
  quantity: AccountQuantity,
): string | null {
  if (quantity === 'mass') return null;
  if (!sameFrame(before.geometry, after.geometry))
    return 'The two stand on different frame issues, so that places and tensors of their groups cannot be put together. Choose the mass, or two baselines of one frame issue.';
  const leaves = pairedLeaves(before, after);
  for (let index = 0; index <= leaves.length; index += 1)
    if (!(massAt(leaves, index) > 0))
      return 'Somewhere between the two the mass is not above zero, and there is no CG to follow. Choose the mass.';
  return null;
}

interface Leaf {
  readonly group: string;
  readonly before: Account;
  readonly after: Account;
}

function pairedLeaves(before: AccountSide, after: AccountSide): Leaf[] {
  const accounts = ({ condition }: AccountSide): Map<string, Account> =>
    new Map(condition.rollUp.groups.map(({ group, basicAccount }) => [group, basicAccount]));
  const [old, now] = [accounts(before), accounts(after)];
  const paths = [...new Set([...old.keys(), ...now.keys()])].sort(byPath);
  return [
    ...paths.map((group) => ({
      group,
      before: old.get(group) ?? NOTHING,
      after: now.get(group) ?? NOTHING,
    })),
    { group: ON_BOARD, before: onBoard(before), after: onBoard(after) },
  ];
}

function onBoard({ condition, geometry }: AccountSide): Account {
  const sum = new AccountSum();
  for (const item of condition.items) sum.add(accountOfItem(item, geometry));
  return sum.account;
}

/** The quantity with the first `index` leaves as they are after, the rest as they were before. */
function levelOf(
  leaves: readonly Leaf[],
  index: number,
  geometry: AirframeGeometry,
  quantity: AccountQuantity,
): number {
  const sum = new AccountSum();
  leaves.forEach((leaf, at) => sum.add(at < index ? leaf.after : leaf.before));
  return read(resultOf(sum.account, geometry), quantity);
}

function massAt(leaves: readonly Leaf[], index: number): number {
  return leaves.reduce((sum, leaf, at) => sum + (at < index ? leaf.after : leaf.before).mass, 0);
}

const stored = ({ condition }: AccountSide, quantity: AccountQuantity): number =>
  read(condition.rollUp.basic, quantity);

const AXES: Readonly<Record<'cgx' | 'cgy' | 'cgz', 0 | 1 | 2>> = { cgx: 0, cgy: 1, cgz: 2 };

function read(result: MassResult, quantity: AccountQuantity): number {
  if (quantity === 'mass') return result.mass;
  const { properties } = result;
  if (properties === null) throw new RangeError('a mass of zero or less has no CG');
  if (quantity === 'cgx' || quantity === 'cgy' || quantity === 'cgz') return properties.cg[AXES[quantity]];
  return properties.inertia[quantity satisfies keyof Moments];
}

interface Branch {
  readonly group: string;
  readonly deeper: boolean;
  readonly changed: boolean;
  /** Its leaves: from `first` up to, not including, `end`. */
  readonly first: number;
  readonly end: number;
}

/** Leaves joined to the paths one level below `within`; neighbours in path order, so that a branch is a run of leaves. */
function branchesOf(leaves: readonly Leaf[], within: string | null): Branch[] {
  const depth = within === null ? 1 : within.split('/').length + 1;
  const branches: Branch[] = [];
  leaves.forEach((leaf, at) => {
    if (within !== null && leaf.group !== within && !leaf.group.startsWith(`${within}/`)) return;
    const group = leaf.group.split('/').slice(0, depth).join('/');
    const deeper = leaf.group !== group;
    const changed = toNumbers(leaf.before).some((number, i) => number !== toNumbers(leaf.after)[i]);
    const last = branches.at(-1);
    if (last?.group === group)
      branches[branches.length - 1] = {
        ...last,
        deeper: last.deeper || deeper,
        changed: last.changed || changed,
        end: at + 1,
      };
    else branches.push({ group, deeper, changed, first: at, end: at + 1 });
  });
  return branches;
}

/** Branches that did not change leave the level where it was, but for rounding: a step begins where the one before it ended. */
function joinedUp(
  steps: readonly AccountStep[],
  { before, after }: { readonly before: number; readonly after: number },
): AccountStep[] {
  return steps.map((step, at) => ({
    ...step,
    from: steps[at - 1]?.to ?? before,
    to: at === steps.length - 1 ? after : step.to,
  }));
}

function sameFrame(a: AirframeGeometry, b: AirframeGeometry): boolean {
  const frame = ({ axes, incidence, reference, lateralPlane }: AirframeGeometry): string =>
    JSON.stringify([axes, incidence, reference, lateralPlane]);
  return frame(a) === frame(b);
}

/** Paths compare level by level, so that `Wing/Spars` stands before `Wing tips`. */
function byPath(a: string, b: string): number {
  const [p, q] = [a.split('/'), b.split('/')];
  for (let level = 0; level < Math.min(p.length, q.length); level += 1) {
    const [left = '', right = ''] = [p[level], q[level]];
    if (left !== right) return left < right ? -1 : 1;
  }
  return p.length - q.length;
}
