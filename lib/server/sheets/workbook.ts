import { WorkbookRefused } from './refused';
import { ENCRYPTED_WORDS, unpack, type ZipPart, zipParts } from './zip';

export interface WorkbookSheet {
  readonly name: string;
  /** Path of its part. */
  readonly part: string;
}

export interface Workbook {
  readonly sheets: readonly WorkbookSheet[];
  /** Bytes of a part, or null where there is none of that name. */
  readonly read: (name: string) => Buffer | null;
}

const ZIP = Buffer.from('PK\u0003\u0004', 'latin1');
/** A compound file: an old binary workbook, or an encrypted new one within. */
const COMPOUND = Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]);

/** Whether a file is a workbook of any kind, by its first bytes. */
export function isWorkbook(start: Buffer): boolean {
  return start.subarray(0, 4).equals(ZIP) || start.subarray(0, 8).equals(COMPOUND);
}

/** Opens an .xlsx file. Throws WorkbookRefused for anything else, and for encrypted ones and such as carry macros. */
export function openWorkbook(file: Buffer): Workbook {
  if (file.subarray(0, 8).equals(COMPOUND)) throw compound(file);
  const parts = new Map<string, ZipPart>(zipParts(file).map((part) => [part.name, part]));
  for (const name of parts.keys()) {
    if (/(?:^|\/)vbaProject\.bin$|\/macrosheets\//iu.test(name)) throw macros();
  }
  const read = (name: string): Buffer | null => {
    const part = parts.get(name);
    return part === undefined ? null : unpack(file, part);
  };
  if (/macroEnabled/iu.test(xmlOf(read, '[Content_Types].xml') ?? '')) throw macros();
  const book = xmlOf(read, 'xl/workbook.xml');
  if (book === null) throw otherKind(parts);
  return { sheets: sheetsOf(book, xmlOf(read, 'xl/_rels/workbook.xml.rels') ?? ''), read };
}

/** The text of an XML part. Throws for such as bring definitions of their own, which may unfold without end. */
export function xmlOf(read: Workbook['read'], name: string): string | null {
  const bytes = read(name);
  if (bytes === null) return null;
  if (bytes[0] === 0xff || bytes[0] === 0xfe) throw unusual('is not in UTF-8');
  const text = bytes.toString('utf8');
  if (/<!(?:DOCTYPE|ENTITY)/iu.test(text)) throw unusual('defines names of its own');
  return text;
}

export function unescapeXml(text: string): string {
  const named: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };
  return text.replace(
    /&(?:#(\d+)|#x([0-9a-f]+)|(\w+));/giu,
    (whole, decimal?: string, hex?: string, name?: string) => {
      if (name !== undefined) return named[name] ?? whole;
      const code = decimal === undefined ? Number.parseInt(hex ?? '', 16) : Number(decimal);
      return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
    },
  );
}

function sheetsOf(book: string, relations: string): WorkbookSheet[] {
  const targets = new Map<string, string>();
  for (const [tag] of relations.matchAll(/<(?:\w+:)?Relationship\b[^>]*>/gu)) {
    if (attribute(tag, 'Type')?.endsWith('/worksheet') !== true) continue;
    const target = attribute(tag, 'Target') ?? '';
    targets.set(attribute(tag, 'Id') ?? '', target.startsWith('/') ? target.slice(1) : `xl/${target}`);
  }
  const sheets: WorkbookSheet[] = [];
  for (const [tag] of book.matchAll(/<(?:\w+:)?sheet\b[^>]*>/gu)) {
    const part = targets.get(attribute(tag, '(?:\\w+:)?id') ?? '');
    const name = attribute(tag, 'name');
    if (part !== undefined && name !== null) sheets.push({ name, part });
  }
  if (sheets.length === 0) throw new WorkbookRefused('workbook-empty', 'The workbook has no sheet of cells.');
  return sheets;
}

function attribute(tag: string, name: string): string | null {
  const found = new RegExp(`\\s${name}\\s*=\\s*(?:"([^"]*)"|'([^']*)')`, 'u').exec(tag);
  return found === null ? null : unescapeXml(found[1] ?? found[2] ?? '');
}

function compound(file: Buffer): WorkbookRefused {
  const within = file.includes(Buffer.from('EncryptedPackage', 'utf16le'));
  if (within) return new WorkbookRefused('workbook-encrypted', ENCRYPTED_WORDS);
  return new WorkbookRefused(
    'workbook-old',
    'This is an old binary workbook (.xls). Save it as .xlsx or as CSV and upload that.',
  );
}

function macros(): WorkbookRefused {
  return new WorkbookRefused(
    'workbook-macros',
    'The workbook carries macros. Save it as .xlsx, without macros, and upload that.',
  );
}

function otherKind(parts: ReadonlyMap<string, ZipPart>): WorkbookRefused {
  if (parts.has('xl/workbook.bin'))
    return new WorkbookRefused(
      'workbook-binary',
      'This is a binary workbook (.xlsb). Save it as .xlsx or as CSV and upload that.',
    );
  return new WorkbookRefused(
    'not-a-workbook',
    'The file is an archive and no .xlsx workbook. Save the sheet as .xlsx or as CSV and upload that.',
  );
}

function unusual(what: string): WorkbookRefused {
  return new WorkbookRefused(
    'workbook-unusual',
    `A part of the workbook ${what}, as no spreadsheet writes it. Save it again as .xlsx or as CSV and upload that.`,
  );
}
