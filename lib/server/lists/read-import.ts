import { type Db } from '@/db/client';
import { type Import } from '@/db/queries/lists';
import { mappingOfImport } from '@/db/queries/mappings';
import { type MassListReading, type MassListOptions } from '@/lib/ingest/mass-list';
import { type MappedReading, readMapped } from '@/lib/ingest/mapping/read-mapped';
import { type MassListBlockOptions, readMassListBlocks } from '@/lib/ingest/read-blocks';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { WorkbookRefused } from '@/lib/server/sheets/refused';
import { mappedRows } from './mapping/file-rows';

export interface FileServices {
  readonly db: Db;
  readonly openObject: (sha256: string) => Promise<AsyncIterable<Uint8Array>>;
}

type Callbacks = Pick<MassListOptions, 'onComponent' | 'onProgress'> & Pick<MassListBlockOptions, 'onBlock'>;
type Reading = Pick<MassListReading, 'problems' | 'problemCounts'>;

/**
 * The rows of the file of an import: as components, by the mapping that was asked for with it, or in blocks, as the contract says.
 */
export async function readImport(
  { db, openObject }: FileServices,
  found: Pick<Import, 'id' | 'file_sha256'>,
  declarations: ListDeclarations,
  { onBlock, ...options }: Callbacks,
): Promise<Reading> {
  const mapped = await mappingOfImport(db, found.id);
  const bytes = await openObject(found.file_sha256);
  if (mapped === undefined)
    return readMassListBlocks(bytes, declarations, { onBlock, onProgress: options.onProgress });
  try {
    const rows = await mappedRows(bytes, mapped.mapping);
    const reading = await readMapped(rows, mapped.mapping, declarations, {
      ...options,
      acceptTotals: mapped.accept_totals,
    });
    if (reading.problems.length === 0) await keepReading(db, found.id, reading);
    return reading;
  } catch (error) {
    if (!(error instanceof WorkbookRefused)) throw error;
    const problem = { kind: error.kind, line: null, column: null, found: null, message: error.message };
    return { problems: [problem], problemCounts: { [error.kind]: 1 } };
  }
}

/** The same file by the same mapping gives the same again, so that a second run of a job finds it kept. */
async function keepReading(
  db: Db,
  importId: string,
  { leftOut, leftOutCounts, totals }: MappedReading,
): Promise<void> {
  await db
    .insertInto('import_readings')
    .values({
      import_id: importId,
      left_out: JSON.stringify({ rows: leftOut, counts: leftOutCounts }),
      totals: JSON.stringify(totals),
    })
    .onConflict((conflict) => conflict.column('import_id').doNothing())
    .execute();
}
