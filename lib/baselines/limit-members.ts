import { siUnit } from '@/lib/loading/limit-words';
import { type Limit, type LimitStanding } from '@/lib/loading/limits';

/**
 * The limits and targets that were in force, each with how every condition stands to it. `value` and the figures are in `unit`;
 * a margin is the room to the limit, negative beyond it. A limit of the whole aircraft has no `group`, one of every condition no
 * `condition`; a figure that could not be judged is absent and `obstacle` says why.
 */
export function limitMembers(standings: readonly LimitStanding[]) {
  const limits = [...new Set(standings.map(({ limit }) => limit))];
  return limits.map((limit) => ({
    kind: limit.kind,
    quantity: limit.quantity,
    sense: limit.sense,
    value: limit.value,
    unit: siUnit(limit.quantity),
    ...(limit.group === '' ? {} : { group: limit.group }),
    ...(limit.condition === null ? {} : { condition: limit.condition }),
    ...(limit.frameIssue === null ? {} : { frameIssue: limit.frameIssue }),
    source: limit.source,
    sourceDate: limit.sourceDate,
    from: limit.from,
    ...(limit.until === null ? {} : { until: limit.until }),
    standings: standings
      .filter((one) => one.limit === limit)
      .map(({ condition, basic, predicted, margin, verdict, obstacle }) => ({
        condition: condition.code,
        verdict,
        ...(basic === null || margin.basic === null ? {} : { basic, margin: margin.basic }),
        ...(predicted === null || margin.predicted === null
          ? {}
          : { predicted, predictedMargin: margin.predicted }),
        ...(obstacle === null ? {} : { obstacle }),
      })),
  }));
}

export type LimitMember = ReturnType<typeof limitMembers>[number];

/** The standings that a signed document states, with its very figures. `titles` are of its conditions. */
export function standingsOfMembers(
  members: readonly LimitMember[],
  titles: ReadonlyMap<string, string>,
): LimitStanding[] {
  return members.flatMap((member) => {
    const limit: Limit = {
      kind: member.kind,
      quantity: member.quantity,
      sense: member.sense,
      value: member.value,
      group: member.group ?? '',
      condition: member.condition ?? null,
      frameIssue: member.frameIssue ?? null,
      source: member.source,
      sourceDate: member.sourceDate,
      from: member.from,
      until: member.until ?? null,
    };
    return member.standings.map((standing) => ({
      limit,
      condition: { code: standing.condition, title: titles.get(standing.condition) ?? standing.condition },
      basic: standing.basic ?? null,
      predicted: standing.predicted ?? null,
      margin: { basic: standing.margin ?? null, predicted: standing.predictedMargin ?? null },
      verdict: standing.verdict,
      obstacle: standing.obstacle ?? null,
    }));
  });
}

/** The standings of a signed document; null for one of before limits were kept. One that was signed under no limit has none either. */
export function keptStandings(document: {
  readonly limits?: readonly LimitMember[];
  readonly conditions: readonly { readonly code: string; readonly title: string }[];
}): LimitStanding[] | null {
  if (document.limits === undefined) return null;
  return standingsOfMembers(
    document.limits,
    new Map(document.conditions.map(({ code, title }) => [code, title])),
  );
}
