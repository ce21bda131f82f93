import { restoreFormula } from '@/lib/export/formula-text';
import { type CsvRecord, misplacedQuoteProblem } from '@/lib/ingest/csv/splitter';
import { type Header } from '@/lib/ingest/table/header';
import { MARK_OR_THOUSANDS, type NumberFault, readNumber } from '@/lib/ingest/table/number-text';
import { type ProblemLog, shorten } from '@/lib/ingest/problem-log';

export const LARGEST_COUNT = 1_000_000;

interface Place {
  readonly line: number;
  readonly column: string;
  readonly found: string;
}

type DecimalMark = ',' | '.';

const MARK_NAMES: Readonly<Record<DecimalMark, string>> = { ',': 'comma', '.': 'point' };

/** Where a decimal mark stands first, and where it first could separate thousands instead. */
interface MarkSeen {
  first: Place | null;
  doubtful: Place | null;
}

const newMark = (): MarkSeen => ({ first: null, doubtful: null });

/** The cells of one record at a time, by column name. What is wrong in them goes to the log. */
export class Cells<C extends string> {
  private fields: readonly string[] = [];
  private readonly decimalComma: boolean;
  private readonly marks = { ',': newMark(), '.': newMark() };
  line = 0;

  constructor(
    readonly header: Header<C>,
    private readonly log: ProblemLog,
    private readonly options: {
      readonly decimalComma: boolean;
      readonly fieldLength: number;
      /** Reads a number otherwise than the contract says. */
      readonly readNumber?: (text: string, column: C) => number | NumberFault;
    },
  ) {
    this.decimalComma = options.decimalComma;
  }

  /** Takes the next record; false when it cannot be read cell by cell. */
  load({ line, fields, misplacedQuote }: CsvRecord): boolean {
    this.line = line;
    this.fields = fields;
    const { width, names } = this.header;
    const whole = (kind: string, message: string): false => {
      this.log.add({ kind, line, column: null, found: fields.join(' | ').slice(0, 400), message });
      return false;
    };
    if (misplacedQuote !== null) {
      this.log.add(misplacedQuoteProblem(misplacedQuote));
      return false;
    }
    if (fields.length < width) {
      return whole(
        'too-few-fields',
        `The row has ${fields.length} fields, the header ${width}. Add the missing ones, blank where there is no value.`,
      );
    }
    for (let index = width; index < fields.length; index += 1) {
      if (fields[index]?.trim() !== '') {
        return whole(
          'too-many-fields',
          `The row has ${fields.length} fields, the header ${width}. Quote texts that hold the delimiter.`,
        );
      }
    }
    for (const [index, field] of fields.entries()) {
      if (field.length <= this.options.fieldLength) continue;
      this.log.add({
        kind: 'field-too-long',
        line,
        column: names[index] ?? null,
        found: field.slice(0, 400),
        message: `The text has ${field.length} characters; at most ${this.options.fieldLength} are read. Shorten it.`,
      });
      return false;
    }
    return true;
  }

  /** Whether a mark has been seen, and seen where it could separate thousands: nothing is left to be noted of it then. */
  marksSeen(mark: DecimalMark): { readonly first: boolean; readonly doubtful: boolean } {
    const { first, doubtful } = this.marks[mark];
    return { first: first !== null, doubtful: doubtful !== null };
  }

  /** How many problems the file has so far. */
  get problems(): number {
    return this.log.total;
  }

  has(column: C): boolean {
    return this.header.positions.has(column);
  }

  /** The trimmed text, '' where the file has no such column. */
  raw(column: C): string {
    const position = this.header.positions.get(column);
    return position === undefined ? '' : (this.fields[position]?.trim() ?? '');
  }

  /** Text, or null when blank. */
  text(column: C): string | null {
    const text = this.raw(column);
    return text === '' ? null : restoreFormula(text);
  }

  /** Text that must not be blank. */
  neededText(column: C): string | null {
    const text = this.text(column);
    if (text === null) this.problem('blank', column, `${column} is blank. Every row needs one.`);
    return text;
  }

  /** A finite number, null when blank, undefined when wrong. */
  number(column: C): number | null | undefined {
    const text = this.raw(column);
    if (text === '') return null;
    const value = this.options.readNumber?.(text, column) ?? readNumber(text, this.decimalComma);
    if (typeof value !== 'number') {
      this.problem(value.kind, column, value.message);
      return undefined;
    }
    if (this.decimalComma) this.noteDecimalMark(column, text);
    return value;
  }

  /** A number that must not be blank. */
  neededNumber(column: C): number | undefined {
    const value = this.number(column);
    if (value !== null) return value;
    this.problem('blank', column, `${column} is blank. Every row needs a number here.`);
    return undefined;
  }

  /** A whole number from 1 to a million, null when blank, undefined when wrong. */
  count(column: C): number | null | undefined {
    const value = this.number(column);
    if (value === null || value === undefined) return value;
    if (Number.isInteger(value) && value >= 1 && value <= LARGEST_COUNT) return value;
    this.problem(
      'not-a-count',
      column,
      `${this.quoted(column)} is not a whole number from 1 to ${LARGEST_COUNT}.`,
    );
    return undefined;
  }

  /** One of `values`, upper or lower case; null when blank, undefined when wrong. */
  choice<V extends string>(column: C, values: readonly V[]): V | null | undefined {
    const text = this.raw(column);
    if (text === '') return null;
    const lower = text.toLowerCase();
    const value = values.find((candidate) => candidate === text || candidate.toLowerCase() === lower);
    if (value === undefined) {
      const list = values.length === 1 ? `${values[0] ?? ''} or blank` : `one of ${values.join(', ')}`;
      this.problem('unknown-value', column, `${this.quoted(column)} is not known here. Write ${list}.`);
    }
    return value;
  }

  /** The file's own columns that hold anything in this row, as the file has them. */
  own(): Record<string, string> {
    const { own } = this.header;
    if (own.length === 0) return {};
    const pairs: [string, string][] = [];
    for (const { name, index } of own) {
      const text = this.fields[index] ?? '';
      if (text.trim() !== '') pairs.push([name, restoreFormula(text)]);
    }
    return Object.fromEntries(pairs);
  }

  problem(kind: string, column: C, message: string): void {
    const found = this.raw(column);
    this.log.add({ kind, line: this.line, column, found: found === '' ? null : found, message });
  }

  quoted(column: C): string {
    return `\`${shorten(this.raw(column))}\``;
  }

  /** To be called after the last record: in a file with both decimal marks, neither may also be a thousands separator. */
  finish(): void {
    this.refuseMixed('.', ',');
    this.refuseMixed(',', '.');
  }

  private refuseMixed(doubtful: DecimalMark, other: DecimalMark): void {
    const { doubtful: place } = this.marks[doubtful];
    const { first } = this.marks[other];
    if (place === null || first === null) return;
    // Where both marks are in doubt, one problem says it.
    if (doubtful === ',' && this.marks['.'].doubtful !== null) return;
    this.log.add({
      kind: 'mixed-decimal-marks',
      ...place,
      message:
        `\`${place.found}\` may have a decimal ${MARK_NAMES[doubtful]} or a thousands separator, for line ${first.line} has a ` +
        `decimal ${MARK_NAMES[other]} (\`${first.found}\`). Use one decimal mark in the whole file, and no thousands separators.`,
    });
  }

  private noteDecimalMark(column: C, text: string): void {
    const mark = text.includes(',') ? ',' : text.includes('.') ? '.' : null;
    if (mark === null) return;
    const seen = this.marks[mark];
    seen.first ??= { line: this.line, column, found: text };
    if (seen.doubtful === null && MARK_OR_THOUSANDS.test(text)) {
      seen.doubtful = { line: this.line, column, found: text };
    }
  }
}
