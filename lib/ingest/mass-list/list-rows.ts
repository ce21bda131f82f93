import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { type CsvRecord } from '@/lib/ingest/csv/splitter';
import { type IngestLimits } from '@/lib/ingest/limits';
import {
  CHANGE_COLUMNS,
  LIST_COLUMNS,
  type ListColumn,
  NEEDED_COLUMNS,
  type Scales,
  listScales,
} from '@/lib/ingest/mass-list/columns';
import { ComponentRows } from '@/lib/ingest/mass-list/component-row';
import { ItemTree } from '@/lib/ingest/mass-list/item-tree';
import { type ProblemLog } from '@/lib/ingest/problem-log';
import { Cells } from '@/lib/ingest/table/cells';
import { type ColumnMapping, type Header, type HeaderProblem, readHeader } from '@/lib/ingest/table/header';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface Reader {
  readonly header: Header<ListColumn>;
  readonly cells: Cells<ListColumn>;
  readonly components: ComponentRows;
}

/** What the records of one mass list mean: the first is its header, the others are rows. Problems go to the log. */
export class ListRows {
  readonly scales: Scales;
  readonly tree: ItemTree;
  #reader: Reader | null = null;
  #everyRow = true;
  /** Names of the file's own columns. */
  ownColumns: readonly string[] = [];

  /** Throws a RangeError when the declarations name no known unit. */
  constructor(
    private readonly declarations: ListDeclarations,
    private readonly limits: IngestLimits,
    private readonly mapping: ColumnMapping<ListColumn>,
    private readonly log: ProblemLog,
  ) {
    this.scales = listScales(declarations);
    this.tree = new ItemTree(log);
  }

  /** Takes the header row; null where its problems leave no sense in reading on. */
  takeHeader(record: CsvRecord, delimiter: Delimiter): Header<ListColumn> | null {
    const { declarations, log, mapping, limits } = this;
    const check = (positions: ReadonlyMap<ListColumn, number>, problem: HeaderProblem): void =>
      checkKeys(positions, declarations, problem);
    const contract = {
      columns: LIST_COLUMNS,
      needed: NEEDED_COLUMNS,
      mapping,
      maxColumns: limits.columns,
      check,
    };
    const header = readHeader(record, contract, log);
    this.ownColumns = header.own.map(({ name }) => name);
    const { fieldLength } = limits;
    const cells = new Cells(header, log, { decimalComma: delimiter === ';', fieldLength });
    this.#reader = { header, cells, components: new ComponentRows(cells, this.scales, declarations) };
    return log.total === 0 ? header : null;
  }

  /** The column that a row is known by. */
  get key(): 'item' | 'part_number' {
    return this.#reader?.header.positions.has('item') === false ? 'part_number' : 'item';
  }

  /** Where decimal marks were seen; null before the header. */
  get cells(): Cells<ListColumn> | null {
    return this.#reader?.cells ?? null;
  }

  /** A row as a component in SI; null when something is wrong with it, which is in the log. */
  takeRow(record: CsvRecord): Component | null {
    if (this.#reader === null) return null;
    const { cells, components } = this.#reader;
    if (!cells.load(record)) {
      this.#everyRow = false;
      return null;
    }
    const component = components.read();
    const item = component?.item ?? cells.text(this.key);
    const fresh = item !== null && this.tree.add(item, cells.text('parent'), record.line, this.key);
    return fresh ? component : null;
  }

  /** To be called at the end; `whole` says that the file was read to its end. */
  finish(whole: boolean): void {
    this.#reader?.cells.finish();
    // A parent may stand in a row that could not be read.
    if (whole && this.#everyRow) this.tree.finish();
  }
}

/** A list needs item or part_number; columns of changes belong to adjustments. */
function checkKeys(
  positions: ReadonlyMap<ListColumn, number>,
  { kind }: ListDeclarations,
  problem: HeaderProblem,
): void {
  if (!positions.has('item') && !positions.has('part_number')) {
    const message = 'The column item is missing. Add it, or a part_number that is unique in the list.';
    problem('missing-column', 'item', null, message);
  }
  for (const column of kind === 'components' ? CHANGE_COLUMNS : []) {
    if (!positions.has(column)) continue;
    const message = `The column ${column} belongs to lists of kind adjustments. Declare the list so, or rename the column.`;
    problem('adjustments-only-column', column, column, message);
  }
}
