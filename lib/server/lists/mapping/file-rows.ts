import { csvGridRows, sampleRows } from '@/lib/ingest/mapping/csv-rows';
import { type FileSample, type GridRow } from '@/lib/ingest/mapping/grid';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { WORKBOOK_LIMITS } from '@/lib/server/sheets/limits';
import { readSheet } from '@/lib/server/sheets/read-sheet';
import { WorkbookRefused } from '@/lib/server/sheets/refused';
import { isWorkbook } from '@/lib/server/sheets/workbook';

type Bytes = AsyncIterable<Uint8Array>;

/** The rows of a stored file that a mapping is for. Throws WorkbookRefused or, while it is read, CsvFault. */
export async function mappedRows(
  bytes: Bytes,
  { delimiter, sheet }: Pick<Mapping, 'delimiter' | 'sheet'>,
): Promise<AsyncIterable<GridRow>> {
  if (sheet === null) return csvGridRows(bytes, delimiter);
  const { rows } = await readSheet(await whole(bytes), sheet);
  return given(rows);
}

/**
 * What is seen of a stored file, of a workbook one sheet, the first unless said. `headOnly` leaves the rest of a text unread, so that
 * it has no tail. Throws WorkbookRefused or CsvFault.
 */
export async function sampleOf(bytes: Bytes, wanted: string | null, headOnly = false): Promise<FileSample> {
  const { start, all } = await peek(bytes);
  if (!isWorkbook(start)) {
    let delimiter: FileSample['delimiter'] = null;
    const sample = await sampleRows(
      csvGridRows(all, null, (found) => (delimiter = found)),
      headOnly,
    );
    return { ...sample, delimiter, sheet: null, sheets: [] };
  }
  const { sheet, sheets, rows } = await readSheet(await whole(all), wanted);
  return { ...(await sampleRows(given(rows))), delimiter: null, sheet, sheets };
}

/** The first bytes of a stream, and all of it. */
export async function peek(bytes: Bytes): Promise<{ start: Buffer; all: Bytes }> {
  const source = bytes[Symbol.asyncIterator]();
  const read: Uint8Array[] = [];
  let length = 0;
  while (length < 8) {
    const next = await source.next();
    if (next.done === true) break;
    read.push(next.value);
    length += next.value.length;
  }
  async function* all(): AsyncGenerator<Uint8Array> {
    try {
      yield* read;
      for (;;) {
        const next = await source.next();
        if (next.done === true) return;
        yield next.value;
      }
    } finally {
      await source.return?.();
    }
  }
  return { start: Buffer.concat(read), all: all() };
}

/** A workbook is read in memory; one beyond the limit is refused once that many bytes have come. */
async function whole(bytes: Bytes): Promise<Buffer> {
  const pieces: Uint8Array[] = [];
  let length = 0;
  for await (const piece of bytes) {
    length += piece.length;
    if (length > WORKBOOK_LIMITS.bytes) {
      const message = `The workbook is larger than ${WORKBOOK_LIMITS.bytes / 1024 ** 2} MiB. Save the sheet as CSV and upload that.`;
      throw new WorkbookRefused('workbook-too-large', message);
    }
    pieces.push(piece);
  }
  return Buffer.concat(pieces);
}

// The rows are at hand; what reads them takes them as they come.
async function* given(rows: readonly GridRow[]): AsyncGenerator<GridRow> {
  yield* rows;
  await Promise.resolve();
}
