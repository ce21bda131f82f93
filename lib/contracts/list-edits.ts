import { z } from 'zod';

/** Texts by column name, in the list's own units and signs, as they would stand in its file; '' blanks a cell. */
const fields = z.record(z.string().min(1).max(8192), z.string().max(8192));
const item = z.string().min(1).max(8192);

export const rowEditSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('change'),
    item,
    fields,
    seen: fields
      .optional()
      .describe('What the fields held when they were edited; another value in the base is a problem'),
  }),
  z.object({ kind: z.literal('add'), fields }),
  z.object({ kind: z.literal('remove'), item }),
]);
export type RowEdit = z.output<typeof rowEditSchema>;

/** What is wrong with a set of edits: in which row (null: the list as a whole) and column, what was found, what would be right. */
export const editProblemSchema = z.object({
  item: z.string().nullable(),
  column: z.string().nullable(),
  found: z.string().nullable(),
  message: z.string(),
});
export type EditProblem = z.output<typeof editProblemSchema>;

/** What became of edits: a revision, or problems, of which the first 200 are told and all counted. */
export type SavedEdits =
  | { readonly status: 'saved'; readonly revision: number }
  | { readonly status: 'problems'; readonly problems: EditProblem[]; readonly count: number };

/** The key under which an edit's row is known: an added row by the item it is given. */
export function itemOfEdit(edit: RowEdit): string {
  return edit.kind === 'add' ? (edit.fields['item'] ?? '').trim() : edit.item;
}
