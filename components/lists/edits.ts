import { type ListRow } from '@/lib/contracts/list-rows';
import { itemOfEdit, rowEditSchema, type RowEdit } from '@/lib/contracts/list-edits';
import { z } from 'zod';

/** Edits gathered and not saved yet, and the revision that they were made from. */
export const pendingEditsSchema = z.object({
  base: z.number().int(),
  edits: z.array(rowEditSchema),
});
export type PendingEdits = z.output<typeof pendingEditsSchema>;

/** The texts that a row's cells hold, its own columns with them. */
export function textsOf(row: ListRow): Readonly<Record<string, string>> {
  return Object.fromEntries(
    Object.entries({ ...row.own, ...row.cells }).map(([name, cell]) => [name, String(cell)]),
  );
}

/**
 * The edits with one more. An edit of a row that has one already is merged into it; fields put back to what they were
 * drop out, and an edit without fields with them.
 */
export function withEdit(edits: readonly RowEdit[], edit: RowEdit): RowEdit[] {
  const item = itemOfEdit(edit);
  const known = edits.find((one) => itemOfEdit(one) === item);
  const rest = edits.filter((one) => one !== known);
  if (known?.kind === 'add') {
    if (edit.kind === 'remove') return rest;
    return [...rest, { kind: 'add', fields: { ...known.fields, ...edit.fields } }];
  }
  if (edit.kind !== 'change') return [...rest, edit];
  const before = known?.kind === 'change' ? known : null;
  const seen = { ...edit.seen, ...before?.seen };
  const fields = { ...before?.fields, ...edit.fields };
  const left = Object.entries(fields).filter(([name, text]) => text !== (seen[name] ?? ''));
  if (left.length === 0) return rest;
  return [
    ...rest,
    {
      kind: 'change',
      item,
      fields: Object.fromEntries(left),
      seen: Object.fromEntries(left.map(([name]) => [name, seen[name] ?? ''])),
    },
  ];
}

/** The edit that takes a row from what it says to what a form holds; null where they are alike. */
export function changeOf(row: ListRow, form: Readonly<Record<string, string>>): RowEdit | null {
  const before = textsOf(row);
  const fields = Object.entries(form).filter(([name, text]) => text.trim() !== (before[name] ?? ''));
  if (fields.length === 0) return null;
  return {
    kind: 'change',
    item: String(row.cells.item ?? ''),
    fields: Object.fromEntries(fields.map(([name, text]) => [name, text.trim()])),
    seen: Object.fromEntries(fields.map(([name]) => [name, before[name] ?? ''])),
  };
}
