import { decodeText } from '@/lib/ingest/csv/decode';
import { type Delimiter } from '@/lib/ingest/csv/delimiter';
import { Splitter } from '@/lib/ingest/csv/splitter';
import { MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { type FileSample, type GridRow, HEAD_ROWS, TAIL_ROWS } from './grid';

const BLOCK_BYTES = 65_536;
const DELIMITERS: readonly Delimiter[] = [',', ';', '\t'];

/**
 * The delimiter of a text with titles above its header: the one that cuts most lines into the same number of fields, more than one.
 * Comma where none does.
 */
export function bodyDelimiter(text: string): Delimiter {
  const lines = text.split('\n').slice(0, 200);
  let best: Delimiter = ',';
  let bestScore = 0;
  for (const delimiter of DELIMITERS) {
    const widths = new Map<number, number>();
    for (const line of lines) {
      const width = unquoted(line).split(delimiter).length;
      if (width > 1) widths.set(width, (widths.get(width) ?? 0) + 1);
    }
    // Many lines of one width count, and the width tells a delimiter from the decimal commas in its fields.
    const score = Math.max(0, ...[...widths].map(([width, count]) => count * Math.min(width, 12)));
    if (score > bestScore) [best, bestScore] = [delimiter, score];
  }
  return best;
}

/** The rows of a CSV text, blank ones left out, in constant memory. Throws a CsvFault where reading cannot go on. */
export async function* csvGridRows(
  bytes: AsyncIterable<Uint8Array>,
  given: Delimiter | null,
  onDelimiter: (delimiter: Delimiter) => void = () => undefined,
): AsyncGenerator<GridRow> {
  const { recordLength } = MASS_LIST_LIMITS;
  let splitter: Splitter | null = null;
  let pending = '';
  const open = (): Splitter => {
    const delimiter = given ?? bodyDelimiter(pending);
    onDelimiter(delimiter);
    return new Splitter(delimiter, recordLength);
  };
  for await (const piece of decodeText(bytes, BLOCK_BYTES)) {
    pending += piece.text;
    splitter ??= open();
    const { records, rest, fault } = splitter.split(pending, false);
    pending = rest;
    for (const { line, fields, misplacedQuote } of records) yield { line, cells: fields, misplacedQuote };
    if (fault !== null) throw fault;
  }
  splitter ??= open();
  const { records, fault } = splitter.split(pending, true);
  for (const { line, fields, misplacedQuote } of records) yield { line, cells: fields, misplacedQuote };
  if (fault !== null) throw fault;
}

/** What a person sees of a file's rows before it is read: one pass, and no more than the sample is kept. `headOnly` stops once the head is full. */
export async function sampleRows(
  rows: AsyncIterable<GridRow>,
  headOnly = false,
): Promise<Pick<FileSample, 'head' | 'tail' | 'rows'>> {
  const head: GridRow[] = [];
  const tail: GridRow[] = [];
  let count = 0;
  for await (const row of rows) {
    count += 1;
    if (head.length < HEAD_ROWS) head.push(shortened(row));
    else if (headOnly) break;
    else {
      tail.push(shortened(row));
      if (tail.length > TAIL_ROWS) tail.shift();
    }
  }
  return { head, tail, rows: count };
}

const SHOWN = 200;

function shortened({ line, cells }: GridRow): GridRow {
  return {
    line,
    cells: cells.slice(0, 256).map((cell) => (typeof cell === 'string' ? cell.slice(0, SHOWN) : cell)),
  };
}

function unquoted(line: string): string {
  return line.replace(/"[^"]*"/gu, '');
}
