import { type Moments } from '@/lib/frames/products';
import { type ComparableResult } from '@/lib/loading/result-in-issue';
import { principalInclination } from '@/lib/mass/inclination';
import { type MassResult } from '@/lib/mass/result';
import { type GroupTotal } from '@/lib/mass/roll-up';

/** A number before and after; null where one side does not have it. */
export interface Change {
  readonly before: number | null;
  readonly after: number | null;
  readonly delta: number | null;
}

export interface ConditionChange {
  readonly code: string;
  readonly title: string;
  /** kg */
  readonly mass: Change;
  readonly predictedMass: Change;
  /** Airframe components, m. */
  readonly cg: { readonly x: Change; readonly y: Change; readonly z: Change };
  readonly percentMac: Change;
  /** About the CG in body axes, products as positive integrals, kg.m2. */
  readonly inertia: Readonly<Record<keyof Moments, Change>>;
  /** rad, nose-up positive. */
  readonly inclination: Change;
  readonly groups: readonly GroupChange[];
}

export interface GroupChange {
  readonly group: string;
  readonly mass: Change;
}

export interface PointChange {
  readonly code: string;
  readonly title: string;
  /** Body axes, kg.m2/s. */
  readonly h: { readonly x: Change; readonly y: Change; readonly z: Change };
}

export interface Comparison {
  readonly conditions: readonly ConditionChange[];
  readonly operatingPoints: readonly PointChange[];
}

type ConditionResult = ComparableResult['conditions'][number];

/**
 * What changed from one configuration's results to another's, condition by condition and point by point, by their codes. Both stand in
 * one frame issue.
 */
export function compareResults(before: ComparableResult | null, after: ComparableResult): Comparison {
  return {
    conditions: joined(before?.conditions ?? [], after.conditions).map(([a, b]) => conditionChange(a, b)),
    operatingPoints: joined(before?.operatingPoints ?? [], after.operatingPoints).map(([a, b]) => {
      const [ha, hb] = [a?.momentum.total, b?.momentum.total];
      return {
        code: (b ?? a)?.code ?? '',
        title: (b ?? a)?.title ?? '',
        h: { x: change(ha?.[0], hb?.[0]), y: change(ha?.[1], hb?.[1]), z: change(ha?.[2], hb?.[2]) },
      };
    }),
  };
}

function conditionChange(a: ConditionResult | undefined, b: ConditionResult | undefined): ConditionChange {
  const of = (read: (result: MassResult) => number | null | undefined): Change =>
    change(a && read(a.rollUp.basic), b && read(b.rollUp.basic));
  const inertia = (name: keyof Moments): Change => of((result) => result.properties?.inertia[name]);
  const cg = (axis: 0 | 1 | 2): Change => of((result) => result.properties?.cg[axis]);
  return {
    code: (b ?? a)?.code ?? '',
    title: (b ?? a)?.title ?? '',
    mass: of((result) => result.mass),
    predictedMass: change(a?.rollUp.predicted.mass, b?.rollUp.predicted.mass),
    cg: { x: cg(0), y: cg(1), z: cg(2) },
    percentMac: of((result) => result.properties?.percentMac),
    inertia: {
      ixx: inertia('ixx'),
      iyy: inertia('iyy'),
      izz: inertia('izz'),
      ixy: inertia('ixy'),
      ixz: inertia('ixz'),
      iyz: inertia('iyz'),
    },
    inclination: of((result) => result.properties && principalInclination(result.properties.principal)),
    groups: groupChanges(a?.rollUp.groups ?? [], b?.rollUp.groups ?? []),
  };
}

/** Every group of either side whose mass is not the same, the largest change first. */
export function groupChanges(before: readonly GroupTotal[], after: readonly GroupTotal[]): GroupChange[] {
  const names = [...new Set([...before, ...after].map((total) => total.group))];
  const massIn = (totals: readonly GroupTotal[], name: string): number | undefined =>
    totals.find((total) => total.group === name)?.basic.mass;
  return names
    .map((group) => ({ group, mass: change(massIn(before, group), massIn(after, group)) }))
    .filter(({ mass }) => mass.before !== mass.after)
    .sort((p, q) => Math.abs(size(q.mass)) - Math.abs(size(p.mass)));
}

const size = ({ before, after }: Change): number => (after ?? 0) - (before ?? 0);

function change(before: number | null | undefined, after: number | null | undefined): Change {
  const [from, to] = [before ?? null, after ?? null];
  return { before: from, after: to, delta: from === null || to === null ? null : to - from };
}

/** Pairs two lists by code: the later one's order, then what only the former had. */
function joined<T extends { readonly code: string }>(
  before: readonly T[],
  after: readonly T[],
): (readonly [T | undefined, T | undefined])[] {
  const gone = before.filter((one) => !after.some((other) => other.code === one.code));
  return [
    ...after.map((one) => [before.find((other) => other.code === one.code), one] as const),
    ...gone.map((one) => [one, undefined] as const),
  ];
}
