import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type Account, AccountSum } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { editedTexts, type Edits, keyOf, type Texts } from './edits';
import { type CellProblem, RowReader } from './read-row';

/** One edited row: what is wrong in it, and its accounts before and after; null where it does not count. */
export interface Entry {
  readonly problems: readonly CellProblem[];
  readonly before: Account | null;
  readonly after: Account | null;
}

export interface Effect {
  /** The list as edited, basic (without growth), about the geometry's r0. */
  readonly account: Account;
  /** Rows that count as they were, or not at all when they are new, for something is wrong in them. */
  readonly leftOut: number;
}

/**
 * Books what edits do to the sums of a list: old accounts are taken off, new ones added, by the engine that made the sums. What an
 * edit comes to is worked out once, for edits are never altered; so a thousand of them cost what the last one costs.
 */
export class Ledger {
  readonly #reader: RowReader;
  readonly #placement: Placement;
  readonly #entries = new WeakMap<DraftEdit, Entry>();

  constructor(declarations: ListDeclarations, geometry: AirframeGeometry) {
    this.#reader = new RowReader(declarations);
    this.#placement = new Placement(declarations, geometry);
  }

  /** `base`: what the row says in the revision that the edits are made from; null for an added one. */
  entry(edit: DraftEdit, base: Texts | null): Entry {
    const known = this.#entries.get(edit);
    if (known !== undefined) return known;
    const before = base === null ? null : this.#accountOf(this.#reader.read(base).component);
    const texts = editedTexts(base ?? {}, edit);
    const read = texts === null ? null : this.#reader.read(texts);
    const renamed = edit.kind === 'change' && (edit.fields['item'] ?? edit.item) !== edit.item;
    const problems = [...(read?.problems ?? []), ...(renamed ? [ITEM_STAYS] : [])];
    const entry = {
      problems,
      before,
      after: problems.length > 0 ? before : this.#accountOf(read?.component ?? null),
    };
    this.#entries.set(edit, entry);
    return entry;
  }

  /** The whole with the edits: `whole` is the basic account of the base revision. */
  effect(whole: Account, edits: Edits, baseOf: (item: string) => Texts | null): Effect {
    const sum = new AccountSum();
    sum.add(whole);
    let leftOut = 0;
    for (const edit of edits.values()) {
      const { problems, before, after } = this.entry(edit, edit.kind === 'add' ? null : baseOf(edit.item));
      if (problems.length > 0) leftOut += 1;
      else {
        if (before !== null) sum.add(before, -1);
        if (after !== null) sum.add(after);
      }
    }
    return { account: sum.account, leftOut };
  }

  /** Counted and approved rows are summed, as in a revision's own sums. */
  #accountOf(component: Component | null): Account | null {
    if (component === null || component.counting === 'memo' || component.status !== 'approved') return null;
    return this.#placement.account(component);
  }
}

const ITEM_STAYS: CellProblem = {
  column: 'item',
  message: 'The item is what a row is known by and stays. Remove the row and add one with the new item.',
};

/** Problems of every edited row that has any, by key: its own, then those that only the whole list shows. */
export function problemsByKey(
  ledger: Ledger,
  edits: Edits,
  baseOf: (item: string) => Texts | null,
  ofSet: ReadonlyMap<string, readonly CellProblem[]>,
): ReadonlyMap<string, readonly CellProblem[]> {
  const found = new Map<string, readonly CellProblem[]>();
  for (const edit of edits.values()) {
    const { problems } = ledger.entry(edit, edit.kind === 'add' ? null : baseOf(edit.item));
    const more = ofSet.get(keyOf(edit));
    const all = more === undefined ? problems : [...problems, ...more.filter((one) => !told(problems, one))];
    if (all.length > 0) found.set(keyOf(edit), all);
  }
  return found;
}

/** Whether a column's problem is among those that the row itself tells: one a cell is enough. */
function told(problems: readonly CellProblem[], { column }: CellProblem): boolean {
  return column !== null && problems.some((one) => one.column === column);
}
