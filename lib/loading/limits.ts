import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassResult } from '@/lib/mass/result';
import { groupBranches, type RollUp } from '@/lib/mass/roll-up';

export const LIMIT_KINDS = ['contract', 'specification', 'target', 'allocation'] as const;
export type LimitKind = (typeof LIMIT_KINDS)[number];

export const LIMIT_SENSES = ['at-least', 'at-most'] as const;
export type LimitSense = (typeof LIMIT_SENSES)[number];

/** kg; CG in % of the mean chord or in airframe components (m); moments and positive products about the CG in body axes (kg.m2). */
export const LIMIT_QUANTITIES = [
  'mass',
  'percentMac',
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
export type LimitQuantity = (typeof LIMIT_QUANTITIES)[number];

/** A limit or target as it is stated. Days are ISO dates. */
export interface Limit {
  readonly kind: LimitKind;
  readonly quantity: LimitQuantity;
  readonly sense: LimitSense;
  /** SI, or % of the mean chord. */
  readonly value: number;
  /** A group path, which takes in the groups below it; '' is the whole aircraft with the items on board. */
  readonly group: string;
  /** Code of the condition it is about; null is every condition. */
  readonly condition: string | null;
  /** Number of the frame issue whose axes and datum a limit of `cgx`, `cgy` or `cgz` is stated in. */
  readonly frameIssue: number | null;
  readonly source: string;
  readonly sourceDate: string;
  readonly from: string;
  readonly until: string | null;
}

export type Verdict =
  | 'within'
  /** Basic is within, predicted is not. */
  | 'predicted-beyond'
  | 'beyond'
  | 'not-judged'
  /** It is about a condition that the configuration does not have. */
  | 'no-condition';

/** How one condition stands to one limit, in the limit's own unit. */
export interface LimitStanding {
  readonly limit: Limit;
  readonly condition: { readonly code: string; readonly title: string };
  readonly basic: number | null;
  readonly predicted: number | null;
  /** Room to the limit: negative is beyond it. */
  readonly margin: { readonly basic: number | null; readonly predicted: number | null };
  readonly verdict: Verdict;
  /** Why it is not judged, in a sentence; null where it is. */
  readonly obstacle: string | null;
}

export interface JudgedCondition {
  readonly code: string;
  readonly title: string;
  readonly rollUp: RollUp;
}

/** What rounding of sums may move a figure by, as a share of it: no breach by less. */
const ROUNDING = 1e-12;

/** Whether a limit is in force on a day; both its days are among those in force. */
export function inForce({ from, until }: Pick<Limit, 'from' | 'until'>, day: string): boolean {
  return from <= day && (until === null || day <= until);
}

/** Every limit against every condition it is about, in the order of the limits. `frameIssue` is the number that the results stand on. */
export function limitStandings(
  limits: readonly Limit[],
  conditions: readonly JudgedCondition[],
  geometry: AirframeGeometry,
  frameIssue: number | null,
): LimitStanding[] {
  const branches = new Map(
    conditions.map(({ code, rollUp }) => [code, groupBranches(rollUp.groups, geometry)] as const),
  );
  return limits.flatMap((limit) => {
    const about = conditions.filter(({ code }) => limit.condition === null || limit.condition === code);
    if (about.length === 0 && limit.condition !== null) return [withoutCondition(limit, limit.condition)];
    return about.map(({ code, title, rollUp }) =>
      standing(
        limit,
        { code, title },
        limit.group === '' ? rollUp : branches.get(code)?.find(({ group }) => group === limit.group),
        frameIssue,
      ),
    );
  });
}

function unjudged(
  limit: Limit,
  condition: LimitStanding['condition'],
  verdict: 'not-judged' | 'no-condition',
  obstacle: string,
): LimitStanding {
  const margin = { basic: null, predicted: null };
  return { limit, condition, basic: null, predicted: null, margin, verdict, obstacle };
}

function withoutCondition(limit: Limit, code: string): LimitStanding {
  return unjudged(limit, { code, title: code }, 'no-condition', `There is no condition ${code} here.`);
}

function standing(
  limit: Limit,
  condition: LimitStanding['condition'],
  subject: Pick<RollUp, 'basic' | 'predicted'> | undefined,
  frameIssue: number | null,
): LimitStanding {
  const notJudged = (obstacle: string): LimitStanding => unjudged(limit, condition, 'not-judged', obstacle);
  if (limit.frameIssue !== null && limit.frameIssue !== frameIssue)
    return notJudged(
      `It is stated in the axes of frame issue ${limit.frameIssue}, and these results are in those of another.`,
    );
  if (subject === undefined) return notJudged(`No row of this condition is in the group ${limit.group}.`);
  const [basic, predicted] = [quantityOf(subject.basic, limit), quantityOf(subject.predicted, limit)];
  if (basic === null || predicted === null)
    return notJudged('There is no such figure: a mass of zero or less has no CG and no tensor.');
  const margin = { basic: roomTo(limit, basic), predicted: roomTo(limit, predicted) };
  return {
    limit,
    condition,
    basic,
    predicted,
    margin,
    verdict: isBeyond(limit, basic) ? 'beyond' : isBeyond(limit, predicted) ? 'predicted-beyond' : 'within',
    obstacle: null,
  };
}

function roomTo({ sense, value }: Limit, figure: number): number {
  return sense === 'at-most' ? value - figure : figure - value;
}

function isBeyond(limit: Limit, figure: number): boolean {
  return roomTo(limit, figure) < -ROUNDING * Math.max(Math.abs(limit.value), Math.abs(figure));
}

const CG = { cgx: 0, cgy: 1, cgz: 2 } as const;

function quantityOf({ mass, properties }: MassResult, { quantity }: Limit): number | null {
  if (quantity === 'mass') return mass;
  if (properties === null) return null;
  if (quantity === 'percentMac') return properties.percentMac;
  if (quantity === 'cgx' || quantity === 'cgy' || quantity === 'cgz') return properties.cg[CG[quantity]];
  return properties.inertia[quantity];
}

/** The tightest pair of limits of a quantity of the whole aircraft in a condition; null where that side has none. */
export function tightest(
  limits: readonly Limit[],
  quantity: LimitQuantity,
  condition: string | null,
): { readonly least: Limit | null; readonly most: Limit | null } {
  const about = limits.filter(
    (limit) =>
      limit.quantity === quantity &&
      limit.group === '' &&
      (limit.condition === null || limit.condition === condition),
  );
  const side = (sense: LimitSense, tighter: (a: number, b: number) => boolean): Limit | null =>
    about
      .filter((limit) => limit.sense === sense)
      .reduce<Limit | null>(
        (best, one) => (best === null || tighter(one.value, best.value) ? one : best),
        null,
      );
  return { least: side('at-least', (a, b) => a > b), most: side('at-most', (a, b) => a < b) };
}
