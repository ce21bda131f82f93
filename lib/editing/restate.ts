import { type DraftEdit } from '@/lib/contracts/list-draft';
import { typedNumber } from '@/lib/export/typed-number';
import { listScales, scaled, type ScaledColumn, type Scales } from '@/lib/ingest/mass-list/columns';
import { readNumber } from '@/lib/ingest/table/number-text';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Texts } from './edits';

/** What two declarations differ in that a figure alone cannot be carried across; null when nothing. */
export function unlike(before: ListDeclarations, after: ListDeclarations): string | null {
  if (before.axes.join() !== after.axes.join()) return 'other axes';
  if (JSON.stringify(before.pose) !== JSON.stringify(after.pose)) return 'another frame';
  if (before.kind !== after.kind) return 'another kind of list';
  if (before.extent !== after.extent) return 'another extent';
  return null;
}

/** The same edit in the units, the sign of products and the meaning of uncertainties of other declarations. */
export function restated(edit: DraftEdit, before: ListDeclarations, after: ListDeclarations): DraftEdit {
  if (edit.kind === 'remove') return edit;
  const [from, to] = [listScales(before), listScales(after)];
  return { ...edit, fields: restatedTexts(edit.fields, from, to) };
}

function restatedTexts(fields: Texts, from: Scales, to: Scales): Record<string, string> {
  return Object.fromEntries(
    Object.entries(fields).map(([column, text]) => {
      if (!isScaled(column, from)) return [column, text];
      const [a, b] = [from[column], to[column]];
      const value = a.times === b.times && a.over === b.over ? null : readNumber(text, false);
      // What is no number is a problem at its cell, here as there.
      return [column, typeof value === 'number' ? String(typedNumber(scaled(value, a), b)) : text];
    }),
  );
}

function isScaled(column: string, scales: Scales): column is ScaledColumn {
  return Object.hasOwn(scales, column);
}
