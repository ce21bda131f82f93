import { type MappingCheck } from '@/lib/contracts/list-mapping';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { readMapped } from '@/lib/ingest/mapping/read-mapped';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { mappedRows } from './file-rows';

/** Reads a whole stored file by a mapping and keeps nothing of it: what an import would find. @throws WorkbookRefused */
export async function checkMapping(
  bytes: AsyncIterable<Uint8Array>,
  mapping: Mapping,
  declarations: ListDeclarations,
): Promise<MappingCheck> {
  const rows = await mappedRows(bytes, mapping);
  const reading = await readMapped(rows, mapping, declarations, {
    onComponent: () => undefined,
    acceptTotals: true,
  });
  const sum = (counts: Readonly<Record<string, number>>): number =>
    Object.values(counts).reduce((all, one) => all + one, 0);
  return {
    rows: reading.rows,
    problems: [...reading.problems],
    problemCount: sum(reading.problemCounts),
    leftOut: [...reading.leftOut],
    leftOutCount: sum(reading.leftOutCounts),
    totals: [...reading.totals],
  };
}
