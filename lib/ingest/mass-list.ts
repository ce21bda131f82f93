import { type IngestLimits } from '@/lib/ingest/limits';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type Problem } from '@/lib/ingest/problem';
import { readMassListBlocks } from '@/lib/ingest/read-blocks';
import { type ColumnMapping } from '@/lib/ingest/table/header';
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
 * Reads a component mass list (contract section 1) in one pass; what stays in memory is its items and group paths.
 *
 * Components are in SI, in the list's own axes, products as positive integrals, uncertainties as one standard deviation, angles
 * in rad. Throws a RangeError when the declarations name no known unit; errors of the byte stream pass through.
 */
export function readMassList(
  bytes: AsyncIterable<Uint8Array>,
  declarations: ListDeclarations,
  { limits, mapping, onComponent, onProgress }: MassListOptions,
): Promise<MassListReading> {
  return readMassListBlocks(bytes, declarations, {
    ...(limits === undefined ? {} : { limits }),
    ...(mapping === undefined ? {} : { mapping }),
    onProgress,
    async onBlock(block) {
      for (let row = 0; row < block.rows; row += 1) {
        const waiting = onComponent(block.component(row), block.lines[row] ?? 0);
        if (waiting !== undefined) await waiting;
      }
    },
  });
}
