import { type Finding, type PlacedFinding, ROWS_NAMED } from '@/lib/findings/finding';
import { unknownGroup } from '@/lib/findings/rows/groups';
import { type GroupBreakdown } from '@/lib/groups/breakdown';
import { type Subtotal } from '@/lib/mass/subtotals';
import { type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';

/** A stored subtotal under the path that its group has today. What is stored is never rewritten. */
export function inPresentGroup<T extends Subtotal & { readonly uncertainty: UncertaintySubtotal }>(
  part: T,
  groups: GroupBreakdown,
): T {
  const group = groups.present(part.group);
  return group === part.group ? part : { ...part, group, uncertainty: { ...part.uncertainty, group } };
}

/** What a list's own check said of unknown groups rests on the breakdown of its day; `unknownGroups` says it anew. */
export function withoutUnknownGroups(findings: readonly Finding[]): Finding[] {
  return findings.filter(({ rule }) => rule !== unknownGroup.id);
}

interface Pin {
  readonly revision_id: string;
  readonly list_code: string;
  readonly number: number;
}

/** For each list, the groups that the breakdown of today lacks, as the rows have them; told by group, for no row is read. */
export function unknownGroups(
  subtotals: readonly (Pick<Subtotal, 'group' | 'rows'> & { readonly revisionId: string })[],
  pins: readonly Pin[],
  groups: GroupBreakdown,
): PlacedFinding[] {
  return pins.flatMap((pin): PlacedFinding[] => {
    const rows = new Map<string, number>();
    for (const part of subtotals)
      if (part.revisionId === pin.revision_id && part.rows > 0 && groups.isUnknown(part.group))
        rows.set(part.group, (rows.get(part.group) ?? 0) + part.rows);
    const [first] = rows.keys();
    if (first === undefined) return [];
    const names = [...rows.keys()];
    const count = [...rows.values()].reduce((sum, one) => sum + one, 0);
    return [
      {
        rule: unknownGroup.id,
        severity: unknownGroup.severity,
        message: `${count === 1 ? '1 row is' : `${count} rows are`} in ${
          names.length === 1 ? 'a group' : `${names.length} groups`
        } that the breakdown does not have: ${named(names)}.`,
        rows: names.slice(0, ROWS_NAMED),
        count: names.length,
        where: { kind: 'list', code: pin.list_code, revision: pin.number },
      },
    ];
  });
}

function named(names: readonly string[]): string {
  const more = names.length - 5;
  return `${names.slice(0, 5).join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
}
