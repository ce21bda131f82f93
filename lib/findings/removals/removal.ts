import { type Account } from '@/lib/mass/account';

/** A counted row as the rules on removals see it. */
export interface BookedRow {
  /** `list/item` */
  readonly name: string;
  /** The growth that applies to it, stated by the row or allowed for its maturity, a fraction of mass. */
  readonly growth: number;
  /** All its pieces, about the reference point of the configuration's frame issue. */
  readonly account: Account;
}

/** A row of a list of adjustments that takes something away, and the row that it takes it from; null where none is found. */
export interface Removal {
  readonly removal: BookedRow;
  readonly from: BookedRow | null;
}
