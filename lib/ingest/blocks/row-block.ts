import { restoreFormula } from '@/lib/export/formula-text';
import {
  ANGLES,
  type AngleName,
  MOMENTS,
  PLACES,
  VALUES,
  type ValueName,
} from '@/lib/ingest/mass-list/columns';
import {
  CATEGORIES,
  CHANGE_STATUSES,
  type Component,
  type ComponentSigma,
  MATURITIES,
} from '@/lib/mass/component';

/** Rows of a block at most. */
export const BLOCK_ROWS = 256;

export type NumberColumn = 'quantity' | ValueName | AngleName | 'growth' | `${ValueName}_sigma`;

export const NUMBER_COLUMNS: readonly NumberColumn[] = [
  'quantity',
  ...VALUES,
  ...ANGLES,
  'growth',
  ...VALUES.map((value) => `${value}_sigma` as const),
];

export type TextColumn =
  | 'item'
  | 'part_number'
  | 'part_revision'
  | 'description'
  | 'parent'
  | 'source'
  | 'source_date'
  | 'note'
  | 'change_ref';

export const TEXT_COLUMNS: readonly TextColumn[] = [
  'item',
  'part_number',
  'part_revision',
  'description',
  'parent',
  'source',
  'source_date',
  'note',
  'change_ref',
];

/** What a row without maturity has for it. */
export const NO_MATURITY = MATURITIES.length;

/**
 * Where a text of each row stands in `RowBlock.bytes`. An empty range is no text. A negative end means that the text is not the very
 * bytes (blanks around it, doubled quotes, a guarded formula): then it ends at ~end, and only `RowBlock.text` reads it.
 */
export interface TextRanges {
  readonly start: Int32Array;
  readonly end: Int32Array;
}

/** A column that the contract does not know, as the file has it. */
export interface OwnColumn {
  readonly name: string;
  readonly ranges: TextRanges;
}

const newRanges = (): TextRanges => ({ start: new Int32Array(BLOCK_ROWS), end: new Int32Array(BLOCK_ROWS) });

/** Columns that a blank or missing field leaves without a number, NaN here; a quantity is 1 then, the others 0. */
function isOptional(column: NumberColumn): boolean {
  return column === 'growth' || column.endsWith('_sigma');
}

/** What a column holds where the file says nothing. */
export function blankValue(column: NumberColumn): number {
  if (column === 'quantity') return 1;
  return isOptional(column) ? NaN : 0;
}

/**
 * Rows of a mass list by column, right ones only and in the order of the file. Everything in it is used again for the next block, so
 * that nothing of it may be kept; `component` makes an object that may.
 *
 * Numbers are what `Component` holds: SI, list axes, products as positive integrals, angles in rad, growth as a fraction.
 */
export class RowBlock {
  /** Rows in use. */
  rows = 0;
  /** False where the list has no column of parents. */
  hasParents = true;
  /** Right rows of the list before this block. */
  first = 0;
  /** UTF-8; what the ranges of texts point into. */
  bytes: Uint8Array = new Uint8Array(0);
  /** Physical line where each row begins. */
  readonly lines = new Uint32Array(BLOCK_ROWS);
  readonly numbers: Readonly<Record<NumberColumn, Float64Array>>;
  /** The same numbers in one piece, `BLOCK_ROWS` of each column, in the order of `NUMBER_COLUMNS`. */
  readonly values = new Float64Array(BLOCK_ROWS * NUMBER_COLUMNS.length);
  /** Indices into `groups`, `CATEGORIES`, `MATURITIES` (or `NO_MATURITY`) and `CHANGE_STATUSES`. */
  readonly group = new Int32Array(BLOCK_ROWS);
  readonly category = new Uint8Array(BLOCK_ROWS);
  readonly maturity = new Uint8Array(BLOCK_ROWS).fill(NO_MATURITY);
  readonly status = new Uint8Array(BLOCK_ROWS);
  /** 1 for a memo row, 1 for a pair. */
  readonly memo = new Uint8Array(BLOCK_ROWS);
  readonly pair = new Uint8Array(BLOCK_ROWS);
  /** 1 where a row has an own moment or product that is not zero; 1 where it states a σ. */
  readonly hasMoments = new Uint8Array(BLOCK_ROWS);
  readonly hasSigma = new Uint8Array(BLOCK_ROWS);
  readonly texts: Readonly<Record<TextColumn, TextRanges>>;
  own: readonly OwnColumn[] = [];

  /** `groups` grows as group paths are met: all of the list so far. */
  constructor(readonly groups: readonly string[]) {
    this.numbers = byName(NUMBER_COLUMNS, (column) => {
      const from = BLOCK_ROWS * NUMBER_COLUMNS.indexOf(column);
      return this.values.subarray(from, from + BLOCK_ROWS).fill(blankValue(column));
    });
    this.texts = byName(TEXT_COLUMNS, newRanges);
  }

  /** To be called once, when the header is known. */
  setOwnColumns(names: readonly string[]): void {
    this.own = names.map((name) => ({ name, ranges: newRanges() }));
  }

  /**
   * Takes a row that was read as an object, after the others. Its texts go into `bytes` from `free` on; returns where they end.
   * `group` is the number of its group path.
   */
  put(component: Component, line: number, group: number, free: number): number {
    const { numbers, texts, rows: row } = this;
    const { position, moments, orientation, growth, sigma } = component;
    const set = (column: NumberColumn, value: number): void => {
      numbers[column][row] = value;
    };
    set('quantity', component.quantity);
    set('mass', component.mass);
    PLACES.forEach((place, k) => set(place, position[k] ?? NaN));
    for (const moment of MOMENTS) set(moment, moments[moment]);
    for (const angle of ANGLES) set(angle, orientation[angle]);
    set('growth', growth ?? NaN);
    for (const value of VALUES) set(`${value}_sigma`, sigma?.[value] ?? NaN);
    this.group[row] = group;
    this.category[row] = CATEGORIES.indexOf(component.category);
    this.maturity[row] = component.maturity === null ? NO_MATURITY : MATURITIES.indexOf(component.maturity);
    this.status[row] = CHANGE_STATUSES.indexOf(component.status);
    this.memo[row] = component.counting === 'memo' ? 1 : 0;
    this.pair[row] = component.pair ? 1 : 0;
    this.hasMoments[row] = MOMENTS.some((moment) => moments[moment] !== 0) ? 1 : 0;
    this.hasSigma[row] = sigma === null ? 0 : 1;
    this.lines[row] = line;
    let at = free;
    const write = ({ start, end }: TextRanges, text: string | null): void => {
      start[row] = at;
      at += text === null ? 0 : encoder.encodeInto(text, this.bytes.subarray(at)).written;
      end[row] = at;
    };
    write(texts.item, component.item);
    write(texts.part_number, component.partNumber);
    write(texts.part_revision, component.partRevision);
    write(texts.description, component.description);
    write(texts.parent, component.parent);
    write(texts.source, component.source);
    write(texts.source_date, component.sourceDate);
    write(texts.note, component.note);
    write(texts.change_ref, component.changeRef);
    for (const { name, ranges } of this.own) write(ranges, component.extra[name] ?? null);
    this.rows += 1;
    return at;
  }

  /** Puts the row `from` in the place of the row `to`. */
  move(from: number, to: number): void {
    const { lines, group, category, maturity, status, memo, pair, hasMoments, hasSigma, numbers, texts } =
      this;
    const columns = [lines, group, category, maturity, status, memo, pair, hasMoments, hasSigma];
    const ranges = [...Object.values(texts), ...this.own.map((own) => own.ranges)];
    for (const column of [...columns, ...Object.values(numbers)]) column.copyWithin(to, from, from + 1);
    for (const { start, end } of ranges) {
      start.copyWithin(to, from, from + 1);
      end.copyWithin(to, from, from + 1);
    }
  }

  /** Trimmed, null where there is none. */
  text(column: TextColumn, row: number): string | null {
    const { start, end } = this.texts[column];
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    if (to >= 0) return from === to ? null : decoder.decode(this.bytes.subarray(from, to));
    const text = fieldText(this.bytes, from, ~to).trim();
    return text === '' ? null : restoreFormula(text);
  }

  /** The same in UTF-8, empty where there is none; good as long as the block is. */
  textBytes(column: TextColumn, row: number): Uint8Array {
    const { start, end } = this.texts[column];
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    return to >= 0 ? this.bytes.subarray(from, to) : encoder.encode(this.text(column, row) ?? '');
  }

  /** The row as an object. */
  component(row: number): Component {
    const { numbers } = this;
    const at = (column: NumberColumn): number => numbers[column][row] ?? NaN;
    const growth = at('growth');
    return {
      item: this.text('item', row) ?? '',
      partNumber: this.text('part_number', row),
      partRevision: this.text('part_revision', row),
      description: this.text('description', row),
      group: this.groups[this.group[row] ?? 0] ?? '',
      category: CATEGORIES[this.category[row] ?? 0] ?? 'empty',
      parent: this.text('parent', row),
      counting: this.memo[row] === 1 ? 'memo' : 'counted',
      quantity: at('quantity'),
      mass: at('mass'),
      position: [at('x'), at('y'), at('z')],
      moments: {
        ixx: at('ixx'),
        iyy: at('iyy'),
        izz: at('izz'),
        ixy: at('ixy'),
        ixz: at('ixz'),
        iyz: at('iyz'),
      },
      orientation: { yaw: at('yaw'), pitch: at('pitch'), roll: at('roll') },
      pair: this.pair[row] === 1,
      maturity: MATURITIES[this.maturity[row] ?? NO_MATURITY] ?? null,
      growth: Number.isNaN(growth) ? null : growth,
      sigma: this.hasSigma[row] === 1 ? this.sigma(row) : null,
      source: this.text('source', row),
      sourceDate: this.text('source_date', row),
      note: this.text('note', row),
      changeRef: this.text('change_ref', row),
      status: CHANGE_STATUSES[this.status[row] ?? 0] ?? 'approved',
      extra: this.extra(row),
    };
  }

  private sigma(row: number): ComponentSigma {
    const of = (value: ValueName): number | null => {
      const sigma = this.numbers[`${value}_sigma`][row] ?? NaN;
      return Number.isNaN(sigma) ? null : sigma;
    };
    return {
      mass: of('mass'),
      x: of('x'),
      y: of('y'),
      z: of('z'),
      ixx: of('ixx'),
      iyy: of('iyy'),
      izz: of('izz'),
      ixy: of('ixy'),
      ixz: of('ixz'),
      iyz: of('iyz'),
    };
  }

  /** The file's own columns that hold anything in this row, as the file has them. */
  extra(row: number): Record<string, string> {
    if (this.own.length === 0) return {};
    const pairs: [string, string][] = [];
    for (const { name, ranges } of this.own) {
      const [from, to] = [ranges.start[row] ?? 0, ranges.end[row] ?? 0];
      if (from === to) continue;
      if (to >= 0) pairs.push([name, decoder.decode(this.bytes.subarray(from, to))]);
      else {
        const text = fieldText(this.bytes, from, ~to);
        if (text.trim() !== '') pairs.push([name, restoreFormula(text)]);
      }
    }
    return Object.fromEntries(pairs);
  }
}

function byName<K extends string, T>(names: readonly K[], make: (name: K) => T): Record<K, T> {
  return Object.fromEntries(names.map((name) => [name, make(name)])) as Record<K, T>;
}

const encoder = new TextEncoder();
const decoder = new TextDecoder('utf-8', { ignoreBOM: true });
const QUOTE = 34;

/**
 * The text of a field of the file. A field in quotes is given with its quotes: it loses them, doubled quotes become one, line ends \n.
 */
export function fieldText(bytes: Uint8Array, start: number, end: number): string {
  if (bytes[start] !== QUOTE) return decoder.decode(bytes.subarray(start, end));
  const inner = decoder.decode(bytes.subarray(start + 1, end - 1));
  return inner.replaceAll('""', '"').replace(/\r\n?/gu, '\n');
}
