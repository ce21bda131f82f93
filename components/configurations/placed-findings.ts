import { type FindingLine } from '@/components/findings/finding-lines';
import { viewsAsked, viewsHref } from '@/components/three-views/views-address';
import { LIMIT_RULES } from '@/lib/findings/limits/rules';
import { unknownGroup } from '@/lib/findings/rows/groups';
import { type PlacedFinding } from '@/lib/findings/finding';
import { bySeverity } from '@/lib/findings/look';

/** Findings of a roll-up, blockers first, each with where it was seen and the way to its rows. */
export function placedFindings(
  findings: readonly PlacedFinding[],
  program: string,
  conditions: readonly { readonly code: string; readonly title: string }[],
  configuration: string,
): FindingLine[] {
  return [...findings].sort(bySeverity).map((finding) => ({
    ...finding,
    seen: seenAt(finding.where, conditions),
    href: rowsHref(finding, program),
    groups: groupLinks(finding, program, configuration),
  }));
}

const LIMITS: readonly string[] = Object.values(LIMIT_RULES).map(({ id }) => id);

/** Findings that name groups instead of rows lead to the rows of each group. */
function groupLinks({ rule, rows, where }: PlacedFinding, program: string, configuration: string) {
  const home = `/programs/${program}`;
  if (where.kind === 'condition' && LIMITS.includes(rule)) {
    const views = `${home}/configurations/${configuration}/views`;
    return (rows.length === 0 ? [''] : rows).map((group) => ({
      words: group === '' ? 'Components of this condition' : `Components of ${group}`,
      href: viewsHref(views, viewsAsked({ condition: where.code, within: group })),
    }));
  }
  if (where.kind !== 'list' || rule !== unknownGroup.id) return null;
  return rows.map((group) => {
    const query = new URLSearchParams({ revision: String(where.revision), group });
    return { words: group, href: `${home}/lists/${where.code}?${query.toString()}#rows` };
  });
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
