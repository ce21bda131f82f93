import { type CsvRecord } from '@/lib/ingest/csv/splitter';
import { type ProblemLog } from '@/lib/ingest/problem-log';
import { restoreFormula } from '@/lib/export/formula-text';

/** Where the columns of a file are. `width` is the number of fields up to the last named column. */
export interface Header<C extends string> {
  readonly line: number;
  readonly positions: ReadonlyMap<C, number>;
  readonly own: readonly { readonly name: string; readonly index: number }[];
  readonly names: readonly string[];
  readonly width: number;
}

/** Header names of a file that stand for columns of the contract, as its list remembers them. */
export type ColumnMapping<C extends string> = Readonly<Record<string, C>>;

/** Logs a problem of the header row. */
export type HeaderProblem = (
  kind: string,
  column: string | null,
  found: string | null,
  message: string,
) => void;

/** What a header row must hold; `check` may log what is wrong with the columns as a whole. */
export interface HeaderContract<C extends string> {
  readonly columns: readonly C[];
  readonly needed: readonly C[];
  readonly mapping: ColumnMapping<C>;
  readonly maxColumns: number;
  readonly check: (positions: ReadonlyMap<C, number>, problem: HeaderProblem) => void;
}

/**
 * Reads a header row: known names in any case and order, mapped names, and columns of the file's own.
 * Logs names that are missing, stand twice or are blank before others; the rows can be read where none was logged.
 */
export function readHeader<C extends string>(
  record: CsvRecord,
  contract: HeaderContract<C>,
  log: ProblemLog,
): Header<C> {
  const problem: HeaderProblem = (kind, column, found, message) =>
    log.add({ kind, line: record.line, column, found, message });

  const texts = record.fields.map((field) => restoreFormula(field.trim()));
  const width = texts.findLastIndex((text) => text !== '') + 1;
  if (width > contract.maxColumns) {
    const message = `The file has ${width} columns; at most ${contract.maxColumns} are read. Leave some out.`;
    problem('too-many-columns', null, null, message);
    return { line: record.line, positions: new Map(), own: [], names: [], width };
  }
  if (record.misplacedQuote !== null) problem('misplaced-quote', null, '"', 'A quote stands within a name.');

  const known = new Map<string, C>(contract.columns.map((column) => [column, column]));
  const positions = new Map<C, number>();
  const own = new Map<string, number>();
  texts.slice(0, width).forEach((text, index) => {
    if (text === '') {
      problem('unnamed-column', null, null, `Column ${index + 1} has no name. Name it or remove it.`);
      return;
    }
    const mapped = Object.hasOwn(contract.mapping, text) ? contract.mapping[text] : undefined;
    const column = mapped ?? known.get(text.toLowerCase());
    if (column === undefined ? own.has(text) : positions.has(column)) {
      const name = column ?? text;
      problem('duplicate-column', name, text, `The column ${name} stands twice. Keep one of them.`);
    } else if (column === undefined) own.set(text, index);
    else positions.set(column, index);
  });
  for (const column of contract.needed) {
    if (positions.has(column)) continue;
    const message = `The column ${column} is missing. Add it, or give the file's own column for it this name.`;
    problem('missing-column', column, null, message);
  }
  contract.check(positions, problem);
  return {
    line: record.line,
    positions,
    own: Array.from(own, ([name, index]) => ({ name, index })),
    names: texts.map((text, index) => {
      for (const [column, position] of positions) if (position === index) return column;
      return text;
    }),
    width,
  };
}
