import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type ListRows } from '@/lib/ingest/mass-list/list-rows';
import { type Header } from '@/lib/ingest/table/header';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

import { NEWLINE, RETURN } from './bytes';
import { Choices } from './choices';
import { ChoiceField, type Field, GroupField, NumberField, type NumberRule, ODD, TextField } from './fields';
import { type GroupPaths } from './group-paths';
import { hashOf } from './item-index';
import {
  BLOCK_ROWS,
  NO_MATURITY,
  type NumberColumn,
  type RowBlock,
  TEXT_COLUMNS,
  type TextColumn,
  blankValue,
} from './row-block';
import { RowState } from './row-state';

/** Why `RowParser.parse` stopped: at the end of the bytes, at a full block, or at a record that it leaves to others. */
export type Stop = 'end' | 'full' | 'odd';

/**
 * Reads the plain records of a mass list from bytes into a block, without an object a row: texts with and without quotes, numbers, nothing
 * wrong. At any other record it stops; whoever judges that one by its texts (`ListRows`) says what it means, so that there is one
 * meaning.
 */
export class RowParser {
  readonly #fields: readonly Field[];
  readonly #needed: Uint8Array;
  readonly #hashes = new Int32Array(BLOCK_ROWS);
  #foreseen = 0;
  readonly #state: RowState;
  readonly #isAdjustments: boolean;
  readonly #isHalf: boolean;
  readonly #hasMoments: boolean;
  readonly #hasParents: boolean;
  /** Physical line of the next record, and records so far. */
  line = 1;
  records = 0;
  stop: Stop = 'end';

  constructor(
    private readonly list: ListRows,
    private readonly block: RowBlock,
    groups: GroupPaths,
    header: Header<ListColumn>,
    delimiter: Delimiter,
    { kind, extent }: Pick<ListDeclarations, 'kind' | 'extent'>,
    private readonly limits: {
      readonly fieldLength: number;
      readonly recordLength: number;
      readonly rows: number;
    },
  ) {
    this.#state = new RowState(delimiter.charCodeAt(0), delimiter === ';', limits.fieldLength);
    this.#fields = fieldsOf(header, list, block, groups, this.#state);
    this.#needed = Uint8Array.from(this.#fields, ({ isNeeded }) => (isNeeded ? 1 : 0));
    this.#isAdjustments = kind === 'adjustments';
    this.#isHalf = extent !== 'whole';
    this.#hasMoments = MOMENT_COLUMNS.some((column) => header.positions.has(column));
    this.#hasParents = header.positions.has('parent');
  }

  /** Reads records from `start` on and says where it stopped, and in `stop` why. `bytes` end, at `limit`, with a line end. */
  parse(bytes: Uint8Array, start: number, limit: number): number {
    const fields = this.#fields;
    const needed = this.#needed;
    const state = this.#state;
    const { block, limits } = this;
    const width = fields.length;
    const { delimiter } = state;
    state.limit = limit;
    state.marks = this.#marks();
    let at = start;
    while (at < limit) {
      if (block.rows === BLOCK_ROWS) return this.#stopAt(at, 'full');
      if (this.records === limits.rows) return this.#stopAt(at, 'odd');
      const row = block.rows;
      const from = at;
      state.lineEnds = 0;
      state.hasSigma = 0;
      for (let column = 0; column < width; column += 1) {
        if (column > 0) {
          if (bytes[at] !== delimiter) return this.#stopAt(from, 'odd');
          at += 1;
        }
        const byte = bytes[at] ?? 0;
        if (byte === delimiter || byte === NEWLINE || byte === RETURN) {
          if (needed[column] === 1) return this.#stopAt(from, 'odd');
          continue;
        }
        at = fields[column]?.read(bytes, at, row) ?? ODD;
        if (at === ODD) return this.#stopAt(from, 'odd');
      }
      // Delimiters after the last named column are blank fields.
      while (bytes[at] === delimiter) at += 1;
      if (bytes[at] === RETURN) at += 1;
      if (bytes[at] !== NEWLINE || at + 1 - from > limits.recordLength || !this.#isRight(row))
        return this.#stopAt(from, 'odd');
      at += 1;
      block.hasSigma[row] = state.hasSigma;
      block.lines[row] = this.line;
      block.rows += 1;
      this.records += 1;
      this.line += 1 + state.lineEnds;
    }
    return this.#stopAt(at, 'end');
  }

  #stopAt(at: number, stop: Stop): number {
    this.stop = stop;
    const { rows } = this.block;
    // The row is left to others, and what was read of it is not.
    if (stop === 'odd') for (const field of this.#fields) field.clear(rows, rows + 1);
    return at;
  }

  /** To be called when the block is used again: makes all that a file can leave blank so. */
  clear(from = 0): void {
    for (const field of this.#fields) field.clear(from, BLOCK_ROWS);
  }

  /**
   * Notes the items of the rows from `first` on, and their parents, and takes rows out whose item was there before. All at once: each
   * has to wait for memory, and they can wait together.
   */
  noteItems(first: number): void {
    const { block } = this;
    const { item, part_number: number } = block.texts;
    const { tree, key } = this.list;
    const { start, end } = key === 'item' ? item : number;
    const hashes = this.#hashes;
    for (let row = first; row < block.rows; row += 1) {
      const [from, to] = [start[row] ?? 0, end[row] ?? 0];
      item.start[row] = from;
      item.end[row] = to;
      hashes[row] = hashOf(block.bytes, from, to);
    }
    for (let row = first; row < block.rows; row += 1) this.#foreseen |= tree.foresee(hashes[row] ?? 0);
    let kept = first;
    for (let row = first; row < block.rows; row += 1) {
      const [from, to, line] = [start[row] ?? 0, end[row] ?? 0, block.lines[row] ?? 0];
      if (!tree.addBytes(block.bytes, from, to, hashes[row] ?? 0, line, key)) continue;
      if (this.#hasParents) this.#noteParent(row);
      if (kept !== row) block.move(row, kept);
      kept += 1;
    }
    if (kept < block.rows) this.clear(kept);
    block.rows = kept;
  }

  #marks(): number {
    const { cells } = this.list;
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
    if (this.#hasMoments) {
      const { ixx, iyy, izz, ixy, ixz, iyz } = numbers;
      if (ixx[row] !== 0 || iyy[row] !== 0 || izz[row] !== 0) has = 1;
      else if (ixy[row] !== 0 || ixz[row] !== 0 || iyz[row] !== 0) has = 1;
      if (mass < 0 && ((ixx[row] ?? 0) > 0 || (iyy[row] ?? 0) > 0 || (izz[row] ?? 0) > 0)) return false;
    }
    hasMoments[row] = has;
    if (mass < 0 && !this.#isAdjustments) return false;
    if (mass === 0 && has === 1) return false;
    if (this.#isHalf && pair[row] === 1) return false;
    return !((numbers.growth[row] ?? NaN) <= -1);
  }

  #noteParent(row: number): void {
    const { start, end } = this.block.texts.parent;
    const [from, to] = [start[row] ?? 0, end[row] ?? 0];
    const { tree } = this.list;
    if (to > from) tree.addParent(this.block.bytes, from, to);
    else if (to < 0) {
      const text = this.block.text('parent', row);
      if (text !== null) tree.addParentText(text);
    }
  }
}

const MOMENT_COLUMNS = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;
const AS_IT_IS = { times: 1, over: 1 };

function fieldsOf(
  header: Header<ListColumn>,
  list: ListRows,
  block: RowBlock,
  groups: GroupPaths,
  state: RowState,
): Field[] {
  const choice = (codes: Uint8Array, values: readonly string[], blank: number): Field =>
    new ChoiceField(codes, new Choices(values, blank), state);
  const fieldOf = (column: ListColumn): Field => {
    if (column === 'group') return new GroupField(block.group, groups, state);
    if (column === 'category') return choice(block.category, CATEGORIES, 0);
    if (column === 'counting') return choice(block.memo, ['counted', 'memo'], 0);
    if (column === 'symmetry') return choice(block.pair, ['', 'pair'], 0);
    if (column === 'maturity') return choice(block.maturity, MATURITIES, NO_MATURITY);
    if (column === 'status') return choice(block.status, CHANGE_STATUSES, 0);
    if (isText(column)) return new TextField(block.texts[column], column === list.key, state);
    const name: NumberColumn = column === 'growth_percent' ? 'growth' : column;
    const scale = column === 'quantity' ? AS_IT_IS : list.scales[column];
    return new NumberField(block.numbers[name], blankValue(name), scale, ruleOf(name), state);
  };
  const fields = new Map<number, Field>();
  for (const [column, at] of header.positions) fields.set(at, fieldOf(column));
  header.own.forEach(({ index }, k) => {
    const own = block.own[k];
    if (own !== undefined) fields.set(index, new TextField(own.ranges, false, state));
  });
  return Array.from({ length: header.width }, (_, at) => {
    const field = fields.get(at);
    if (field === undefined) throw new Error(`column ${at + 1} has no name`);
    return field;
  });
}

function isText(column: ListColumn): column is TextColumn {
  return TEXT_COLUMNS.some((text) => text === column);
}

function ruleOf(column: NumberColumn): NumberRule {
  if (column === 'quantity') return 'count';
  if (column.endsWith('_sigma')) return 'sigma';
  return column === 'mass' || column === 'x' || column === 'y' || column === 'z' ? 'needed' : 'any';
}
