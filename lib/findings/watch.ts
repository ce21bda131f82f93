import { ROWS_NAMED } from './finding';
import { type RowFacts } from './row-facts';
import { type Watch } from './rule';

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

/**
 * A watch that judges each row by itself. `detail` says what is wrong with a row, or null; `headline` begins the message, which
 * ends with the first row's detail.
 */
export function eachRow(
  detail: (row: RowFacts) => string | null,
  headline: (count: number) => string,
): () => Watch {
  return () => {
    const rows: string[] = [];
    let count = 0;
    let first = '';
    return {
      see: (row) => {
        const what = detail(row);
        if (what === null) return;
        count += 1;
        if (rows.length < ROWS_NAMED) rows.push(row.component.item);
        if (count === 1) first = `${row.component.item}: ${what}`;
      },
      report: () =>
        count === 0
          ? null
          : { message: `${headline(count)}. ${count === 1 ? '' : 'First, '}${first}.`, rows, count },
    };
  };
}
