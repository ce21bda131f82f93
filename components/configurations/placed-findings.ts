import { type FindingLine } from '@/components/findings/finding-lines';
import { type PlacedFinding } from '@/lib/findings/finding';
import { bySeverity } from '@/lib/findings/look';

/** Findings of a roll-up, blockers first, each with where it was seen and the way to its rows. */
export function placedFindings(
  findings: readonly PlacedFinding[],
  program: string,
  conditions: readonly { readonly code: string; readonly title: string }[],
): FindingLine[] {
  return [...findings].sort(bySeverity).map((finding) => ({
    ...finding,
    seen: seenAt(finding.where, conditions),
    href: rowsHref(finding, program),
  }));
}

function seenAt(
  { kind, code, revision }: PlacedFinding['where'],
  conditions: readonly { readonly code: string; readonly title: string }[],
): string {
  if (kind === 'condition') return conditions.find((one) => one.code === code)?.title ?? code;
  return kind === 'list' ? `List ${code}, revision ${revision}` : `Rotating parts, revision ${revision}`;
}

function rowsHref({ rule, where }: PlacedFinding, program: string): string | null {
  if (where.kind === 'condition') return null;
  if (where.kind === 'rotors') return `/programs/${program}/rotating-parts?revision=${where.revision}`;
  const query = new URLSearchParams({ revision: String(where.revision), finding: rule });
  return `/programs/${program}/lists/${where.code}?${query.toString()}#rows`;
}
