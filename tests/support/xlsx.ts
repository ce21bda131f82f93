import { crc32, deflateRawSync } from 'node:zlib';

/* Workbooks made by hand after ECMA-376 part 1 (SpreadsheetML) and the zip APPNOTE, so that tests know every byte of them. */

export interface ZipEntry {
  readonly name: string;
  readonly bytes: Buffer;
  /** Declared instead of the true size. */
  readonly claims?: number;
  readonly encrypted?: boolean;
}

export function zip(entries: readonly ZipEntry[]): Buffer {
  const pieces: Buffer[] = [];
  const directory: Buffer[] = [];
  let at = 0;
  for (const { name, bytes, claims = bytes.length, encrypted = false } of entries) {
    const packed = deflateRawSync(bytes);
    const title = Buffer.from(name);
    const head = Buffer.alloc(30);
    head.writeUInt32LE(0x04034b50, 0);
    head.writeUInt16LE(20, 4);
    head.writeUInt16LE(encrypted ? 1 : 0, 6);
    head.writeUInt16LE(8, 8);
    head.writeUInt32LE(crc32(bytes), 14);
    head.writeUInt32LE(packed.length, 18);
    head.writeUInt32LE(claims, 22);
    head.writeUInt16LE(title.length, 26);
    const central = Buffer.alloc(46);
    central.writeUInt32LE(0x02014b50, 0);
    central.writeUInt16LE(20, 4);
    head.copy(central, 6, 4, 30);
    central.writeUInt32LE(at, 42);
    pieces.push(head, title, packed);
    directory.push(central, title);
    at += 30 + title.length + packed.length;
  }
  const listing = Buffer.concat(directory);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(entries.length, 8);
  end.writeUInt16LE(entries.length, 10);
  end.writeUInt32LE(listing.length, 12);
  end.writeUInt32LE(at, 16);
  return Buffer.concat([...pieces, listing, end]);
}

/** A cell: text, number, or raw XML of a `<c>` with `@` for its address. */
export type TestCell = string | number | null | { readonly xml: string };

export interface TestSheet {
  readonly name: string;
  readonly rows: readonly (readonly TestCell[])[];
  readonly merged?: readonly string[];
}

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>';
const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const RELATIONS = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
/** Style 1 is a date. */
export const DATE_STYLE = 1;

/** An .xlsx workbook with the parts that a spreadsheet writes; `more` adds others or stands in for them by name. */
export function xlsx(sheets: readonly TestSheet[], more: readonly ZipEntry[] = []): Buffer {
  const text = (name: string, xml: string): ZipEntry => ({ name, bytes: Buffer.from(`${HEAD}${xml}`) });
  const ids = sheets.map((_, index) => index + 1);
  const relations = ids
    .map(
      (id) =>
        `<Relationship Id="rId${id}" Type="${RELATIONS}/worksheet" Target="worksheets/sheet${id}.xml"/>`,
    )
    .join('');
  const entries = [
    text(
      '[Content_Types].xml',
      '<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="xml" ContentType="application/xml"/></Types>',
    ),
    text(
      'xl/workbook.xml',
      `<workbook xmlns="${MAIN}" xmlns:r="${RELATIONS}"><sheets>${sheets.map(({ name }, index) => `<sheet name="${escaped(name)}" sheetId="${index + 1}" r:id="rId${index + 1}"/>`).join('')}</sheets></workbook>`,
    ),
    text(
      'xl/_rels/workbook.xml.rels',
      `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${relations}<Relationship Id="rId99" Type="${RELATIONS}/styles" Target="styles.xml"/></Relationships>`,
    ),
    text(
      'xl/styles.xml',
      `<styleSheet xmlns="${MAIN}"><cellStyleXfs count="1"><xf numFmtId="0"/></cellStyleXfs><cellXfs count="2"><xf numFmtId="0" xfId="0"/><xf numFmtId="14" xfId="0" applyNumberFormat="1"/></cellXfs></styleSheet>`,
    ),
    ...sheets.map((sheet, index) => text(`xl/worksheets/sheet${index + 1}.xml`, sheetXml(sheet))),
  ];
  const names = new Set(more.map(({ name }) => name));
  return zip([...entries.filter(({ name }) => !names.has(name)), ...more]);
}

export function sheetXml({ rows, merged = [] }: Omit<TestSheet, 'name'>): string {
  const body = rows
    .map(
      (cells, row) =>
        `<row r="${row + 1}">${cells.map((cell, column) => cellXml(cell, `${String.fromCharCode(65 + column)}${row + 1}`)).join('')}</row>`,
    )
    .join('');
  const blocks =
    merged.length === 0
      ? ''
      : `<mergeCells count="${merged.length}">${merged.map((ref) => `<mergeCell ref="${ref}"/>`).join('')}</mergeCells>`;
  return `<worksheet xmlns="${MAIN}"><sheetData>${body}</sheetData>${blocks}</worksheet>`;
}

function cellXml(cell: TestCell, address: string): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return `<c r="${address}"><v>${cell}</v></c>`;
  if (typeof cell === 'string') return `<c r="${address}" t="inlineStr"><is><t>${escaped(cell)}</t></is></c>`;
  return cell.xml.replace('@', address);
}

function escaped(text: string): string {
  return text.replace(/&/gu, '&amp;').replace(/</gu, '&lt;').replace(/"/gu, '&quot;');
}
