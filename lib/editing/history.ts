import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type Edits } from './edits';
import { type Change } from './sheet';

interface Step {
  readonly changes: readonly (Change & { readonly before: DraftEdit | null })[];
}

/** Edits with the way back and forth. Nothing in it is ever altered. */
export interface History {
  readonly edits: Edits;
  readonly past: readonly Step[];
  readonly future: readonly Step[];
}

export function freshHistory(edits: Iterable<readonly [string, DraftEdit]>): History {
  return { edits: new Map(edits), past: [], future: [] };
}

/** One step more; a step that changes nothing is none. What was undone is then gone. */
export function withStep(history: History, changes: readonly Change[]): History {
  const real = changes
    .map((change) => ({ ...change, before: history.edits.get(change.key) ?? null }))
    .filter(({ before, after }) => before !== after && !isSame(before, after));
  if (real.length === 0) return history;
  return { edits: applied(history.edits, real), past: [...history.past, { changes: real }], future: [] };
}

export function undone(history: History): History {
  const step = history.past.at(-1);
  if (step === undefined) return history;
  const back = step.changes.map(({ key, before }) => ({ key, after: before }));
  return {
    edits: applied(history.edits, back),
    past: history.past.slice(0, -1),
    future: [...history.future, step],
  };
}

export function redone(history: History): History {
  const step = history.future.at(-1);
  if (step === undefined) return history;
  return {
    edits: applied(history.edits, step.changes),
    past: [...history.past, step],
    future: history.future.slice(0, -1),
  };
}

/** What takes one set of edits to another: what is to be put, and the keys to be dropped. */
export function differences(
  from: Edits,
  to: Edits,
): { readonly put: readonly DraftEdit[]; readonly drop: readonly string[] } {
  const put: DraftEdit[] = [];
  for (const [key, edit] of to) if (from.get(key) !== edit) put.push(edit);
  return { put, drop: [...from.keys()].filter((key) => !to.has(key)) };
}

function applied(edits: Edits, changes: readonly Change[]): Edits {
  const next = new Map(edits);
  for (const { key, after } of changes) {
    if (after === null) next.delete(key);
    else next.set(key, after);
  }
  return next;
}

function isSame(a: DraftEdit | null, b: DraftEdit | null): boolean {
  if (a === null || b === null || a.kind !== b.kind) return a === b;
  if (a.kind === 'remove' || b.kind === 'remove') return true;
  const names = Object.keys(a.fields);
  return (
    names.length === Object.keys(b.fields).length && names.every((name) => a.fields[name] === b.fields[name])
  );
}
