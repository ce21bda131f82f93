import { CsvFault } from '@/lib/ingest/csv/fault';
import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { type CsvBatch, readRecords } from '@/lib/ingest/csv/records';
import { type CsvRecord } from '@/lib/ingest/csv/splitter';
import { type IngestLimits } from '@/lib/ingest/limits';
import { type ProblemLog } from '@/lib/ingest/problem-log';

/** What a file's reader does with its header and rows. */
export interface TableReader {
  /** False ends the reading: its problems are in the log. */
  header(record: CsvRecord, delimiter: Delimiter): boolean;
  row(record: CsvRecord): void | Promise<void>;
  progress?(progress: { readonly rows: number; readonly bytes: number }): void;
}

/**
 * Runs through a CSV file once, a row at a time; a row's promise is awaited before the next.
 * Returns the number of rows and whether the file was read to its end.
 * Faults of the file go to the log; errors of the source and of the reader pass through.
 */
export async function readTable(
  bytes: AsyncIterable<Uint8Array>,
  limits: IngestLimits,
  log: ProblemLog,
  reader: TableReader,
): Promise<{ readonly rows: number; readonly whole: boolean }> {
  let rows = 0;
  let header = false;
  const take = async ({ records, delimiter }: CsvBatch): Promise<boolean> => {
    for (const record of records) {
      if (!header) {
        if (!reader.header(record, delimiter)) return false;
        header = true;
        continue;
      }
      if (rows === limits.rows) throw tooManyRows(record.line, limits.rows);
      rows += 1;
      const waiting = reader.row(record);
      if (waiting !== undefined) await waiting;
    }
    return true;
  };

  try {
    for await (const batch of readRecords(bytes, limits.recordLength)) {
      if (!(await take(batch))) return { rows, whole: false };
      reader.progress?.({ rows, bytes: batch.bytes });
    }
  } catch (error) {
    if (!(error instanceof CsvFault)) throw error;
    log.add(error.problem);
    return { rows, whole: false };
  }
  refuseEmpty(log, header, rows);
  return { rows, whole: true };
}

/** To be called at the end of a file: logs a missing header and missing rows. */
export function refuseEmpty(log: ProblemLog, header: boolean, rows: number): void {
  if (!header)
    log.add(fileProblem('empty-file', 'The file is empty. It needs a header row and at least one row.'));
  else if (rows === 0) log.add(fileProblem('no-rows', 'The file has a header row and no rows.'));
}

export function tooManyRows(line: number, rows: number): CsvFault {
  const message = `The file has more than ${rows} rows. Split it into several lists.`;
  return new CsvFault({ kind: 'too-many-rows', line, column: null, found: null, message });
}

function fileProblem(kind: string, message: string): CsvFault['problem'] {
  return { kind, line: null, column: null, found: null, message };
}
