import { crc32, inflateRawSync } from 'node:zlib';
import { WorkbookRefused } from './refused';
import { WORKBOOK_LIMITS } from './limits';

/*
 * The parts of a zip archive by its central directory (PKWARE APPNOTE 6.3, sections 4.3.7, 4.3.12 and 4.3.16), refused before a
 * byte is unpacked when what it declares is out of bounds, and unpacked into no more than it declares.
 */

export interface ZipPart {
  readonly name: string;
  readonly method: number;
  readonly packed: number;
  readonly unpacked: number;
  readonly crc: number;
  /** Of its local header. */
  readonly at: number;
}

const END = 0x06054b50;
const CENTRAL = 0x02014b50;
const LOCAL = 0x04034b50;
const END_LENGTH = 22;
const LONGEST_COMMENT = 65_535;
const ENCRYPTED = 0x1;
const STORED = 0;
const DEFLATED = 8;
/** A size of this value stands elsewhere (zip64), which no workbook within the limits needs. */
const ELSEWHERE = 0xffffffff;
const RATIO_FROM = 1024 ** 2;

/** The parts that an archive declares. Throws WorkbookRefused for what is no zip archive, encrypted, or out of bounds. */
export function zipParts(file: Buffer): ZipPart[] {
  const end = endRecord(file);
  const count = file.readUInt16LE(end + 10);
  if (count > WORKBOOK_LIMITS.parts)
    throw tooLarge(`it has ${count} parts; at most ${WORKBOOK_LIMITS.parts} are read`);
  const parts: ZipPart[] = [];
  let at = file.readUInt32LE(end + 16);
  for (let k = 0; k < count; k += 1) {
    if (at + 46 > end || file.readUInt32LE(at) !== CENTRAL) throw damaged();
    const [nameLength, extraLength, commentLength] = [
      file.readUInt16LE(at + 28),
      file.readUInt16LE(at + 30),
      file.readUInt16LE(at + 32),
    ];
    if (at + 46 + nameLength > end) throw damaged();
    const name = file.toString('utf8', at + 46, at + 46 + nameLength);
    if ((file.readUInt16LE(at + 8) & ENCRYPTED) !== 0)
      throw new WorkbookRefused('workbook-encrypted', ENCRYPTED_WORDS);
    parts.push({
      name,
      method: file.readUInt16LE(at + 10),
      crc: file.readUInt32LE(at + 16),
      packed: file.readUInt32LE(at + 20),
      unpacked: file.readUInt32LE(at + 24),
      at: file.readUInt32LE(at + 42),
    });
    at += 46 + nameLength + extraLength + commentLength;
  }
  checkSizes(parts);
  return parts;
}

export const ENCRYPTED_WORDS =
  'The workbook is protected by a password. Save it without one and upload it again.';

/** The bytes of a part, checked against its size and its checksum. */
export function unpack(file: Buffer, part: ZipPart): Buffer {
  if (part.at + 30 > file.length || file.readUInt32LE(part.at) !== LOCAL) throw damaged();
  const from = part.at + 30 + file.readUInt16LE(part.at + 26) + file.readUInt16LE(part.at + 28);
  const packed = file.subarray(from, from + part.packed);
  if (packed.length !== part.packed) throw damaged();
  const bytes = part.method === STORED ? packed : inflated(packed, part);
  if (bytes.length !== part.unpacked || crc32(bytes) !== part.crc) throw damaged();
  return bytes;
}

function inflated(packed: Buffer, { method, unpacked }: ZipPart): Buffer {
  if (method !== DEFLATED) throw damaged();
  try {
    return inflateRawSync(packed, { maxOutputLength: Math.max(1, unpacked) });
  } catch (error) {
    if (error instanceof RangeError) throw tooLarge('a part of it unpacks into more than it declares', error);
    throw damaged(error);
  }
}

/** An archive of the same parts, stored as they are. */
export function zipStored(parts: readonly { readonly name: string; readonly bytes: Buffer }[]): Buffer {
  const pieces: Buffer[] = [];
  const directory: Buffer[] = [];
  let at = 0;
  for (const { name, bytes } of parts) {
    const title = Buffer.from(name);
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt32LE(crc32(bytes), 10);
    common.writeUInt32LE(bytes.length, 14);
    common.writeUInt32LE(bytes.length, 18);
    common.writeUInt16LE(title.length, 22);
    const local = Buffer.concat([word(LOCAL), common, title]);
    const central = Buffer.concat([
      word(CENTRAL),
      Buffer.from([20, 0]),
      common,
      Buffer.alloc(10),
      word(at),
      title,
    ]);
    pieces.push(local, bytes);
    directory.push(central);
    at += local.length + bytes.length;
  }
  const size = directory.reduce((sum, { length }) => sum + length, 0);
  const end = Buffer.alloc(END_LENGTH);
  end.writeUInt32LE(END, 0);
  end.writeUInt16LE(parts.length, 8);
  end.writeUInt16LE(parts.length, 10);
  end.writeUInt32LE(size, 12);
  end.writeUInt32LE(at, 16);
  return Buffer.concat([...pieces, ...directory, end]);
}

function word(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(value);
  return bytes;
}

function endRecord(file: Buffer): number {
  const lowest = Math.max(0, file.length - END_LENGTH - LONGEST_COMMENT);
  for (let at = file.length - END_LENGTH; at >= lowest; at -= 1) {
    if (file.readUInt32LE(at) === END) return at;
  }
  throw damaged();
}

function checkSizes(parts: readonly ZipPart[]): void {
  let total = 0;
  for (const { name, packed, unpacked } of parts) {
    if (packed === ELSEWHERE || unpacked === ELSEWHERE) throw tooLarge('a part of it is larger than 4 GiB');
    total += unpacked;
    if (unpacked > RATIO_FROM && unpacked > packed * WORKBOOK_LIMITS.ratio) {
      throw tooLarge(
        `its part ${name} would unpack to ${Math.round(unpacked / Math.max(1, packed))} times its size`,
      );
    }
  }
  if (total > WORKBOOK_LIMITS.unpackedBytes)
    throw tooLarge(
      `it would unpack to ${Math.ceil(total / 1024 ** 2)} MiB; at most ${WORKBOOK_LIMITS.unpackedBytes / 1024 ** 2} MiB are read`,
    );
}

function tooLarge(why: string, cause?: unknown): WorkbookRefused {
  return new WorkbookRefused(
    'workbook-too-large',
    `The workbook is not read: ${why}. Save the sheet as CSV and upload that.`,
    cause,
  );
}

function damaged(cause?: unknown): WorkbookRefused {
  return new WorkbookRefused(
    'workbook-damaged',
    'The workbook is damaged or is none: it cannot be unpacked. Save it again as .xlsx and upload that.',
    cause,
  );
}
