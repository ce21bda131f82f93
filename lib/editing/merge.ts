import { type Choice, type Clash, type DraftEdit } from '@/lib/contracts/list-draft';
import { addedKey, type Edits, itemOf, keyOf, saysSame, type Texts } from './edits';

/** What the rows of a revision say, by item. */
export type RowsByItem = ReadonlyMap<string, Texts>;

export interface Merge {
  /** Edits as they stand on their revision, without those that clash. */
  readonly edits: readonly DraftEdit[];
  readonly clashes: readonly Clash[];
  /** Items of rows that both changed, in different fields. */
  readonly together: readonly string[];
  /** Items of rows whose edit they have made too, so that nothing of it is left. */
  readonly settled: readonly string[];
}

interface Sides {
  /** Rows of the revision that the edits were made from, and of the newer one, at least those of the edits, in the same units. */
  readonly before: RowsByItem;
  readonly theirs: RowsByItem;
}

/**
 * Three-way merge of edits with a newer revision, row by row (by item) and field by field. A field that one side changed is taken;
 * a row of which both changed a field, or one changed what the other removed, is a clash, and nobody's version of it is taken.
 */
export function merge(edits: Iterable<DraftEdit>, sides: Sides): Merge {
  const found = {
    edits: [] as DraftEdit[],
    clashes: [] as Clash[],
    together: [] as string[],
    settled: [] as string[],
  };
  for (const edit of edits) {
    const item = itemOf(edit);
    const [before, theirs] = [sides.before.get(item) ?? null, sides.theirs.get(item) ?? null];
    const clash = clashOf(edit, before, theirs);
    if (clash !== null) {
      found.clashes.push(clash);
      continue;
    }
    const left = leftOf(edit, theirs);
    if (left === null) found.settled.push(item);
    else {
      found.edits.push(left);
      if (left.kind === 'change' && before !== null && theirs !== null && changed(before, theirs).length > 0)
        found.together.push(item);
    }
  }
  return found;
}

/** What of an edit there is still to do on their row. */
function leftOf(edit: DraftEdit, theirs: Texts | null): DraftEdit | null {
  if (edit.kind === 'remove') return theirs === null ? null : edit;
  if (edit.kind === 'add') return theirs === null ? edit : null;
  const fields = Object.entries(edit.fields).filter(
    ([column, text]) => !saysSame(column, text, theirs?.[column] ?? ''),
  );
  return fields.length === 0 ? null : { ...edit, fields: Object.fromEntries(fields) };
}

function clashOf(edit: DraftEdit, before: Texts | null, theirs: Texts | null): Clash | null {
  const of = (kind: Clash['kind'], fields: Clash['fields']): Clash | null =>
    fields.length === 0 ? null : { key: keyOf(edit), item: itemOf(edit), kind, fields };
  if (edit.kind === 'add') {
    if (theirs === null) return null;
    const differing = Object.entries(edit.fields).filter(
      ([column, text]) => !saysSame(column, text, theirs[column] ?? ''),
    );
    return of(
      'both-added',
      differing.map(([column, mine]) => ({ column, before: null, mine, theirs: theirs[column] ?? '' })),
    );
  }
  if (edit.kind === 'remove') {
    if (theirs === null || before === null) return null;
    return of(
      'i-removed',
      changed(before, theirs).map((column) => ({
        column,
        before: before[column] ?? '',
        mine: null,
        theirs: theirs[column] ?? '',
      })),
    );
  }
  const fields = Object.entries(edit.fields);
  if (theirs === null) {
    return of(
      'they-removed',
      fields.map(([column, mine]) => ({ column, before: before?.[column] ?? '', mine, theirs: null })),
    );
  }
  return of(
    'fields',
    fields.flatMap(([column, mine]) => {
      const [was, now] = [before?.[column] ?? '', theirs[column] ?? ''];
      if (saysSame(column, was, now) || saysSame(column, mine, now)) return [];
      return [{ column, before: was, mine, theirs: now }];
    }),
  );
}

/** Columns in which two versions of a row differ. */
function changed(before: Texts, theirs: Texts): string[] {
  return [...new Set([...Object.keys(before), ...Object.keys(theirs)])].filter(
    (column) => !saysSame(column, before[column] ?? '', theirs[column] ?? ''),
  );
}

export interface Settlement {
  readonly edits: readonly DraftEdit[];
  /** Clashes, or fields of them, that no choice speaks of. */
  readonly open: readonly Clash[];
}

/**
 * The edits that choices make of clashes. Of a row of fields each is chosen, by its own choice or by one for the whole row; a row
 * that one side removed is chosen whole: theirs leaves it to them, mine puts back what they removed, or removes what they changed.
 */
export function settle(
  edits: Edits,
  clashes: readonly Clash[],
  choices: readonly Choice[],
  sides: Sides,
): Settlement {
  const made: DraftEdit[] = [];
  const open: Clash[] = [];
  const chosen = new Map(choices.map((choice) => [JSON.stringify([choice.key, choice.column]), choice.take]));
  for (const clash of clashes) {
    const edit = edits.get(clash.key);
    if (edit === undefined) continue;
    const whole = chosen.get(JSON.stringify([clash.key, null]));
    const theirs = sides.theirs.get(clash.item);
    if (clash.kind === 'fields' || clash.kind === 'both-added') {
      const takes = clash.fields.map(
        ({ column }) => chosen.get(JSON.stringify([clash.key, column])) ?? whole ?? null,
      );
      if (takes.includes(null)) open.push(clash);
      else {
        const given = new Set(
          clash.fields.filter((_, at) => takes[at] === 'theirs').map(({ column }) => column),
        );
        const kept = Object.entries(edit.kind === 'remove' ? {} : edit.fields).filter(
          ([column, text]) => !given.has(column) && !saysSame(column, text, theirs?.[column] ?? ''),
        );
        if (kept.length > 0)
          made.push({ kind: 'change', item: clash.item, fields: Object.fromEntries(kept) });
      }
    } else if (whole === undefined) open.push(clash);
    else if (whole === 'mine')
      made.push(edit.kind === 'change' ? putBack(edit, sides.before.get(clash.item) ?? {}, edits) : edit);
  }
  return { edits: made, open };
}

/** A row that they removed, added again as it was with the fields that were changed in it. */
function putBack(edit: Extract<DraftEdit, { kind: 'change' }>, before: Texts, edits: Edits): DraftEdit {
  const places = [...edits.values()].map((one) => (one.kind === 'add' ? one.place : 0));
  let number = 1;
  const id = (): string => `back-${number}-${hashOf(edit.item)}`;
  while (edits.has(addedKey(id()))) number += 1;
  const fields = Object.fromEntries(
    Object.entries({ ...before, ...edit.fields }).filter(([, text]) => text !== ''),
  );
  return { kind: 'add', id: id(), place: Math.max(0, ...places) + 1, fields };
}

/** Sets apart rows that are put back in one go (FNV-1a). */
function hashOf(text: string): string {
  let hash = 0x811c9dc5;
  for (let at = 0; at < text.length; at += 1) hash = Math.imul(hash ^ text.charCodeAt(at), 0x01000193);
  return (hash >>> 0).toString(36);
}
