import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type Edits } from './edits';
import { type Change } from './sheet';

/** What was typed here and cannot be kept, for the other window changed it too; `column` null: the row as a whole. */
export interface LeftBehind {
  readonly key: string;
  readonly column: string | null;
  readonly text: string;
}

/**
 * Brings what was typed in this window into the draft as another window of the same person has left it. `kept` is what both began
 * from. Where only this window changed a row or a field, its change is made again; where both did, the other window's stays and
 * ours is named.
 */
export function rejoined(
  kept: Edits,
  mine: Edits,
  theirs: Edits,
): { readonly changes: readonly Change[]; readonly leftBehind: readonly LeftBehind[] } {
  const changes: Change[] = [];
  const leftBehind: LeftBehind[] = [];
  for (const key of new Set([...kept.keys(), ...mine.keys()])) {
    const [was, here, there] = [kept.get(key), mine.get(key), theirs.get(key)];
    if (alike(was, here) || alike(here, there)) continue;
    if (alike(was, there)) changes.push({ key, after: here ?? null });
    else if (
      here !== undefined &&
      there !== undefined &&
      here.kind !== 'remove' &&
      here.kind === there.kind
    ) {
      const before = was !== undefined && was.kind !== 'remove' ? was.fields : {};
      const fields = { ...there.fields };
      for (const [column, text] of Object.entries(here.fields)) {
        if (text === before[column] || text === there.fields[column]) continue;
        if (there.fields[column] === before[column]) fields[column] = text;
        else leftBehind.push({ key, column, text });
      }
      changes.push({ key, after: { ...there, fields } });
    } else leftBehind.push({ key, column: null, text: wordsOf(here) });
  }
  return { changes, leftBehind };
}

function wordsOf(edit: DraftEdit | undefined): string {
  if (edit === undefined) return 'put back as it was';
  if (edit.kind === 'remove') return 'removed';
  return Object.entries(edit.fields)
    .map(([column, text]) => `${column} ${text || 'blank'}`)
    .join(', ');
}

/** Whether two edits say the same, whatever the order of their fields. */
export function alike(a: DraftEdit | undefined, b: DraftEdit | undefined): boolean {
  return a === b || told(a) === told(b);
}

function told(edit: DraftEdit | undefined): string {
  if (edit === undefined) return '';
  if (edit.kind === 'remove') return JSON.stringify([edit.kind, edit.item]);
  const fields = Object.entries(edit.fields).sort(([a], [b]) => (a < b ? -1 : 1));
  return JSON.stringify([edit.kind, edit.kind === 'add' ? [edit.id, edit.place] : edit.item, fields]);
}
