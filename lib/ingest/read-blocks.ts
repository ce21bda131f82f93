import { ByteFeed, FEED_BYTES } from '@/lib/ingest/blocks/byte-feed';
import { cutRecord } from '@/lib/ingest/blocks/cut-record';
import { GroupPaths } from '@/lib/ingest/blocks/group-paths';
import { BLOCK_ROWS, RowBlock } from '@/lib/ingest/blocks/row-block';
import { RowParser } from '@/lib/ingest/blocks/row-parser';
import { isText } from '@/lib/ingest/blocks/valid-text';
import { type Delimiter, headerDelimiter } from '@/lib/ingest/csv/delimiter';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { readRecords } from '@/lib/ingest/csv/records';
import { type CsvRecord, isBlank } from '@/lib/ingest/csv/splitter';
import { type IngestLimits, MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { type MassListReading } from '@/lib/ingest/mass-list';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { ListRows } from '@/lib/ingest/mass-list/list-rows';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { type ColumnMapping } from '@/lib/ingest/table/header';
import { refuseEmpty, tooManyRows } from '@/lib/ingest/table/read-table';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface MassListBlockOptions {
  readonly limits?: IngestLimits;
  /** Header names of the file (blanks around them aside) -> columns of the contract. */
  readonly mapping?: ColumnMapping<ListColumn>;
  /** Called with right rows, in the order of the file; the block is used again as soon as the promise, if any, is kept. */
  readonly onBlock: (block: RowBlock) => void | Promise<void>;
  /** Called after every piece of the file: rows and bytes read so far. */
  readonly onProgress?: ((progress: { readonly rows: number; readonly bytes: number }) => void) | undefined;
}

/**
 * Reads a component mass list (contract section 1) in one pass, by blocks of rows. What stays in memory is its items and group paths.
 *
 * Plain records are read from their bytes; a record that is not is judged by its texts; and from a place on where the file is not
 * regular CSV in UTF-8, `readRecords` reads the rest. Problems and values do not depend on which way a row takes.
 *
 * Throws a RangeError when the declarations name no known unit; errors of the byte stream pass through.
 */
export async function readMassListBlocks(
  bytes: AsyncIterable<Uint8Array>,
  declarations: ListDeclarations,
  options: MassListBlockOptions,
): Promise<MassListReading> {
  const log = new ProblemLog();
  const reading = new BlockReading(bytes, declarations, options, log);
  let whole = true;
  try {
    whole = await reading.run();
  } catch (error) {
    if (!(error instanceof CsvFault)) throw error;
    await reading.flush();
    log.add(error.problem);
    whole = false;
  } finally {
    await reading.close();
  }
  return reading.result(whole);
}

class BlockReading {
  readonly #feed: ByteFeed;
  readonly #limits: IngestLimits;
  readonly #list: ListRows;
  readonly #groups = new GroupPaths();
  readonly #block = new RowBlock(this.#groups.paths);
  #delimiter: Delimiter = ',';
  #parser: RowParser | null = null;
  #line = 1;
  #records = 0;
  #free = FEED_BYTES;
  #hasHeader = false;
  /** Rows of the block whose items are noted. */
  #settled = 0;

  constructor(
    bytes: AsyncIterable<Uint8Array>,
    private readonly declarations: ListDeclarations,
    private readonly options: MassListBlockOptions,
    private readonly log: ProblemLog,
  ) {
    const { limits = MASS_LIST_LIMITS, mapping = {} } = options;
    // The texts of a feed, or of one record of three bytes a character, fit beside it.
    this.#feed = new ByteFeed(bytes, Math.max(FEED_BYTES, 3 * limits.recordLength));
    this.#limits = limits;
    this.#list = new ListRows(declarations, limits, mapping, log);
    this.#block.bytes = this.#feed.buffer;
  }

  close(): Promise<void> {
    return this.#feed.close();
  }

  /** False where the header is not right. */
  async run(): Promise<boolean> {
    const feed = this.#feed;
    await feed.fill(0);
    let at = this.#begin();
    if (at === null) return this.#readAsText(0, false);
    for (;;) {
      const limit = feed.wholeLines();
      if (limit <= at && !feed.ended) return this.#readAsText(at, true);
      if (limit > at && !isText(feed.buffer, at, Math.min(limit, feed.filled)))
        return this.#readAsText(at, true);
      while (at < limit) {
        const next = this.#parser === null ? at : await this.#parse(this.#parser, at, limit);
        if (next === limit) {
          at = next;
          break;
        }
        const cut = cutRecord(feed.buffer, next, limit, this.#delimiter.charCodeAt(0));
        if (cut === 'incomplete' && !feed.ended && next > 0) {
          at = next;
          break;
        }
        if (typeof cut === 'string' || this.#isTooLong(cut.fields)) return this.#readAsText(next, true);
        const record = { line: this.#line, fields: cut.fields, misplacedQuote: null };
        if (!(await this.#take(record))) return false;
        this.#line += 1 + cut.lineEnds;
        at = cut.next;
      }
      if (feed.ended && at >= feed.filled) {
        this.#tell(feed.before + feed.filled);
        break;
      }
      await this.flush();
      await feed.fill(at);
      this.#free = FEED_BYTES;
      at = 0;
      this.#tell(feed.before);
    }
    await this.flush();
    refuseEmpty(this.log, this.#hasHeader, this.#records);
    return true;
  }

  result(whole: boolean): MassListReading {
    this.#list.finish(whole && this.#hasHeader);
    const { log } = this;
    return {
      rows: this.#records,
      problems: log.problems(),
      problemCounts: log.counts(),
      unknownColumns: this.#list.ownColumns,
    };
  }

  /** Where the text begins, once the delimiter is known; null where the file is not what is read from bytes. */
  #begin(): number | null {
    const { buffer, filled, ended } = this.#feed;
    const at = buffer[0] === 0xef && buffer[1] === 0xbb && buffer[2] === 0xbf ? 3 : 0;
    const limit = this.#feed.wholeLines();
    if (limit <= at || !isText(buffer, at, Math.min(limit, filled))) return null;
    const text = new TextDecoder('utf-8', { ignoreBOM: true }).decode(buffer.subarray(at, limit));
    const head = text.slice(0, this.#limits.recordLength).replace(/\r\n?/gu, '\n');
    const delimiter = headerDelimiter(head, ended && text.length === head.length);
    if (delimiter === null) return null;
    this.#delimiter = delimiter;
    return at;
  }

  /** Reads plain records as far as they go; flushes full blocks. */
  async #parse(parser: RowParser, from: number, limit: number): Promise<number> {
    let at = from;
    parser.line = this.#line;
    parser.records = this.#records;
    for (;;) {
      at = parser.parse(this.#feed.buffer, at, limit);
      if (parser.stop !== 'full') break;
      await this.flush();
    }
    this.#line = parser.line;
    this.#records = parser.records;
    return at;
  }

  /** Takes a record by its texts; false where it is a header that is not right. */
  async #take(record: CsvRecord): Promise<boolean> {
    if (isBlank(record.fields)) return true;
    if (!this.#hasHeader) {
      const header = this.#list.takeHeader(record, this.#delimiter);
      if (header === null) return false;
      this.#hasHeader = true;
      this.#block.setOwnColumns(this.#list.ownColumns);
      this.#block.hasParents = header.positions.has('parent');
      const { declarations } = this;
      this.#parser = new RowParser(
        this.#list,
        this.#block,
        this.#groups,
        header,
        this.#delimiter,
        declarations,
        this.#limits,
      );
      return true;
    }
    this.#settle();
    if (this.#records === this.#limits.rows) throw tooManyRows(record.line, this.#limits.rows);
    this.#records += 1;
    const component = this.#list.takeRow(record);
    if (component === null) return true;
    if (this.#block.rows === BLOCK_ROWS) await this.flush();
    this.#free = this.#block.put(component, record.line, this.#groups.numberOf(component.group), this.#free);
    this.#settled = this.#block.rows;
    return true;
  }

  /** Reads the rest of the file as text; `within` says that `from` is where a record begins after the first. */
  async #readAsText(from: number, within: boolean): Promise<boolean> {
    await this.flush();
    const { recordLength } = this.#limits;
    const start = { line: this.#line, bytes: this.#feed.before + from, delimiter: this.#delimiter };
    const batches = readRecords(this.#feed.rest(from), recordLength, undefined, within ? start : null);
    for await (const { records, delimiter, bytes } of batches) {
      this.#delimiter = delimiter;
      for (const record of records) if (!(await this.#takeWithRoom(record))) return false;
      this.#tell(bytes);
    }
    await this.flush();
    refuseEmpty(this.log, this.#hasHeader, this.#records);
    return true;
  }

  /** The buffer is free for the texts of rows then, which take three bytes a character at most. */
  async #takeWithRoom(record: CsvRecord): Promise<boolean> {
    if (this.#free + 3 * this.#limits.recordLength > this.#feed.buffer.length) {
      await this.flush();
      this.#free = 0;
    }
    return this.#take(record);
  }

  #isTooLong(fields: readonly string[]): boolean {
    return fields.reduce((length, field) => length + field.length, fields.length) > this.#limits.recordLength;
  }

  /** Gives the rows at hand away. */
  async flush(): Promise<void> {
    const block = this.#block;
    if (block.rows === 0) return;
    this.#settle();
    if (block.rows > 0) {
      const waiting = this.options.onBlock(block);
      if (waiting !== undefined) await waiting;
    }
    block.first += block.rows;
    block.rows = 0;
    this.#settled = 0;
    this.#parser?.clear();
  }

  /** Notes the items of the rows that were read since the last time. */
  #settle(): void {
    if (this.#block.rows > this.#settled) this.#parser?.noteItems(this.#settled);
    this.#settled = this.#block.rows;
  }

  #tell(bytes: number): void {
    this.options.onProgress?.({ rows: this.#records, bytes });
  }
}
