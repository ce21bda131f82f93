import { type PlacedFinding } from '@/lib/findings/finding';

/** Names a finding within one submission: the rule, and the place where it was seen. */
export function findingKey({ rule, where }: PlacedFinding): string {
  return [where.kind, where.code, rule].join(':');
}
