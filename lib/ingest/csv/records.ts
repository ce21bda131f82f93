import { decodeText } from '@/lib/ingest/csv/decode';
import { type Delimiter, headerDelimiter } from '@/lib/ingest/csv/delimiter';
import { type CsvRecord, Splitter } from '@/lib/ingest/csv/splitter';

/** The records that one block of the file completes, blank ones left out; `bytes` is how much has been read. */
export interface CsvBatch {
  readonly records: readonly CsvRecord[];
  readonly delimiter: Delimiter;
  readonly bytes: number;
}

const BLOCK_BYTES = 65_536;

/**
 * CSV bytes (UTF-8, RFC 4180) -> records, in constant memory. The delimiter is found from the header row.
 * Throws a CsvFault where reading cannot go on, after all records before that place; errors of the source pass through.
 */
export async function* readRecords(
  bytes: AsyncIterable<Uint8Array>,
  recordLength: number,
  blockBytes: number = BLOCK_BYTES,
): AsyncGenerator<CsvBatch> {
  let splitter: Splitter | null = null;
  let pending = '';
  let read = 0;

  for await (const piece of decodeText(bytes, blockBytes)) {
    read = piece.bytes;
    pending += piece.text;
    if (splitter === null) {
      const delimiter = headerDelimiter(pending, pending.length > recordLength);
      if (delimiter === null) continue;
      splitter = new Splitter(delimiter, recordLength);
    }
    const { records, rest, fault } = splitter.split(pending, false);
    pending = rest;
    yield { records, delimiter: splitter.delimiter, bytes: read };
    if (fault !== null) throw fault;
  }
  splitter ??= new Splitter(headerDelimiter(pending, true) ?? ',', recordLength);
  const { records, fault } = splitter.split(pending, true);
  yield { records, delimiter: splitter.delimiter, bytes: read };
  if (fault !== null) throw fault;
}
