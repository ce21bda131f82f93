import { type Db } from '@/db/client';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { type GridRow } from '@/lib/ingest/mapping/grid';
import { type Mapping, positionOf } from '@/lib/ingest/mapping/mapping';
import { RowKinds } from '@/lib/ingest/mapping/row-kind';
import { LIST_COLUMNS, type ListColumn } from '@/lib/ingest/mass-list/columns';
import { sampleOf } from './file-rows';
import { type Remembered, rememberedFor } from './remembered';

/** How a stored file is to be read: as the contract says, by what its list remembers, or by a mapping that a person must make. */
export type FileWay =
  | { readonly way: 'contract' }
  | { readonly way: 'remembered'; readonly remembered: Remembered }
  | { readonly way: 'unmapped' };

/** The end of a longer text is not looked at before its import. */
const WHOLE_BYTES = 16 * 1024 ** 2;
const NEEDED: readonly ListColumn[] = ['mass', 'x', 'y', 'z'];

/**
 * Looks at a stored file. One that cannot be read at all goes the contract's way, whose import names what is wrong in it.
 * @throws WorkbookRefused
 */
export async function wayOf(
  db: Db,
  listId: string,
  file: { readonly open: () => Promise<AsyncIterable<Uint8Array>>; readonly bytes: number },
): Promise<FileWay> {
  try {
    const sample = await sampleOf(await file.open(), null, file.bytes > WHOLE_BYTES);
    const first = sample.head[0];
    if (
      sample.sheet === null &&
      (first === undefined || isContract(first, [...sample.head.slice(1), ...sample.tail]))
    )
      return { way: 'contract' };
    const remembered = await rememberedFor(db, listId, sample);
    return remembered === null ? { way: 'unmapped' } : { way: 'remembered', remembered };
  } catch (error) {
    if (error instanceof CsvFault) return { way: 'contract' };
    throw error;
  }
}

/** The contract's own headings, and no totals row at the end that would be counted as a component. */
function isContract(header: GridRow, rows: readonly GridRow[]): boolean {
  const columns: Mapping['columns'] = header.cells.map((cell) => {
    const heading = String(cell).trim();
    const column = LIST_COLUMNS.find((one) => one === heading.toLowerCase());
    return { heading, to: column === undefined ? { use: 'extra' } : { use: 'column', column, unit: null } };
  });
  const has = (column: ListColumn): boolean => positionOf(columns, column) !== -1;
  if (!NEEDED.every(has) || !(has('item') || has('part_number'))) return false;
  const kinds = new RowKinds({ columns });
  return rows.every((row) => kinds.kindOf(row) !== 'total');
}
