import { fromSi } from '@/lib/units/convert';
import { type Unit } from '@/lib/units/table';

import { type CheckBlock } from './columns/check-block';
import { ROWS_NAMED } from './finding';
import { type RowFacts } from './row-facts';
import { type Sighting, type Watch, type WatchedList } from './rule';

/** What `eachRow` keeps, in the words of a rule. */
export const FIRST_ROWS = `The names of the first ${ROWS_NAMED} rows, their count, and the first one's detail.`;

/** `1 row states` or `3 rows state`. */
export function counted(count: number, one: string, many: string): string {
  return `${count} ${count === 1 ? one : many}`;
}

/** A number for a sentence: four significant digits. */
export function shown(value: number): string {
  return String(Number(value.toPrecision(4)));
}

/** An SI value in a unit, for a sentence. */
export function inUnit(value: number, unit: Unit): string {
  return `${shown(fromSi(value, unit))} ${unit}`;
}

/** The rows that a watch has seen something in: the names of the first, their count, the first one's detail. */
export class Seen {
  readonly #rows: string[] = [];
  #first = '';
  count = 0;

  /** `detail` says what is wrong with the row `item`. */
  add(item: string, detail: string): void {
    this.count += 1;
    if (this.#rows.length < ROWS_NAMED) this.#rows.push(item);
    if (this.count === 1) this.#first = `${item}: ${detail}`;
  }

  /** Whether enough rows are named: of more, only the number matters. */
  get isFull(): boolean {
    return this.#rows.length === ROWS_NAMED;
  }

  /** `headline` begins the message, which ends with the first row's detail; null when nothing was seen. */
  report(headline: (count: number) => string): Sighting | null {
    const { count } = this;
    if (count === 0) return null;
    const first = count === 1 ? this.#first : `First, ${this.#first}`;
    return { message: `${headline(count)}. ${first}.`, rows: this.#rows, count };
  }
}

/** Bits of `TRAITS`: a row without one of them is nothing to a rule. `isAll` says that every counted row with one is a finding. */
export interface Suspicion {
  readonly traits: number;
  readonly isAll?: boolean;
}

/** Calls `look` for the rows of a block that have one of the traits. */
export function eachWith(traits: number, block: CheckBlock, look: (row: number) => void): void {
  if ((block.allTraits & traits) === 0) return;
  for (let row = 0; row < block.rows.rows; row += 1) if (((block.traits[row] ?? 0) & traits) !== 0) look(row);
}

/**
 * A watch that judges each row by itself. `detail` says what is wrong with a row, or null; `headline` begins the message, which
 * ends with the first row's detail. Only rows with a trait of `suspicion` can have anything wrong.
 */
export function eachRow(
  detail: (row: RowFacts, list: WatchedList) => string | null,
  headline: (count: number) => string,
  { traits, isAll = false }: Suspicion,
): (list: WatchedList) => Watch {
  return (list) => {
    const seen = new Seen();
    const see = (row: RowFacts): void => {
      const what = detail(row, list);
      if (what !== null) seen.add(row.component.item, what);
    };
    return {
      see,
      block: (block) =>
        eachWith(traits, block, (row) => {
          if (isAll && seen.isFull) seen.count += 1;
          else see(block.facts(row));
        }),
      report: () => seen.report(headline),
    };
  };
}
