import Papa, { type ParseError, type ParseResult } from 'papaparse';

import { countNewlines } from '@/lib/ingest/csv/decode';
import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { CsvFault } from '@/lib/ingest/csv/fault';

/** One record; `line` is the physical line where it begins, `misplacedQuote` that of a quote which RFC 4180 does not allow. */
export interface CsvRecord {
  readonly line: number;
  readonly fields: readonly string[];
  readonly misplacedQuote: number | null;
}

interface Split {
  readonly records: readonly CsvRecord[];
  /** Text of the record that is not complete yet. */
  readonly rest: string;
  readonly fault: CsvFault | null;
}

/** Splits text that arrives in pieces, line ends already \n, and numbers its physical lines. */
export class Splitter {
  private readonly parser: Papa.Parser;

  constructor(
    readonly delimiter: Delimiter,
    private readonly recordLength: number,
    private line = 1,
  ) {
    this.parser = new Papa.Parser({ delimiter, newline: '\n' });
  }

  /** Records in `text`; without `final` its last line waits for more. A fault stands after the records before it. */
  split(text: string, final: boolean): Split {
    if (text === '') return { records: [], rest: '', fault: null };
    const start = this.line;
    const { data, errors, meta } = this.parse(text, final);
    const quotes = new Map<number, ParseError>();
    for (const error of errors) {
      if (error.row !== undefined && !quotes.has(error.row)) quotes.set(error.row, error);
    }
    const unclosed = errors.find(({ code }) => code === 'MissingQuotes')?.row ?? -1;
    const lineOf = (error: ParseError): number => start + countNewlines(text.slice(0, error.index ?? 0));
    const anyQuotes = text.includes('"');

    const records: CsvRecord[] = [];
    for (const [row, fields] of data.entries()) {
      const error = quotes.get(row);
      if (row === unclosed && error !== undefined) {
        return { records, rest: '', fault: quoteFault(error, lineOf(error), this.recordLength) };
      }
      let length = fields.length;
      for (const field of fields) length += field.length;
      if (length > this.recordLength) return { records, rest: '', fault: this.overlong() };
      if (!isBlank(fields)) {
        records.push({ line: this.line, fields, misplacedQuote: error === undefined ? null : lineOf(error) });
      }
      this.line += 1;
      if (anyQuotes) for (const field of fields) this.line += countNewlines(field);
    }
    const rest = final ? '' : text.slice(meta.cursor);
    return { records, rest, fault: rest.length > this.recordLength ? this.endless(rest) : null };
  }

  private parse(text: string, final: boolean): ParseResult<string[]> {
    return this.parser.parse(text, 0, !final) as ParseResult<string[]>;
  }

  /** Why a record does not end: a quote left open, or a line too long. */
  private endless(rest: string): CsvFault {
    const quote = this.parse(rest, true).errors[0];
    if (quote === undefined) return this.overlong();
    return quoteFault(quote, this.line + countNewlines(rest.slice(0, quote.index ?? 0)), this.recordLength);
  }

  private overlong(): CsvFault {
    return new CsvFault({
      kind: 'line-too-long',
      line: this.line,
      column: null,
      found: null,
      message: `The row is longer than ${this.recordLength} characters. Shorten its texts.`,
    });
  }
}

function quoteFault({ code }: ParseError, line: number, recordLength: number): CsvFault {
  if (code !== 'MissingQuotes') return new CsvFault(misplacedQuoteProblem(line));
  return new CsvFault({
    kind: 'unclosed-quote',
    line,
    column: null,
    found: '"',
    message:
      `The quote opened in this line is not closed within ${recordLength} characters or before the end of the file. ` +
      'Close it, or write a quote inside quoted text twice.',
  });
}

/** A quoted field that goes on after its closing quote. */
export function misplacedQuoteProblem(line: number): CsvFault['problem'] {
  return {
    kind: 'misplaced-quote',
    line,
    column: null,
    found: '"',
    message:
      'A quoted field of this line goes on after its closing quote. Write a quote inside quoted text twice, ' +
      'for example "5"" pipe".',
  };
}

export function isBlank(fields: readonly string[]): boolean {
  return fields.every((field) => field.trim() === '');
}
