import { type Db } from '@/db/client';
import { changedItems, type ChangeCounts, countChanges, type RowChangeKind } from '@/db/queries/list-changes';
import { rowsByItem } from '@/db/queries/list-rows';
import { type ListRevision } from '@/db/queries/lists';
import { type ListCells, massListWriter } from '@/lib/export/mass-list';
import { componentOf, type StoredRow } from './row-codec';

export interface FieldChange {
  readonly column: string;
  readonly before: string | number | null;
  readonly after: string | number | null;
}

export interface RowChange {
  readonly item: string;
  readonly kind: RowChangeKind;
  /** Of a changed row the fields that differ; of an added or removed one all that it states. */
  readonly fields: readonly FieldChange[];
}

export interface Comparison {
  readonly counts: ChangeCounts;
  readonly rows: readonly RowChange[];
}

/**
 * What changed from one revision of a list to a later one, by row and field, figures in the later one's units and signs. Without a
 * revision on one side (its id null) every row of the other is new or gone.
 */
export async function compareRevisions(
  db: Db,
  before: { readonly id: string | null },
  after: Pick<ListRevision, 'declarations'> & { readonly id: string | null },
  page: { readonly offset: number; readonly limit: number; readonly group?: string | null },
): Promise<Comparison> {
  const [counts, items] = await Promise.all([
    countChanges(db, before.id, after.id, page.group ?? null),
    changedItems(db, before.id, after.id, page),
  ]);
  const names = items.map(({ item }) => item);
  const [old, now] = await Promise.all(
    [before.id, after.id].map((id) => (id === null ? [] : rowsByItem(db, id, names))),
  );
  const stated = statedBy(after);
  const [oldOf, nowOf] = [byItem(old ?? [], stated), byItem(now ?? [], stated)];
  return {
    counts,
    rows: items.map(({ item, kind }) => ({
      item,
      kind,
      fields: fieldChanges(oldOf.get(item), nowOf.get(item)),
    })),
  };
}

type Stated = Readonly<Record<string, string | number | null>>;

function statedBy({ declarations }: Pick<ListRevision, 'declarations'>): (row: StoredRow) => Stated {
  const writer = massListWriter(declarations, []);
  return (row) => {
    const component = componentOf(row);
    const cells: ListCells = writer.cells(component);
    return {
      ...Object.fromEntries(writer.columns.map((column) => [column, cells[column]])),
      ...component.extra,
    };
  };
}

function byItem(rows: readonly StoredRow[], stated: (row: StoredRow) => Stated): Map<string, Stated> {
  return new Map(rows.map((row) => [row.item, stated(row)]));
}

function fieldChanges(before: Stated = {}, after: Stated = {}): FieldChange[] {
  const columns = [...new Set([...Object.keys(after), ...Object.keys(before)])];
  return columns.flatMap((column) => {
    const [old, now] = [before[column] ?? null, after[column] ?? null];
    return old === now ? [] : [{ column, before: old, after: now }];
  });
}
