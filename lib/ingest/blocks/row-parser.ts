import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { type ListColumn, type ScaledColumn } from '@/lib/ingest/mass-list/columns';
import { type ListRows } from '@/lib/ingest/mass-list/list-rows';
import { LARGEST_COUNT } from '@/lib/ingest/table/cells';
import { type Header } from '@/lib/ingest/table/header';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

import { Choices } from './choices';
import { POWERS, fieldNumber } from './field-number';
import { type GroupPaths } from './group-paths';
import { HASH_FACTOR, HASH_START } from './item-index';
import {
  BLOCK_ROWS,
  NO_MATURITY,
  NUMBER_COLUMNS,
  type NumberColumn,
  type RowBlock,
  TEXT_COLUMNS,
  type TextColumn,
  type TextRanges,
  blankValue,
} from './row-block';

const QUOTE = 34;
const NEWLINE = 10;
const RETURN = 13;
const MINUS = 45;
const PLUS = 43;
const POINT = 46;
const COMMA = 44;

const NUMBER = 0;
const TEXT = 1;
const CHOICE = 2;
const GROUP = 3;

/** What a file's column is read into, by position in the file. */
interface Plan {
  readonly kinds: Uint8Array;
  /** For numbers: where their column begins in the block's values, and SI = value * times / over. */
  readonly slots: Int32Array;
  readonly times: Float64Array;
  readonly over: Float64Array;
  readonly blank: Float64Array;
  /** 1 for a number that must not be blank, 2 for a σ, 3 for the quantity. */
  readonly rule: Uint8Array;
  readonly ranges: readonly (TextRanges | null)[];
  readonly choices: readonly (Choices | null)[];
  readonly codes: readonly (Uint8Array | null)[];
}

/** Why `RowParser.parse` stopped: at the end of the bytes, at a full block, or at a record that it leaves to others. */
export type Stop = 'end' | 'full' | 'odd';

/**
 * Reads the plain records of a mass list from bytes into a block, without an object a row: plain numbers, texts with or without quotes, nothing
 * wrong. At any other record it stops; whoever judges that one record by its texts (`ListRows`) says what it means, so that there
 * is one meaning.
 */
export class RowParser {
  readonly #plan: Plan;
  readonly #width: number;
  readonly #delimiter: number;
  readonly #isDelimiter: Uint8Array;
  readonly #adjustments: boolean;
  readonly #half: boolean;
  readonly #keyRanges: TextRanges;
  readonly #keyColumn: number;
  readonly #parentColumn: number;
  readonly #hasMomentColumns: boolean;
  /** Physical line of the next record, and records so far. */
  line = 1;
  records = 0;
  stop: Stop = 'end';

  constructor(
    private readonly rows: ListRows,
    private readonly block: RowBlock,
    private readonly groups: GroupPaths,
    header: Header<ListColumn>,
    delimiter: Delimiter,
    { kind, extent }: Pick<ListDeclarations, 'kind' | 'extent'>,
    private readonly limits: {
      readonly fieldLength: number;
      readonly recordLength: number;
      readonly rows: number;
    },
  ) {
    this.#plan = planOf(header, rows, block);
    this.#width = header.width;
    this.#delimiter = delimiter.charCodeAt(0);
    this.#isDelimiter = Uint8Array.from({ length: 256 }, (_, byte) =>
      byte === this.#delimiter || byte === NEWLINE || byte === RETURN ? 1 : 0,
    );
    this.#adjustments = kind === 'adjustments';
    this.#half = extent !== 'whole';
    this.#keyRanges = block.texts[rows.key];
    this.#keyColumn = header.positions.get(rows.key) ?? -1;
    this.#parentColumn = header.positions.get('parent') ?? -1;
    this.#hasMomentColumns = (['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const).some((column) =>
      header.positions.has(column),
    );
  }

  /** Reads records from `at` on and says where it stopped, and in `stop` why. `bytes` end, at `limit`, with a line end. */
  parse(bytes: Uint8Array, start: number, limit: number): number {
    const { block } = this;
    const { kinds, slots, times, over, blank, rule, ranges, choices, codes } = this.#plan;
    const { values } = block;
    const width = this.#width;
    const delimiter = this.#delimiter;
    const isDelimiter = this.#isDelimiter;
    const { fieldLength, recordLength } = this.limits;
    const keyColumn = this.#keyColumn;
    const decimalComma = delimiter === 59;
    const comma = decimalComma ? COMMA : POINT;
    const marks = this.#marks();
    let row = block.rows;
    let at = start;
    this.stop = 'end';

    while (at < limit) {
      if (row === BLOCK_ROWS || this.records === this.limits.rows) {
        this.stop = row === BLOCK_ROWS ? 'full' : 'odd';
        break;
      }
      const from = at;
      let keyHash = 0;
      let hasSigma = 0;
      let lineEnds = 0;
      let column = 0;
      for (; column < width; column += 1) {
        const begin = at;
        let byte = bytes[at] ?? 0;
        if (kinds[column] === NUMBER) {
          const slot = (slots[column] ?? 0) + row;
          if (isDelimiter[byte] === 1) {
            if (rule[column] === 1) break;
            values[slot] = blank[column] ?? 0;
          } else {
            const quoted = byte === QUOTE;
            if (quoted) {
              at += 1;
              byte = bytes[at] ?? 0;
            }
            const first = at;
            const negative = byte === MINUS;
            if (negative || byte === PLUS) {
              at += 1;
              byte = bytes[at] ?? 0;
            }
            let digits = 0;
            const whole = at;
            while (byte >= 48 && byte <= 57) {
              digits = (Math.imul(digits, 10) + byte - 48) | 0;
              at += 1;
              byte = bytes[at] ?? 0;
            }
            let count = at - whole;
            let places = 0;
            if (byte === POINT || byte === comma) {
              const mark = byte;
              at += 1;
              byte = bytes[at] ?? 0;
              const fraction = at;
              while (byte >= 48 && byte <= 57) {
                digits = (Math.imul(digits, 10) + byte - 48) | 0;
                at += 1;
                byte = bytes[at] ?? 0;
              }
              places = at - fraction;
              if (decimalComma) {
                const doubtful = places === 3 && count >= 1 && count <= 3 && bytes[whole] !== 48;
                if ((marks & (mark === COMMA ? 1 : 4)) === 0) break;
                if (doubtful && (marks & (mark === COMMA ? 2 : 8)) === 0) break;
              }
              count += places;
            }
            let value: number;
            if (count <= 9 && count > 0 && (quoted ? byte === QUOTE : isDelimiter[byte] === 1)) {
              value = places === 0 ? digits : digits / (POWERS[places] ?? NaN);
              if (negative) value = 0 - value;
            } else {
              while (byte !== QUOTE && isDelimiter[byte] === 0) {
                at += 1;
                byte = bytes[at] ?? 0;
              }
              if ((byte === QUOTE) !== quoted) break;
              if (decimalComma && (marksIn(bytes, first, at) & ~marks) !== 0) break;
              value = fieldNumber(bytes, first, at, decimalComma);
              if (value !== value || at - first > fieldLength) break;
            }
            if (quoted) at += 1;
            const kind = rule[column];
            if (kind === 2) {
              if (value < 0) break;
              hasSigma = 1;
            } else if (kind === 3 && !(value >= 1 && value <= LARGEST_COUNT && value === Math.floor(value)))
              break;
            value *= times[column] ?? NaN;
            const divisor = over[column] ?? NaN;
            values[slot] = (divisor === 1 ? value : value / divisor) + 0;
          }
        } else {
          let hash = HASH_START;
          let isVerbatim = true;
          let [textStart, textEnd] = [at, at];
          if (byte === QUOTE) {
            textStart += 1;
            let closed = false;
            for (at += 1; at < limit; at += 1) {
              byte = bytes[at] ?? 0;
              if (byte === QUOTE) {
                if (bytes[at + 1] !== QUOTE) {
                  closed = true;
                  break;
                }
                isVerbatim = false;
                at += 1;
              } else if (byte === NEWLINE) {
                isVerbatim = false;
                lineEnds += 1;
              } else if (byte === RETURN) {
                // A carriage return alone within quotes is a line end too, which the texts count better.
                if (bytes[at + 1] !== NEWLINE) break;
                isVerbatim = false;
              }
              hash = Math.imul(hash ^ byte, HASH_FACTOR);
            }
            if (!closed) break;
            textEnd = at;
            at += 1;
          } else {
            while (isDelimiter[byte] === 0) {
              hash = Math.imul(hash ^ byte, HASH_FACTOR);
              at += 1;
              byte = bytes[at] ?? 0;
            }
            textEnd = at;
          }
          if (at - begin > fieldLength) break;
          const kind = kinds[column];
          if (kind === TEXT) {
            const range = ranges[column];
            if (range !== null && range !== undefined) {
              const isPlain =
                isVerbatim && (textStart === textEnd || hasPlainEdges(bytes, textStart, textEnd));
              range.start[row] = isPlain ? textStart : begin;
              range.end[row] = isPlain ? textEnd : ~at;
              if (column === keyColumn) {
                if (!isPlain || textStart === textEnd) break;
                keyHash = hash;
              }
            }
          } else if (kind === GROUP) {
            // The quotes are part of the spelling, but not of its hash: a spelling is compared whole.
            block.group[row] = this.groups.numberOfField(bytes, begin, at, hash);
          } else {
            const code = choices[column]?.code(bytes, begin, at) ?? -1;
            const target = codes[column];
            if (code === -1 || target === null || target === undefined) break;
            target[row] = code;
          }
        }
        if (column < width - 1) {
          if (bytes[at] !== delimiter) break;
          at += 1;
        }
      }
      if (column < width) {
        this.stop = 'odd';
        at = from;
        break;
      }
      // Delimiters after the last named column are blank fields.
      while (bytes[at] === delimiter) at += 1;
      if (bytes[at] === RETURN) at += 1;
      if (bytes[at] !== NEWLINE || at + 1 - from > recordLength || !this.#isRight(row)) {
        this.stop = 'odd';
        at = from;
        break;
      }
      at += 1;
      block.hasSigma[row] = hasSigma;
      block.lines[row] = this.line;
      if (this.#addItem(bytes, row, keyHash)) row += 1;
      this.records += 1;
      this.line += 1 + lineEnds;
    }
    block.rows = row;
    return at;
  }

  /** In files with decimal commas: which marks are noted already, and noted where they could separate thousands. */
  #marks(): number {
    const { cells } = this.rows;
    if (cells === null) return 0;
    const [commas, points] = [cells.marksSeen(','), cells.marksSeen('.')];
    return (
      (commas.first ? 1 : 0) | (commas.doubtful ? 2 : 0) | (points.first ? 4 : 0) | (points.doubtful ? 8 : 0)
    );
  }

  /** Whether the numbers of a row belong together; also notes whether it has moments. */
  #isRight(row: number): boolean {
    const { numbers, hasMoments, pair } = this.block;
    const mass = numbers.mass[row] ?? NaN;
    let has = 0;
    if (this.#hasMomentColumns) {
      const { ixx, iyy, izz, ixy, ixz, iyz } = numbers;
      has =
        ixx[row] !== 0 ||
        iyy[row] !== 0 ||
        izz[row] !== 0 ||
        ixy[row] !== 0 ||
        ixz[row] !== 0 ||
        iyz[row] !== 0
          ? 1
          : 0;
      if (mass < 0 && ((ixx[row] ?? 0) > 0 || (iyy[row] ?? 0) > 0 || (izz[row] ?? 0) > 0)) return false;
    }
    hasMoments[row] = has;
    if (mass < 0 && !this.#adjustments) return false;
    if (mass === 0 && has === 1) return false;
    if (this.#half && pair[row] === 1) return false;
    return !((numbers.growth[row] ?? NaN) <= -1);
  }

  #addItem(bytes: Uint8Array, row: number, hash: number): boolean {
    const { start, end } = this.#keyRanges;
    const { item, parent } = this.block.texts;
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    item.start[row] = from;
    item.end[row] = to;
    const { tree, key } = this.rows;
    if (!tree.addBytes(bytes, from, to, hash, this.line, key)) return false;
    if (this.#parentColumn === -1) return true;
    const [parentFrom, parentTo] = [parent.start[row] ?? 0, parent.end[row] ?? 0];
    if (parentTo > parentFrom) tree.addParent(bytes, parentFrom, parentTo);
    else if (parentTo < 0) {
      const text = this.block.text('parent', row);
      if (text !== null) tree.addParentText(text);
    }
    return true;
  }
}

/** The bits of `#marks` that a field of a number which is not a short plain one would note. */
function marksIn(bytes: Uint8Array, start: number, end: number): number {
  let marks = 0;
  for (let at = start; at < end; at += 1) marks |= bytes[at] === COMMA ? 1 : bytes[at] === POINT ? 4 : 0;
  return marks;
}

/** False where a text may have blanks around it or begins like a guarded formula. */
function hasPlainEdges(bytes: Uint8Array, start: number, end: number): boolean {
  const [first, last] = [bytes[start] ?? 0, bytes[end - 1] ?? 0];
  return first > 32 && first < 128 && first !== 39 && last > 32 && last < 128;
}

const RULES: Readonly<Partial<Record<NumberColumn, number>>> = { mass: 1, x: 1, y: 1, z: 1, quantity: 3 };

function planOf(header: Header<ListColumn>, rows: ListRows, block: RowBlock): Plan {
  const { width } = header;
  const plan = {
    kinds: new Uint8Array(width),
    slots: new Int32Array(width),
    times: new Float64Array(width).fill(1),
    over: new Float64Array(width).fill(1),
    blank: new Float64Array(width),
    rule: new Uint8Array(width),
    ranges: Array.from({ length: width }, (): TextRanges | null => null),
    choices: Array.from({ length: width }, (): Choices | null => null),
    codes: Array.from({ length: width }, (): Uint8Array | null => null),
  };
  const choice = (at: number, values: readonly string[], blank: number, codes: Uint8Array): void => {
    plan.kinds[at] = CHOICE;
    plan.choices[at] = new Choices(values, blank);
    plan.codes[at] = codes;
  };
  for (const [column, at] of header.positions) {
    if (column === 'group') plan.kinds[at] = GROUP;
    else if (column === 'category') choice(at, CATEGORIES, 0, block.category);
    else if (column === 'counting') choice(at, ['counted', 'memo'], 0, block.memo);
    else if (column === 'symmetry') choice(at, ['', 'pair'], 0, block.pair);
    else if (column === 'maturity') choice(at, MATURITIES, NO_MATURITY, block.maturity);
    else if (column === 'status') choice(at, CHANGE_STATUSES, 0, block.status);
    else if (isText(column)) {
      plan.kinds[at] = TEXT;
      plan.ranges[at] = block.texts[column];
    } else {
      const name: NumberColumn = column === 'growth_percent' ? 'growth' : column;
      plan.kinds[at] = NUMBER;
      plan.slots[at] = BLOCK_ROWS * NUMBER_COLUMNS.indexOf(name);
      plan.blank[at] = blankValue(name);
      plan.rule[at] = RULES[name] ?? (name.endsWith('_sigma') ? 2 : 0);
      if (column === 'quantity') continue;
      const scale = rows.scales[column satisfies ScaledColumn];
      plan.times[at] = scale.times;
      plan.over[at] = scale.over;
    }
  }
  for (const [k, { index }] of header.own.entries()) {
    plan.kinds[index] = TEXT;
    plan.ranges[index] = block.own[k]?.ranges ?? null;
  }
  return plan;
}

function isText(column: ListColumn): column is TextColumn {
  return TEXT_COLUMNS.some((text) => text === column);
}
