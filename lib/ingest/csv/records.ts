import { type TextStart, decodeText } from '@/lib/ingest/csv/decode';
import { type Delimiter, headerDelimiter } from '@/lib/ingest/csv/delimiter';
import { type CsvRecord, Splitter } from '@/lib/ingest/csv/splitter';

/** The records that one block of the file completes, blank ones left out; `bytes` is how much has been read. */
export interface CsvBatch {
  readonly records: readonly CsvRecord[];
  readonly delimiter: Delimiter;
  readonly bytes: number;
}

const BLOCK_BYTES = 65_536;

/** Where a reading begins that is not at the beginning of a file: at a record, its delimiter known. */
export interface RecordsStart extends TextStart {
  readonly delimiter: Delimiter;
}

/**
 * CSV bytes (UTF-8, RFC 4180) -> records, in constant memory. The delimiter is found from the header row, or known by `from`.
 * Throws a CsvFault where reading cannot go on, after all records before that place; errors of the source pass through.
 */
export async function* readRecords(
  bytes: AsyncIterable<Uint8Array>,
  recordLength: number,
  blockBytes: number = BLOCK_BYTES,
  from: RecordsStart | null = null,
): AsyncGenerator<CsvBatch> {
  let splitter = from === null ? null : new Splitter(from.delimiter, recordLength, from.line);
  let pending = '';
  let read = from?.bytes ?? 0;

  for await (const piece of decodeText(bytes, blockBytes, from)) {
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
