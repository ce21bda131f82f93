import { type Db } from '@/db/client';
import { childrenOf, rowsByItem } from '@/db/queries/list-rows';
import { type ListRevision } from '@/db/queries/lists';
import { type EditProblem, itemOfEdit, type RowEdit } from '@/lib/contracts/list-edits';
import { type ListRow } from '@/lib/contracts/list-rows';
import { revisionGroups } from './revision-groups';
import { rowReader } from './row-view';

/** So many names are given in a sentence; the rest are counted. */
const NAMES_GIVEN = 5;

/**
 * What is wrong with a set of edits as a set: rows that are not there, or there already, rows edited twice, the item of a row
 * changed, assemblies removed from above their parts. What the rows hold is checked as in a file.
 */
export async function checkEdits(
  db: Db,
  revision: Pick<ListRevision, 'id' | 'number' | 'declarations'>,
  edits: readonly RowEdit[],
): Promise<EditProblem[]> {
  const items = edits.map(itemOfEdit);
  const stored = await rowsByItem(db, revision.id, [...new Set(items)]);
  const read = rowReader(revision.declarations, await revisionGroups(db, revision.id));
  const there = new Map(stored.map((row) => [row.item, read(row)]));
  const problems: EditProblem[] = [];
  const seen = new Set<string>();
  const say = (item: string | null, column: string | null, message: string): void => {
    problems.push({ item, column, found: item, message });
  };
  for (const [index, edit] of edits.entries()) {
    const item = items[index] ?? '';
    if (item === '') say(null, 'item', 'An added row has no item. Every row needs one.');
    else if (seen.has(item)) say(item, 'item', `The row \`${item}\` is edited twice. Undo one of the edits.`);
    else if (edit.kind === 'add' && there.has(item))
      say(
        item,
        'item',
        `Revision ${revision.number} has a row \`${item}\` already. Edit that row, or choose another item.`,
      );
    else if (edit.kind !== 'add' && !there.has(item))
      say(item, 'item', `Revision ${revision.number} has no row \`${item}\`. Undo this edit.`);
    else if (edit.kind === 'change' && (edit.fields['item'] ?? item) !== item)
      say(
        item,
        'item',
        'The item is what a row is known by and stays. Remove the row and add one with the new item.',
      );
    else if (edit.kind === 'change') problems.push(...overtaken(edit, there.get(item), revision.number));
    if (item !== '') seen.add(item);
  }
  return [...problems, ...(await orphans(db, revision.id, edits))];
}

/** Fields that no longer hold what the person saw who edited them. */
function overtaken(
  edit: Extract<RowEdit, { kind: 'change' }>,
  row: ListRow | undefined,
  revision: number,
): EditProblem[] {
  const cells: Readonly<Record<string, string | number>> = { ...row?.own, ...row?.cells };
  return Object.entries(edit.seen ?? {}).flatMap(([column, was]) => {
    const now = String(cells[column] ?? '');
    if (now === was) return [];
    const message =
      `${column} was ${was === '' ? 'blank' : `\`${was}\``} when you edited it; in revision ${revision} it is ` +
      `${now === '' ? 'blank' : `\`${now}\``}. Undo the edit, look at the row, and make it again.`;
    return [{ item: edit.item, column, found: now, message }];
  });
}

async function orphans(db: Db, revisionId: string, edits: readonly RowEdit[]): Promise<EditProblem[]> {
  const removed = edits.flatMap((edit) => (edit.kind === 'remove' ? [edit.item] : []));
  const settled = new Set(
    edits.flatMap((edit) =>
      edit.kind === 'remove' || (edit.kind === 'change' && edit.fields['parent'] !== undefined)
        ? [edit.item]
        : [],
    ),
  );
  const left = new Map<string, string[]>();
  for (const { item, parent } of await childrenOf(db, revisionId, removed)) {
    if (parent === null || settled.has(item)) continue;
    left.set(parent, [...(left.get(parent) ?? []), item]);
  }
  return [...left].map(([parent, children]) => ({
    item: parent,
    column: null,
    found: parent,
    message:
      `${children.length === 1 ? 'A row names' : `${children.length} rows name`} \`${parent}\` as the assembly they belong to: ` +
      `${named(children)}. Remove them too, or give them another parent.`,
  }));
}

function named(items: readonly string[]): string {
  const more = items.length - NAMES_GIVEN;
  return items.slice(0, NAMES_GIVEN).join(', ') + (more > 0 ? ` and ${more} more` : '');
}
