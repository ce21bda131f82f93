import { neutraliseFormula } from '@/lib/export/formula-text';
import { MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { type ListColumn, listScales, type Scales } from '@/lib/ingest/mass-list/columns';
import { ComponentRows } from '@/lib/ingest/mass-list/component-row';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { Cells } from '@/lib/ingest/table/cells';
import { type Header } from '@/lib/ingest/table/header';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { columnsOfKind, isNumberColumn } from './columns';
import { type Texts } from './edits';

/** What is wrong in a cell; `column` null: in the row as a whole. */
export interface CellProblem {
  readonly column: string | null;
  readonly message: string;
}

export interface ReadRow {
  /** In SI; null when something is wrong. */
  readonly component: Component | null;
  readonly problems: readonly CellProblem[];
}

/** Reads single rows by the very checks that a file goes through, where the row alone tells. */
export class RowReader {
  readonly #columns: readonly ListColumn[];
  readonly #header: Header<ListColumn>;
  readonly #scales: Scales;

  constructor(private readonly declarations: ListDeclarations) {
    this.#columns = columnsOfKind(declarations.kind);
    this.#scales = listScales(declarations);
    this.#header = {
      line: 1,
      positions: new Map(this.#columns.map((column, index) => [column, index])),
      own: [],
      names: this.#columns,
      width: this.#columns.length,
    };
  }

  read(texts: Texts): ReadRow {
    const log = new ProblemLog();
    const cells = new Cells(this.#header, log, {
      decimalComma: false,
      fieldLength: MASS_LIST_LIMITS.fieldLength,
    });
    const component = cells.load({
      line: 1,
      fields: this.#columns.map((column) => asInFile(column, texts[column] ?? '')),
      misplacedQuote: null,
    })
      ? new ComponentRows(cells, this.#scales, this.declarations).read()
      : null;
    const problems = log.problems().map(({ column, message }) => ({ column, message }));
    return { component: problems.length === 0 ? component : null, problems };
  }
}

/** Texts stand in a file with formulas made harmless; a formula for a number is to be seen as one. */
function asInFile(column: string, text: string): string {
  return isNumberColumn(column) ? text : neutraliseFormula(text);
}
