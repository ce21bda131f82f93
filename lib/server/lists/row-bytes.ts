import { NO_MATURITY, type RowBlock, type TextColumn, type TextRanges } from '@/lib/ingest/blocks/row-block';
import { CATEGORIES, CHANGE_STATUSES, type Component, MATURITIES } from '@/lib/mass/component';
import { PLACE_COLUMNS, SIGMA_FIELDS, VALUE_COLUMNS } from './row-codec';

const FIELDS = PLACE_COLUMNS.length + VALUE_COLUMNS.length;

/** Where a row's bytes hold the columns that say where it stands, from its beginning; the values follow. */
export const LIST_NO_AT = 6;
export const ROW_NO_AT = 14;
export const SORT_KEY_AT = 22;
export const FINGERPRINT_AT = 34;
export const VALUES_AT = 50;

const HEAD = headOfRow();
const NULL = -1;
const FLOAT_BYTES = 8;
const FLOAT8_OID = 701;
const JSONB_VERSION = 1;
const ASCII = 0x80;

/**
 * Rows one after another as PostgreSQL's binary COPY takes them (PostgreSQL 15, COPY, "Binary Format": a field count, then each field
 * with its length in front, big-endian), columns in the order of PLACE_COLUMNS and VALUE_COLUMNS. The four places are zero until the
 * rows are stored; so they stand in the content hash of format 2.
 */
export class RowBytes {
  bytes: Buffer;
  view: DataView;
  /** End of what is written. */
  end = 0;
  /** Where each row begins. */
  readonly starts: number[] = [];
  /** The group paths of the list whose blocks are added, as they are written. */
  readonly #groups: Uint8Array[] = [];

  constructor(size: number) {
    this.bytes = Buffer.allocUnsafeSlow(size);
    this.view = new DataView(this.bytes.buffer);
  }

  clear(): void {
    this.end = 0;
    this.starts.length = 0;
  }

  /** The bytes of the rows so far, not copied. */
  get written(): Buffer {
    return this.bytes.subarray(0, this.end);
  }

  /** The rows so far, which are no longer this one's; it goes on with `size` bytes of its own. */
  take(size: number): Buffer {
    const { written } = this;
    this.clear();
    this.bytes = Buffer.allocUnsafeSlow(size);
    this.view = new DataView(this.bytes.buffer);
    return written;
  }

  /** Adds bytes as they are and returns where they begin. */
  append(bytes: Buffer, from: number, to: number): number {
    this.#room(to - from);
    const start = this.end;
    bytes.copy(this.bytes, start, from, to);
    this.end += to - from;
    return start;
  }

  /** Adds a row. */
  add(component: Component): void {
    this.#room(HEAD.length);
    this.starts.push(this.end);
    this.bytes.set(HEAD, this.end);
    this.end += HEAD.length;
    this.text(component.item);
    this.text(component.partNumber);
    this.text(component.partRevision);
    this.text(component.description);
    this.text(component.group);
    this.text(component.category);
    this.text(component.parent);
    this.text(component.counting);
    this.integer(component.quantity);
    const { position, moments, orientation, sigma } = component;
    this.float(component.mass);
    this.float(position[0]);
    this.float(position[1]);
    this.float(position[2]);
    this.float(moments.ixx);
    this.float(moments.iyy);
    this.float(moments.izz);
    this.float(moments.ixy);
    this.float(moments.ixz);
    this.float(moments.iyz);
    this.float(orientation.yaw);
    this.float(orientation.pitch);
    this.float(orientation.roll);
    this.flag(component.pair);
    this.text(component.maturity);
    this.float(component.growth);
    this.floats(sigma === null ? null : SIGMA_FIELDS.map((field) => sigma[field]));
    this.text(component.source);
    this.text(component.sourceDate);
    this.text(component.note);
    this.text(component.changeRef);
    this.text(component.status);
    this.json(component.extra);
  }

  /** Adds a row of a block: the same bytes as of its component. */
  addFrom(block: RowBlock, row: number): void {
    const { numbers, texts } = block;
    this.#room(HEAD.length);
    this.starts.push(this.end);
    this.bytes.set(HEAD, this.end);
    this.end += HEAD.length;
    this.#range(block, 'item', texts.item, row);
    this.#range(block, 'part_number', texts.part_number, row);
    this.#range(block, 'part_revision', texts.part_revision, row);
    this.#range(block, 'description', texts.description, row);
    this.#field(this.#groupField(block.groups, block.group[row] ?? 0));
    this.#field(CATEGORY_FIELDS[block.category[row] ?? 0]);
    this.#range(block, 'parent', texts.parent, row);
    this.#field(COUNTING_FIELDS[block.memo[row] ?? 0]);
    this.integer(numbers.quantity[row] ?? NaN);
    this.#number(numbers.mass, row);
    this.#number(numbers.x, row);
    this.#number(numbers.y, row);
    this.#number(numbers.z, row);
    this.#number(numbers.ixx, row);
    this.#number(numbers.iyy, row);
    this.#number(numbers.izz, row);
    this.#number(numbers.ixy, row);
    this.#number(numbers.ixz, row);
    this.#number(numbers.iyz, row);
    this.#number(numbers.yaw, row);
    this.#number(numbers.pitch, row);
    this.#number(numbers.roll, row);
    this.flag(block.pair[row] === 1);
    this.#field(MATURITY_FIELDS[block.maturity[row] ?? NO_MATURITY]);
    this.#number(numbers.growth, row);
    this.floats(
      block.hasSigma[row] === 1
        ? SIGMA_FIELDS.map((field) => numberOf(numbers[`${field}_sigma`][row] ?? NaN))
        : null,
    );
    this.#range(block, 'source', texts.source, row);
    this.#range(block, 'source_date', texts.source_date, row);
    this.#range(block, 'note', texts.note, row);
    this.#range(block, 'change_ref', texts.change_ref, row);
    this.#field(STATUS_FIELDS[block.status[row] ?? 0]);
    if (block.own.length === 0) this.#null();
    else this.json(block.extra(row));
  }

  text(value: string | null): void {
    if (value === null) {
      this.#null();
      return;
    }
    const { length } = value;
    this.#room(4 + 3 * length);
    const { bytes } = this;
    const from = this.end + 4;
    let at = from;
    for (let k = 0; k < length; k += 1) {
      const code = value.charCodeAt(k);
      if (code >= ASCII) {
        at = from + bytes.write(value, from, 'utf8');
        break;
      }
      bytes[at] = code;
      at += 1;
    }
    this.view.setInt32(this.end, at - from);
    this.end = at;
  }

  integer(value: number): void {
    this.#room(8);
    this.view.setInt32(this.end, 4);
    this.view.setInt32(this.end + 4, value);
    this.end += 8;
  }

  /** Zero has one sign, so that equal values have equal bytes. */
  float(value: number | null): void {
    if (value === null) {
      this.#null();
      return;
    }
    this.#room(12);
    this.view.setInt32(this.end, FLOAT_BYTES);
    this.view.setFloat64(this.end + 4, value + 0);
    this.end += 12;
  }

  flag(value: boolean): void {
    this.#room(5);
    this.view.setInt32(this.end, 1);
    this.bytes[this.end + 4] = value ? 1 : 0;
    this.end += 5;
  }

  /** An array of one dimension: dimensions, whether it has nulls, type, length, lower bound, elements. */
  floats(values: readonly (number | null)[] | null): void {
    if (values === null) {
      this.#null();
      return;
    }
    this.#room(24 + values.length * 12);
    const { view, end: start } = this;
    view.setInt32(start + 4, 1);
    view.setInt32(start + 8, values.includes(null) ? 1 : 0);
    view.setInt32(start + 12, FLOAT8_OID);
    view.setInt32(start + 16, values.length);
    view.setInt32(start + 20, 1);
    this.end = start + 24;
    for (const value of values) this.float(value);
    view.setInt32(start, this.end - start - 4);
  }

  /** jsonb, keys in the order of their UTF-16 units; null where there are none. */
  json(extra: Readonly<Record<string, string>>): void {
    const keys = Object.keys(extra);
    if (keys.length === 0) {
      this.#null();
      return;
    }
    const members = keys.sort().map((key) => `${JSON.stringify(key)}:${JSON.stringify(extra[key])}`);
    const start = this.end;
    this.text(` {${members.join(',')}}`);
    this.bytes[start + 4] = JSONB_VERSION;
  }

  /** NaN is no number. */
  #number(column: Float64Array, row: number): void {
    const value = column[row] ?? NaN;
    if (Number.isNaN(value)) {
      this.#null();
      return;
    }
    this.#room(12);
    this.view.setInt32(this.end, FLOAT_BYTES);
    this.view.setFloat64(this.end + 4, value + 0);
    this.end += 12;
  }

  #range(block: RowBlock, column: TextColumn, { start, end }: TextRanges, row: number): void {
    const from = start[row] ?? 0;
    const to = end[row] ?? 0;
    if (to < 0) {
      this.text(block.text(column, row));
      return;
    }
    if (from === to) {
      this.#null();
      return;
    }
    const length = to - from;
    this.#room(4 + length);
    this.view.setInt32(this.end, length);
    const target = this.bytes;
    const source = block.bytes;
    let at = this.end + 4;
    if (length > LONG) {
      target.set(source.subarray(from, to), at);
      at += length;
    } else {
      for (let k = from; k < to; k += 1, at += 1) target[at] = source[k] ?? 0;
    }
    this.end = at;
  }

  /** A field that has been written before, its length in front. */
  #field(field: Uint8Array | undefined): void {
    if (field === undefined) throw new RangeError('a row of a block names no such value');
    this.#room(field.length);
    this.bytes.set(field, this.end);
    this.end += field.length;
  }

  #groupField(groups: readonly string[], index: number): Uint8Array {
    return (this.#groups[index] ??= fieldOf(groups[index] ?? ''));
  }

  #null(): void {
    this.#room(4);
    this.view.setInt32(this.end, NULL);
    this.end += 4;
  }

  #room(bytes: number): void {
    if (this.end + bytes <= this.bytes.length) return;
    const larger = Buffer.allocUnsafeSlow(Math.max(2 * this.bytes.length, this.end + bytes));
    this.bytes.copy(larger, 0, 0, this.end);
    this.bytes = larger;
    this.view = new DataView(larger.buffer);
  }
}

function headOfRow(): Buffer {
  const head = Buffer.alloc(VALUES_AT);
  head.writeInt16BE(FIELDS, 0);
  head.writeInt32BE(4, LIST_NO_AT - 4);
  head.writeInt32BE(4, ROW_NO_AT - 4);
  head.writeInt32BE(8, SORT_KEY_AT - 4);
  head.writeInt32BE(16, FINGERPRINT_AT - 4);
  return head;
}

/** Texts above this length are worth a call. */
const LONG = 48;

const CATEGORY_FIELDS = CATEGORIES.map(fieldOf);
const STATUS_FIELDS = CHANGE_STATUSES.map(fieldOf);
const COUNTING_FIELDS = ['counted', 'memo'].map(fieldOf);
const MATURITY_FIELDS = [...MATURITIES.map(fieldOf), Buffer.from([0xff, 0xff, 0xff, 0xff])];

function fieldOf(text: string): Uint8Array {
  const bytes = new RowBytes(4 + 3 * text.length);
  bytes.text(text);
  return bytes.written;
}

function numberOf(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}
