import { LARGEST_COUNT } from '@/lib/ingest/table/cells';
import { type Factor } from '@/lib/units/table';

import { APOSTROPHE, COMMA, MINUS, NEWLINE, NINE, PLUS, POINT, QUOTE, RETURN, ZERO, isSame } from './bytes';
import { type Choices } from './choices';
import { POWERS, fieldNumber } from './field-number';
import { type GroupPaths } from './group-paths';
import { type TextRanges } from './row-block';
import { type RowState } from './row-state';

/** Returned for a field that is not plain, or not right: the row has to be judged by its texts. */
export const ODD = -1;

/** Reads the fields of one column of a file, one row at a time. */
export interface Field {
  /** Whether a row may not leave it empty. */
  readonly isNeeded: boolean;
  /** What the block holds of the column is made blank, so that an empty field need not be read. */
  clear(from: number, to: number): void;
  /** Reads the field, not an empty one, that begins at `start` as that of row `row`; returns where it ends, or `ODD`. */
  read(bytes: Uint8Array, start: number, row: number): number;
}

export type NumberRule = 'any' | 'needed' | 'sigma' | 'count';

export class NumberField implements Field {
  private readonly times: number;
  private readonly over: number;
  private readonly mark: number;
  readonly isNeeded: boolean;
  private readonly isSigma: boolean;
  private readonly isCount: boolean;

  /** A value of the file becomes one of `values` by `scale`; a blank field becomes `blank`. */
  constructor(
    private readonly values: Float64Array,
    private readonly blank: number,
    scale: Factor,
    rule: NumberRule,
    private readonly state: RowState,
  ) {
    this.times = scale.times;
    this.over = scale.over;
    this.mark = state.decimalComma ? COMMA : POINT;
    this.isNeeded = rule === 'needed';
    this.isSigma = rule === 'sigma';
    this.isCount = rule === 'count';
  }

  clear(from: number, to: number): void {
    this.values.fill(this.blank, from, to);
  }

  read(bytes: Uint8Array, start: number, row: number): number {
    const { delimiter } = this.state;
    let at = start;
    let byte = bytes[at] ?? 0;
    const isQuoted = byte === QUOTE;
    if (isQuoted) {
      at += 1;
      byte = bytes[at] ?? 0;
    }
    const first = at;
    const isNegative = byte === MINUS;
    if (isNegative || byte === PLUS) {
      at += 1;
      byte = bytes[at] ?? 0;
    }
    // Nine digits fit a whole number of 32 bits; with more the field is read again.
    let digits = 0;
    const whole = at;
    while (byte >= ZERO && byte <= NINE) {
      digits = (Math.imul(digits, 10) + byte - ZERO) | 0;
      at += 1;
      byte = bytes[at] ?? 0;
    }
    let count = at - whole;
    let places = 0;
    if (byte === POINT || byte === this.mark) {
      const mark = byte;
      at += 1;
      byte = bytes[at] ?? 0;
      const fraction = at;
      while (byte >= ZERO && byte <= NINE) {
        digits = (Math.imul(digits, 10) + byte - ZERO) | 0;
        at += 1;
        byte = bytes[at] ?? 0;
      }
      places = at - fraction;
      if (this.mark === COMMA) {
        const isDoubtful = places === 3 && count >= 1 && count <= 3 && bytes[whole] !== ZERO;
        if (this.state.isNewMark(mark, isDoubtful)) return ODD;
      }
      count += places;
    }
    const isPlain =
      count > 0 &&
      count <= 9 &&
      (isQuoted ? byte === QUOTE : byte === delimiter || byte === NEWLINE || byte === RETURN);
    if (!isPlain) return this.readLong(bytes, first, row, isQuoted);
    const value = places === 0 ? digits : digits / (POWERS[places] ?? NaN);
    if (!this.keep(isNegative ? 0 - value : value, row)) return ODD;
    return isQuoted ? at + 1 : at;
  }

  /** A number of more digits, or with an exponent. */
  private readLong(bytes: Uint8Array, first: number, row: number, isQuoted: boolean): number {
    const { state } = this;
    let at = first;
    let marks = 0;
    for (let byte = bytes[at]; byte !== QUOTE && !state.isEnd(byte); byte = bytes[at]) {
      if (byte === COMMA || byte === POINT) marks = byte;
      at += 1;
    }
    if ((bytes[at] === QUOTE) !== isQuoted || at - first > state.fieldLength) return ODD;
    if (state.decimalComma && marks !== 0 && state.isNewMark(marks, false)) return ODD;
    const value = fieldNumber(bytes, first, at, state.decimalComma);
    if (Number.isNaN(value) || !this.keep(value, row)) return ODD;
    return isQuoted ? at + 1 : at;
  }

  /** False where the number is not right in its column. */
  private keep(value: number, row: number): boolean {
    if (this.isSigma) {
      if (value < 0) return false;
      this.state.hasSigma = 1;
    }
    if (this.isCount && !(value >= 1 && value <= LARGEST_COUNT && value === Math.floor(value))) return false;
    const product = value * this.times;
    this.values[row] = (this.over === 1 ? product : product / this.over) + 0;
    return true;
  }
}

export class TextField implements Field {
  /** With `isNeeded` a row without a plain text is odd. */
  constructor(
    private readonly ranges: TextRanges,
    readonly isNeeded: boolean,
    private readonly state: RowState,
  ) {}

  clear(from: number, to: number): void {
    this.ranges.start.fill(0, from, to);
    this.ranges.end.fill(0, from, to);
  }

  read(bytes: Uint8Array, start: number, row: number): number {
    const { state } = this;
    let from = start;
    let to = start;
    let at = start;
    let isPlain = true;
    if (bytes[start] === QUOTE) {
      from += 1;
      to = state.closingQuote(bytes, from);
      if (to === -1) return ODD;
      isPlain = state.isVerbatim;
      at = to + 1;
    } else {
      to = state.endOfPlain(bytes, start);
      at = to;
    }
    if (from !== to) isPlain &&= hasPlainEdges(bytes, from, to);
    else if (this.isNeeded) return ODD;
    if (isPlain) {
      this.ranges.start[row] = from;
      this.ranges.end[row] = to;
    } else {
      if (this.isNeeded) return ODD;
      this.ranges.start[row] = start;
      this.ranges.end[row] = ~at;
    }
    return at - start > state.fieldLength ? ODD : at;
  }
}

/** False where a text may have blanks around it or begins like a guarded formula. */
function hasPlainEdges(bytes: Uint8Array, start: number, end: number): boolean {
  const [first, last] = [bytes[start] ?? 0, bytes[end - 1] ?? 0];
  return first > 32 && first < 128 && first !== APOSTROPHE && last > 32 && last < 128;
}

/** Where a field ends, its quotes included; `ODD` where it does not end in a plain way. */
function endOfField(bytes: Uint8Array, start: number, state: RowState): number {
  let at = start;
  if (bytes[at] === QUOTE) {
    at = state.closingQuote(bytes, at + 1) + 1;
    if (at === 0) return ODD;
  } else {
    at = state.endOfPlain(bytes, at);
  }
  return at - start > state.fieldLength ? ODD : at;
}

export class ChoiceField implements Field {
  readonly isNeeded = false;

  constructor(
    private readonly codes: Uint8Array,
    private readonly choices: Choices,
    private readonly state: RowState,
  ) {}

  clear(from: number, to: number): void {
    this.codes.fill(this.choices.blank, from, to);
  }

  read(bytes: Uint8Array, start: number, row: number): number {
    const { last, lastCode } = this.choices;
    const { state } = this;
    let end = start + last.length;
    let code = lastCode;
    if (!state.isEnd(bytes[end]) || !isSame(last, bytes, start, end)) {
      end = endOfField(bytes, start, state);
      if (end === ODD) return ODD;
      code = this.choices.code(bytes, start, end);
    }
    this.codes[row] = code;
    return code === -1 ? ODD : end;
  }
}

export class GroupField implements Field {
  readonly isNeeded = false;

  constructor(
    private readonly numbers: Int32Array,
    private readonly groups: GroupPaths,
    private readonly state: RowState,
  ) {}

  clear(from: number, to: number): void {
    this.numbers.fill(0, from, to);
  }

  read(bytes: Uint8Array, start: number, row: number): number {
    const { groups, state } = this;
    // Neighbours are mostly of one group.
    const { last, lastNumber } = groups;
    let end = start + last.length;
    if (lastNumber !== -1 && state.isEnd(bytes[end]) && isSame(last, bytes, start, end)) {
      this.numbers[row] = lastNumber;
      return end;
    }
    end = endOfField(bytes, start, state);
    if (end !== ODD) this.numbers[row] = groups.numberOfField(bytes, start, end);
    return end;
  }
}
