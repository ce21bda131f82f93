import { readSheet as readCells } from 'read-excel-file/node';
import { type GridCell, type GridRow } from '@/lib/ingest/mapping/grid';
import { WORKBOOK_LIMITS } from './limits';
import { WorkbookRefused } from './refused';
import { fillMerged, mergedRows, tellingSheet } from './sheet-xml';
import { openWorkbook, type WorkbookSheet, xmlOf } from './workbook';
import { zipStored } from './zip';

export interface ReadSheet {
  readonly sheet: string;
  readonly sheets: readonly string[];
  /** Rows that are not blank. */
  readonly rows: readonly GridRow[];
}

/**
 * The rows of a sheet of an .xlsx workbook, the first where none is asked for. Numbers are the stored doubles, dates ISO 8601 text,
 * formulas their stored values; errors and formulas without a value are their own text, so that no number is read of them. The whole
 * workbook is held in memory (WORKBOOK_LIMITS). Throws WorkbookRefused.
 */
export async function readSheet(file: Buffer, wanted: string | null): Promise<ReadSheet> {
  if (file.length > WORKBOOK_LIMITS.bytes) {
    throw new WorkbookRefused(
      'workbook-too-large',
      `The workbook is larger than ${WORKBOOK_LIMITS.bytes / 1024 ** 2} MiB. Save the sheet as CSV and upload that.`,
    );
  }
  const book = openWorkbook(file);
  const sheets = book.sheets.map(({ name }) => name);
  const sheet = wanted === null ? book.sheets[0] : book.sheets.find(({ name }) => name === wanted);
  if (sheet === undefined)
    throw new WorkbookRefused(
      'no-such-sheet',
      `The workbook has no sheet \`${wanted ?? ''}\`. Its sheets are ${sheets.join(', ')}.`,
    );
  const xml = xmlOf(book.read, sheet.part);
  if (xml === null)
    throw new WorkbookRefused(
      'workbook-damaged',
      `The sheet ${sheet.name} is missing in the workbook. Save it again as .xlsx.`,
    );
  const cells = await cellsOf(packed(book.read, sheet, tellingSheet(xml, sheet.name)), sheet.name);
  fillMerged(cells, mergedRows(xml));
  const rows = cells.flatMap((row, index) => {
    const line = { line: index + 1, cells: row.map((cell): GridCell => cell ?? '') };
    return row.some((cell) => cell !== null && cell !== '') ? [line] : [];
  });
  return { sheet: sheet.name, sheets, rows };
}

/** The workbook again with only the parts that the library needs, unpacked within bounds before it sees them. */
function packed(read: (name: string) => Buffer | null, sheet: WorkbookSheet, xml: string): Buffer {
  const relations = xmlOf(read, 'xl/_rels/workbook.xml.rels') ?? '';
  const shared = /Target\s*=\s*"([^"]*sharedStrings[^"]*)"/u.exec(relations)?.[1] ?? 'sharedStrings.xml';
  const styles = /Target\s*=\s*"([^"]*styles[^"]*)"/u.exec(relations)?.[1] ?? 'styles.xml';
  const path = (target: string): string => (target.startsWith('/') ? target.slice(1) : `xl/${target}`);
  const names = ['xl/workbook.xml', 'xl/_rels/workbook.xml.rels', path(shared), path(styles)];
  const parts = [...new Set(names)].flatMap((name) => {
    const text = xmlOf(read, name);
    return text === null ? [] : [{ name, bytes: Buffer.from(text) }];
  });
  return zipStored([...parts, { name: sheet.part, bytes: Buffer.from(xml) }]);
}

async function cellsOf(file: Buffer, sheet: string): Promise<(string | number | null)[][]> {
  try {
    const rows = await readCells(file, sheet, { trim: true });
    return rows.map((row) => row.map(plainCell));
  } catch (error) {
    if (!(error instanceof Error)) throw error;
    throw new WorkbookRefused(
      'workbook-damaged',
      `The sheet ${sheet} cannot be read: ${error.message}. Save the workbook again as .xlsx.`,
      error,
    );
  }
}

function plainCell(cell: unknown): string | number | null {
  if (cell === null || typeof cell === 'string' || typeof cell === 'number') return cell;
  if (typeof cell === 'boolean') return cell ? 'TRUE' : 'FALSE';
  if (cell instanceof Date)
    return cell
      .toISOString()
      .replace(/T00:00:00\.000Z$/u, '')
      .replace(/\.000Z$/u, '');
  throw new TypeError(`a cell of the kind ${typeof cell}`);
}
