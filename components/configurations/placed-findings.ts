import { type FindingLine } from '@/components/findings/finding-lines';
import { viewsAsked, viewsHref } from '@/components/three-views/views-address';
import { LIMIT_RULES } from '@/lib/findings/limits/rules';
import { REMOVAL_RULES } from '@/lib/findings/removals/rules';
import { unknownGroup } from '@/lib/findings/rows/groups';
import { groupWithoutMass } from '@/lib/findings/whole/mass';
import { impossibleGroup } from '@/lib/findings/whole/tensor';
import { type PlacedFinding } from '@/lib/findings/finding';

/** Findings of a roll-up, each with where it was seen and the way to its rows; without a configuration to look into, none to groups of a condition. */
export function placedFindings(
  findings: readonly PlacedFinding[],
  program: string,
  conditions: readonly { readonly code: string; readonly title: string }[],
  configuration: string | null,
): FindingLine[] {
  return findings.map((finding) => ({
    ...finding,
    seen: seenAt(finding.where, conditions),
    href: rowsHref(finding, program),
    groups: groupLinks(finding, program, configuration),
  }));
}

const LIMITS: readonly string[] = Object.values(LIMIT_RULES).map(({ id }) => id);
const ON_GROUPS: readonly string[] = [...LIMITS, impossibleGroup.id, groupWithoutMass.id];
const REMOVALS: readonly string[] = REMOVAL_RULES.map(({ id }) => id);

/**
 * Findings that name groups instead of rows lead to the rows of each group. Those on removals are of a configuration and not kept with
 * the list, which cannot show their rows by the finding: they lead to each removal.
 */
function groupLinks({ rule, rows, where }: PlacedFinding, program: string, configuration: string | null) {
  const home = `/programs/${program}`;
  if (where.kind === 'condition' && ON_GROUPS.includes(rule)) {
    if (configuration === null) return null;
    const views = `${home}/configurations/${configuration}/views`;
    return (rows.length === 0 ? [''] : rows).map((group) => ({
      words: group === '' ? 'Components of this condition' : `Components of ${group}`,
      href: viewsHref(views, viewsAsked({ condition: where.code, within: group })),
    }));
  }
  if (where.kind === 'list' && REMOVALS.includes(rule))
    return rows.map((item) => {
      const query = new URLSearchParams({ revision: String(where.revision), find: item, row: item });
      return { words: item, href: `${home}/lists/${where.code}?${query.toString()}#rows` };
    });
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

/** The page with the rows of a finding; null where it names none. */
export function rowsHref(
  { rule, where }: Pick<PlacedFinding, 'rule' | 'where'>,
  program: string,
): string | null {
  if (where.kind === 'condition') return null;
  if (where.kind === 'rotors') return `/programs/${program}/rotating-parts?revision=${where.revision}`;
  const query = new URLSearchParams({ revision: String(where.revision), finding: rule });
  return `/programs/${program}/lists/${where.code}?${query.toString()}#rows`;
}
