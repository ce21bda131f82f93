import { type Account, AccountSum } from './account';
import { type Category, type ChangeStatus, type Component, type Maturity } from './component';
import { type Placement, piecesOf } from './place';

/** What a subtotal is kept per: a configuration can leave out categories and statuses, and grow by maturity. */
export interface SubtotalKey {
  readonly group: string;
  readonly category: Category;
  readonly maturity: Maturity | null;
  readonly status: ChangeStatus;
}

/**
 * The rows of one list revision that share a key, as accounts about the geometry's r0. Predicted is
 * `statedPredicted + (1 + allowance of the maturity) * unstatedBasic`, so that an allowance can change without reading rows.
 */
export interface Subtotal extends SubtotalKey {
  /** Counted rows; memo rows are in `memoRows` and in nothing else. */
  readonly rows: number;
  /** Pieces of the counted rows: quantity, twice where a row also stands for its mirror image. */
  readonly pieces: number;
  readonly memoRows: number;
  /** All counted rows, without growth. */
  readonly basic: Account;
  /** The rows that state growth, grown by it. */
  readonly statedPredicted: Account;
  /** The rows that state none, without growth. */
  readonly unstatedBasic: Account;
}

interface Entry {
  readonly key: SubtotalKey;
  rows: number;
  pieces: number;
  memoRows: number;
  readonly basic: AccountSum;
  readonly statedPredicted: AccountSum;
  readonly unstatedBasic: AccountSum;
}

/** Books the rows of a list one at a time; what it keeps grows with the number of keys, not of rows. */
export class SubtotalBook {
  readonly #entries = new Map<string, Entry>();

  constructor(readonly placement: Placement) {}

  add(component: Component): void {
    const entry = this.#entry(component);
    if (component.counting === 'memo') {
      entry.memoRows += 1;
      return;
    }
    const account = this.placement.account(component);
    entry.rows += 1;
    entry.pieces += piecesOf(component, this.placement.declarations);
    entry.basic.add(account);
    if (component.growth === null) entry.unstatedBasic.add(account);
    else entry.statedPredicted.add(account, 1 + component.growth);
  }

  /** One subtotal per key, in the order in which the keys first came. */
  subtotals(): Subtotal[] {
    return [...this.#entries.values()].map((entry) => ({
      ...entry.key,
      rows: entry.rows,
      pieces: entry.pieces,
      memoRows: entry.memoRows,
      basic: entry.basic.account,
      statedPredicted: entry.statedPredicted.account,
      unstatedBasic: entry.unstatedBasic.account,
    }));
  }

  #entry({ group, category, maturity, status }: SubtotalKey): Entry {
    const id = JSON.stringify([group, category, maturity, status]);
    const known = this.#entries.get(id);
    if (known) return known;
    const entry: Entry = {
      key: { group, category, maturity, status },
      rows: 0,
      pieces: 0,
      memoRows: 0,
      basic: new AccountSum(),
      statedPredicted: new AccountSum(),
      unstatedBasic: new AccountSum(),
    };
    this.#entries.set(id, entry);
    return entry;
  }
}
