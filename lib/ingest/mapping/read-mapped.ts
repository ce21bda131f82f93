import { CsvFault } from '@/lib/ingest/csv/fault';
import { type IngestLimits, MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { type MassListOptions, type MassListReading } from '@/lib/ingest/mass-list';
import { LIST_COLUMNS, type ListColumn } from '@/lib/ingest/mass-list/columns';
import { ComponentRows } from '@/lib/ingest/mass-list/component-row';
import { ItemTree } from '@/lib/ingest/mass-list/item-tree';
import { type Problem } from '@/lib/ingest/problem';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { Cells } from '@/lib/ingest/table/cells';
import { type Header } from '@/lib/ingest/table/header';
import { type NumberFault, readNumber } from '@/lib/ingest/table/number-text';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { headingsOf } from './find-header';
import { cellPlace, cellText, columnLetters, type GridRow } from './grid';
import { type Mapping, positionOf } from './mapping';
import { readStyled } from './number-style';
import { RowKinds } from './row-kind';
import { mappedScales } from './scales';
import { headingSignature } from './signature';
import { type TotalFigure, TotalsCheck } from './totals';

export type LeftOutWhy = 'above the headings' | 'totals' | 'text alone' | 'repeated headings';

export interface LeftOutRow {
  readonly line: number;
  readonly why: LeftOutWhy;
  /** Its first text. */
  readonly text: string;
}

/** So many rows that were left out are named; the rest are counted. */
const NAMED = 200;

export interface MappedReading extends Omit<MassListReading, 'unknownColumns'> {
  readonly leftOut: readonly LeftOutRow[];
  readonly leftOutCounts: Readonly<Partial<Record<LeftOutWhy, number>>>;
  readonly totals: readonly TotalFigure[];
}

export interface MappedOptions extends Pick<MassListOptions, 'onComponent' | 'onProgress'> {
  readonly limits?: IngestLimits;
  /** A totals row that does not agree with its rows is taken for a problem unless someone has seen it and goes on. */
  readonly acceptTotals: boolean;
}

/**
 * Reads the rows of a file by a mapping: components in SI as from a file of the contract, problems with the file's own lines, cells
 * and headings. Rows come blank ones left out; faults of the file go to the problems, errors of the source pass through.
 */
export async function readMapped(
  rows: AsyncIterable<GridRow>,
  mapping: Mapping,
  declarations: ListDeclarations,
  options: MappedOptions,
): Promise<MappedReading> {
  const reader = new MappedReader(mapping, declarations, options);
  try {
    for await (const row of rows) {
      const waiting = reader.take(row);
      if (waiting === null) break;
      if (waiting !== undefined) await waiting;
    }
  } catch (error) {
    if (!(error instanceof CsvFault)) throw error;
    reader.fault(error.problem);
  }
  return reader.finish();
}

class MappedReader {
  private readonly log: PlacedLog;
  private readonly tree: ItemTree;
  private readonly kinds: RowKinds;
  private readonly totals: TotalsCheck;
  private readonly cells: Cells<ListColumn>;
  private readonly components: ComponentRows;
  private readonly key: ListColumn;
  private readonly limits: IngestLimits;
  private readonly leftOut: LeftOutRow[] = [];
  private readonly leftOutCounts: Partial<Record<LeftOutWhy, number>> = {};
  private readonly figures: TotalFigure[] = [];
  private readonly headerRows: GridRow[] = [];
  private row: GridRow = { line: 0, cells: [] };
  private begun = false;
  private whole = true;
  private everyRow = true;
  private rows = 0;

  constructor(
    private readonly mapping: Mapping,
    declarations: ListDeclarations,
    private readonly options: MappedOptions,
  ) {
    this.limits = options.limits ?? MASS_LIST_LIMITS;
    this.log = new PlacedLog(mapping);
    this.tree = new ItemTree(this.log);
    this.kinds = new RowKinds(mapping);
    this.totals = new TotalsCheck(mapping, declarations);
    const { fieldLength } = this.limits;
    const number = (text: string, column: ListColumn): number | NumberFault => this.number(text, column);
    this.cells = new Cells(headerOf(mapping), this.log, {
      decimalComma: false,
      fieldLength,
      readNumber: number,
    });
    this.components = new ComponentRows(
      this.cells,
      mappedScales(declarations, mapping.columns),
      declarations,
    );
    this.key = positionOf(mapping.columns, 'item') === -1 ? 'part_number' : 'item';
  }

  /** Null ends the reading. */
  take(row: GridRow): void | Promise<void> | null {
    const { first, last } = this.mapping.header;
    if (row.line < first) return this.leave(row, 'above the headings');
    if (row.line <= last) {
      this.headerRows.push(row);
      return;
    }
    if (!this.begun && !this.begin()) return null;
    const kind = this.kinds.kindOf(row);
    const { leaveOut } = this.mapping;
    if (kind === 'total' && leaveOut.totals) {
      this.figures.push(...this.totals.check(row));
      return this.leave(row, 'totals');
    }
    if (kind === 'text' && leaveOut.texts) {
      this.totals.divide();
      return this.leave(row, 'text alone');
    }
    if (kind === 'heading' && leaveOut.headings) return this.leave(row, 'repeated headings');
    if (this.rows === this.limits.rows) {
      this.fault(tooMany(row.line, this.limits.rows));
      return null;
    }
    this.rows += 1;
    if (this.rows % 500 === 0) this.options.onProgress?.({ rows: this.rows, bytes: 0 });
    return this.component(row);
  }

  fault(problem: Problem): void {
    this.log.add(problem);
    this.whole = false;
  }

  finish(): MappedReading {
    if (this.whole && (this.begun || this.begin()) && this.rows === 0)
      this.fault({
        ...FILE,
        kind: 'no-rows',
        message: 'Below the headings stands no row that is a component.',
      });
    // A parent may stand in a row that could not be read.
    if (this.whole && this.everyRow) this.tree.finish();
    if (this.whole && !this.options.acceptTotals) this.refuseTotals();
    return {
      rows: this.rows,
      problems: this.log.problems(),
      problemCounts: this.log.counts(),
      leftOut: this.leftOut,
      leftOutCounts: this.leftOutCounts,
      totals: this.figures,
    };
  }

  /** False when the file's headings are not those of the mapping. */
  private begin(): boolean {
    this.begun = true;
    const found = headingsOf(this.headerRows, this.mapping.header);
    const wanted = this.mapping.columns.map(({ heading }) => heading);
    if (headingSignature(found) === headingSignature(wanted)) return true;
    const message = `The headings are ${found.map((one) => `\`${one}\``).join(', ') || 'missing'}, and the mapping is for ${wanted.map((one) => `\`${one}\``).join(', ')}. Map the columns of this file.`;
    this.fault({
      kind: 'other-headings',
      line: this.mapping.header.first,
      column: null,
      found: null,
      message,
    });
    return false;
  }

  private component(row: GridRow): void | Promise<void> {
    this.row = row;
    const maturity = positionOf(this.mapping.columns, 'maturity');
    const fields = row.cells.map((cell, index) =>
      index === maturity ? maturityLetter(cellText(cell)) : String(cell),
    );
    // A workbook has no cells at the end of a row where nothing stands.
    if (this.mapping.sheet !== null) while (fields.length < this.mapping.columns.length) fields.push('');
    if (!this.cells.load({ line: row.line, fields, misplacedQuote: row.misplacedQuote ?? null })) {
      this.everyRow = false;
      return;
    }
    const component = this.components.read();
    const item = component?.item ?? this.cells.text(this.key);
    const fresh = item !== null && this.tree.add(item, this.cells.text('parent'), row.line, this.key);
    if (component === null || !fresh) return;
    const one = this.mapping.per === 'row' ? ofOnePiece(component) : component;
    this.totals.add(one, row);
    return this.options.onComponent(one, row.line);
  }

  private number(text: string, column: ListColumn): number | NumberFault {
    const index = positionOf(this.mapping.columns, column);
    const to = this.mapping.columns[index]?.to;
    const cell = this.row.cells[index];
    if (typeof cell === 'number') return readNumber(String(cell), false);
    const percent = column === 'growth_percent' && text.endsWith('%');
    const value = readStyled(percent ? text.slice(0, -1).trim() : text, this.mapping.numbers);
    return percent && typeof value === 'number' && to?.use === 'column' && to.unit === 'fraction'
      ? value / 100
      : value;
  }

  private leave(row: GridRow, why: LeftOutWhy): void {
    this.leftOutCounts[why] = (this.leftOutCounts[why] ?? 0) + 1;
    if (this.leftOut.length < NAMED)
      this.leftOut.push({ line: row.line, why, text: RowKinds.words(row).slice(0, 80) });
  }

  private refuseTotals(): void {
    for (const { line, what, unit, stated, computed, agrees } of this.figures) {
      if (agrees) continue;
      const message = `The totals row says ${stated} ${unit}, the rows ${what === 'mass' ? 'add up to' : 'have their CG at'} ${computed} ${unit}. Put the file right, or map it by hand and accept the difference.`;
      this.log.add({ kind: 'totals-differ', line, column: what, found: String(stated), message });
    }
  }
}

/** Names the cell or the heading of the file where a problem is of one of its columns. */
class PlacedLog extends ProblemLog {
  constructor(private readonly mapping: Mapping) {
    super();
  }

  override add(problem: Problem): void {
    const { line, column, message } = problem;
    const { columns, sheet } = this.mapping;
    const index = columns.findIndex(({ to }) => to.use === 'column' && to.column === column);
    const heading = columns[index]?.heading;
    if (sheet !== null && line !== null) {
      const place = index === -1 ? `${sheet}, row ${line}` : cellPlace(sheet, line, index);
      super.add({ ...problem, message: `${place}: ${message}` });
    } else if (heading !== undefined && heading.toLowerCase() !== column) {
      super.add({ ...problem, message: `Column \`${heading}\`: ${message}` });
    } else super.add(problem);
  }
}

const FILE = { line: null, column: null, found: null } as const;

function tooMany(line: number, rows: number): Problem {
  return {
    ...FILE,
    kind: 'too-many-rows',
    line,
    message: `The file has more than ${rows} rows. Split it into several lists.`,
  };
}

/** The file's columns as a header of the contract. Names of extra columns are told apart from each other and from the contract's. */
function headerOf({ columns, header }: Mapping): Header<ListColumn> {
  const positions = new Map<ListColumn, number>();
  const taken = new Set<string>(LIST_COLUMNS);
  const own: { name: string; index: number }[] = [];
  for (const [index, { heading, to }] of columns.entries()) {
    if (to.use === 'column') positions.set(to.column, index);
    if (to.use === 'extra')
      own.push({ name: freeName(heading === '' ? `Column ${columnLetters(index)}` : heading, taken), index });
  }
  const names = columns.map(({ heading, to }) => (to.use === 'column' ? to.column : heading));
  return { line: header.last, positions, own, names, width: columns.length };
}

function freeName(wanted: string, taken: Set<string>): string {
  let name = wanted;
  for (let k = 2; taken.has(name.toLowerCase()); k += 1) name = `${wanted} (${k})`;
  taken.add(name.toLowerCase());
  return name;
}

/** Mass and own tensor of all pieces of a row, shared out evenly. */
function ofOnePiece(component: Component): Component {
  const { quantity: n, moments, sigma } = component;
  if (n === 1) return component;
  const share = (value: number | null): number | null => (value === null ? null : value / n);
  return {
    ...component,
    mass: component.mass / n,
    moments: {
      ixx: moments.ixx / n,
      iyy: moments.iyy / n,
      izz: moments.izz / n,
      ixy: moments.ixy / n,
      ixz: moments.ixz / n,
      iyz: moments.iyz / n,
    },
    sigma:
      sigma === null
        ? null
        : {
            ...sigma,
            mass: share(sigma.mass),
            ixx: share(sigma.ixx),
            iyy: share(sigma.iyy),
            izz: share(sigma.izz),
            ixy: share(sigma.ixy),
            ixz: share(sigma.ixz),
            iyz: share(sigma.iyz),
          },
  };
}

const MATURITY_WORDS: Readonly<Record<string, string>> = {
  est: 'E',
  estimated: 'E',
  estimate: 'E',
  calc: 'C',
  calculated: 'C',
  act: 'A',
  actual: 'A',
  weighed: 'A',
};

function maturityLetter(text: string): string {
  return MATURITY_WORDS[text.toLowerCase().replace(/\.$/u, '')] ?? text;
}
