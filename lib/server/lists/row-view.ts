import { type RowFilter, type RowOrder } from '@/db/queries/list-rows';
import { type ListRow } from '@/lib/contracts/list-rows';
import { type ListView } from '@/lib/contracts/list-view';
import { massListWriter } from '@/lib/export/mass-list';
import { type Finding } from '@/lib/findings/finding';
import { type GroupReading } from '@/lib/groups/breakdown';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { componentOf, type StoredRow } from './row-codec';

/** What a view asks of the database. A finding that the revision has not leaves no row in. */
export function filterOf(
  view: ListView,
  findings: readonly Finding[],
  groups: Pick<GroupReading, 'statedIn'>,
): RowFilter {
  return {
    text: view.find,
    groups: view.group === '' ? null : groups.statedIn(view.group),
    only: view.where === '' ? null : { column: view.where, value: view.is },
    category: view.category === '' ? null : view.category,
    counting: view.counting === '' ? null : view.counting,
    items: view.finding === '' ? null : (findings.find(({ rule }) => rule === view.finding)?.rows ?? []),
  };
}

const PRODUCTS: readonly string[] = ['ixy', 'ixz', 'iyz'];

/** Rows are ordered by what they show: where a list states its products with the other sign, their order turns round. */
export function orderOf({ sort }: ListView, declarations: ListDeclarations): RowOrder {
  const turned = declarations.products === 'negative' && PRODUCTS.includes(sort.column);
  return { column: sort.column, descending: sort.descending !== turned };
}

const AS_STATED: Pick<GroupReading, 'present'> = { present: (path) => path };

/** Stored rows as their list states them; given `groups`, each in the group that its path is today. */
export function rowReader(
  declarations: ListDeclarations,
  groups: Pick<GroupReading, 'present'> = AS_STATED,
): (row: StoredRow) => ListRow {
  const writer = massListWriter(declarations, []);
  return (row) => {
    const stored = componentOf(row);
    const component = { ...stored, group: groups.present(stored.group) };
    const cells = writer.cells(component);
    const stated: Partial<Record<ListColumn, string | number>> = {};
    for (const column of writer.columns) {
      const value = cells[column];
      if (value !== null) stated[column] = value;
    }
    return { cells: stated, own: { ...component.extra } };
  };
}
