import { Cells } from '@/lib/ingest/table/cells';
import { ComponentRows } from '@/lib/ingest/mass-list/component-row';
import { type ColumnMapping, type HeaderProblem, readHeader } from '@/lib/ingest/table/header';
import { ItemTree } from '@/lib/ingest/mass-list/item-tree';
import { type IngestLimits, MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import {
  CHANGE_COLUMNS,
  LIST_COLUMNS,
  type ListColumn,
  NEEDED_COLUMNS,
  listScales,
} from '@/lib/ingest/mass-list/columns';
import { type Problem } from '@/lib/ingest/problem';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { readTable } from '@/lib/ingest/table/read-table';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface MassListOptions {
  readonly limits?: IngestLimits;
  /** Header names of the file (blanks around them aside) -> columns of the contract. */
  readonly mapping?: ColumnMapping<ListColumn>;
  /** Called for every row that is right, with the physical line where it begins; a promise holds the reading back. */
  readonly onComponent: (component: Component, line: number) => void | Promise<void>;
  /** Called after every block: rows and bytes read so far. */
  readonly onProgress?: (progress: { readonly rows: number; readonly bytes: number }) => void;
}

/** A list is right when `problems` is empty; whether to keep anything of a wrong one is the caller's decision. */
export interface MassListReading {
  readonly rows: number;
  /** The first 200, in the order of the file. */
  readonly problems: readonly Problem[];
  /** The number of every kind of problem. */
  readonly problemCounts: Readonly<Record<string, number>>;
  /** Names of the file's own columns, as the file has them; also of a file whose header is not right, so that they can be mapped. */
  readonly unknownColumns: readonly string[];
}

/**
 * Reads a component mass list (contract section 1) in one pass and constant memory but for its item names.
 *
 * Components are in SI, in the list's own axes, products as positive integrals, uncertainties as one standard deviation, angles
 * in rad. Throws a RangeError when the declarations name no known unit; errors of the byte stream pass through.
 */
export async function readMassList(
  bytes: AsyncIterable<Uint8Array>,
  declarations: ListDeclarations,
  { limits = MASS_LIST_LIMITS, mapping = {}, onComponent, onProgress }: MassListOptions,
): Promise<MassListReading> {
  const scales = listScales(declarations);
  const log = new ProblemLog();
  const tree = new ItemTree(log);
  let cells: Cells<ListColumn> | null = null;
  let components: ComponentRows | null = null;
  let key: ListColumn = 'item';
  let unknownColumns: readonly string[] = [];
  let everyRow = true;

  const { rows, whole } = await readTable(bytes, limits, log, {
    header(record, delimiter) {
      const check = (positions: ReadonlyMap<ListColumn, number>, problem: HeaderProblem): void =>
        checkKeys(positions, declarations, problem);
      const { columns: maxColumns, fieldLength } = limits;
      const contract = { columns: LIST_COLUMNS, needed: NEEDED_COLUMNS, mapping, maxColumns, check };
      const header = readHeader(record, contract, log);
      unknownColumns = header.own.map(({ name }) => name);
      key = header.positions.has('item') ? 'item' : 'part_number';
      cells = new Cells(header, log, { decimalComma: delimiter === ';', fieldLength });
      components = new ComponentRows(cells, scales, declarations);
      return log.total === 0;
    },
    row(record) {
      if (cells === null || components === null) return;
      if (!cells.load(record)) {
        everyRow = false;
        return;
      }
      const component = components.read();
      const item = component?.item ?? cells.text(key);
      const fresh = item !== null && tree.add(item, cells.text('parent'), record.line, key);
      if (component !== null && fresh) return onComponent(component, record.line);
    },
    progress: (progress) => onProgress?.(progress),
  });
  (cells as Cells<ListColumn> | null)?.finish();
  // A parent may stand in a row that could not be read.
  if (whole && everyRow) tree.finish();
  return { rows, problems: log.problems(), problemCounts: log.counts(), unknownColumns };
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
