import { fromSi } from '@/lib/units/convert';
import { type Unit } from '@/lib/units/table';

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

  /** `headline` begins the message, which ends with the first row's detail; null when nothing was seen. */
  report(headline: (count: number) => string): Sighting | null {
    const { count } = this;
    if (count === 0) return null;
    const first = count === 1 ? this.#first : `First, ${this.#first}`;
    return { message: `${headline(count)}. ${first}.`, rows: this.#rows, count };
  }
}

/**
 * A watch that judges each row by itself. `detail` says what is wrong with a row, or null; `headline` begins the message, which
 * ends with the first row's detail.
 */
export function eachRow(
  detail: (row: RowFacts, list: WatchedList) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const seen = new Seen();
    return {
      see: (row) => {
        const what = detail(row, list);
        if (what !== null) seen.add(row.component.item, what);
      },
      report: () => seen.report(headline),
    };
  };
}
