import { type Db } from '@/db/client';
import { type Import } from '@/db/queries/lists';
import { type MassListReading, type MassListOptions, readMassList } from '@/lib/ingest/mass-list';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface FileServices {
  readonly db: Db;
  readonly openObject: (sha256: string) => Promise<AsyncIterable<Uint8Array>>;
}

/** The rows of the file of an import as components, by the mapping that was asked for with it or as the contract says. */
export async function readImport(
  { openObject }: FileServices,
  found: Pick<Import, 'id' | 'file_sha256'>,
  declarations: ListDeclarations,
  options: Pick<MassListOptions, 'onComponent' | 'onProgress'>,
): Promise<Pick<MassListReading, 'problems' | 'problemCounts'>> {
  return readMassList(await openObject(found.file_sha256), declarations, options);
}
