import { createHash } from 'node:crypto';
import type pg from 'pg';
import { type RowRange } from '@/db/queries/revision-rows';
import { BinaryCopy } from './copy-stream';
import { type Fingerprint, fingerprint, type FingerprintKey } from './fingerprint';
import { type FormerRows, loadFormerRows } from './former-rows';
import { FINGERPRINT_AT, LIST_NO_AT, ROW_NO_AT, RowBytes, SORT_KEY_AT, VALUES_AT } from './row-bytes';
import { PLACE_COLUMNS, VALUE_COLUMNS } from './row-codec';
import { RowPlan, SPACING } from './row-plan';

/** Rows are gathered to so many bytes before they are looked at together. */
const BLOCK = 128 * 1024;
/** So many bytes of fresh rows may wait until it is known where they stand. */
const WAITING = 16 * 1024 * 1024;
/** So many moved rows are stored by one statement. */
const MOVED = 50_000;

const COLUMNS = [...PLACE_COLUMNS, ...VALUE_COLUMNS];

/** A list's rows as its newest revision left them, and what its rows are known again by. */
export interface ListRows extends RowRange {
  readonly key: FingerprintKey;
}

export interface StoredContent {
  readonly rows: number;
  readonly lastRow: number;
  readonly lastEnd: number;
  readonly contentSha256: string;
}

/**
 * Stores the rows of a list's next revision: of those that its newest one has too, nothing but where they have moved to; what
 * waits in memory is bounded. The caller holds the list and the transaction, and gives the rows in their order.
 */
export class RowStore {
  /** The next row is written here; then `took`. */
  readonly block = new RowBytes(2 * BLOCK);
  readonly #hash;
  readonly #fresh = new RowBytes(64);
  readonly #print: Fingerprint = new Int32Array(4);
  readonly #moved: { readonly from: number[]; readonly to: number[]; readonly keys: number[] } = {
    from: [],
    to: [],
    keys: [],
  };
  readonly #plan: RowPlan | null;
  readonly #kept: Uint8Array;
  #copy: BinaryCopy | null = null;
  #rows = 0;
  #lastRow: number;

  private constructor(
    private readonly client: pg.PoolClient,
    private readonly list: ListRows,
    private readonly former: FormerRows | null,
    head: string,
  ) {
    this.#hash = createHash('sha256').update(head);
    this.#lastRow = list.lastRow;
    this.#kept = new Uint8Array(former?.size ?? 0);
    this.#plan =
      former === null
        ? null
        : new RowPlan(former, {
            fresh: (mark, sortKey) => this.#place(this.#fresh, mark, sortKey),
            moved: (index, sortKey) => this.#move(former.rowNos[index] ?? 0, sortKey),
            kept: (index) => {
              this.#kept[index] = 1;
            },
          });
  }

  /** `head` begins the content hash. */
  static async open(client: pg.PoolClient, list: ListRows, head: string): Promise<RowStore> {
    const former = list.lastRow > list.lastEnd ? await loadFormerRows(client, list, list.key) : null;
    return new RowStore(client, list, former, head);
  }

  get rows(): number {
    return this.#rows + this.block.starts.length;
  }

  /** After a row has been written to `block`. A promise only where the database has to catch up. */
  took(): Promise<void> | undefined {
    return this.block.end >= BLOCK ? this.#settleBlock() : undefined;
  }

  /** Stores what is left, ends the rows that are gone, and says what it all amounts to. */
  async finish(): Promise<StoredContent> {
    await this.#settleBlock();
    if (this.#plan !== null) await this.#settleFresh(this.#plan, true);
    await this.#copy?.end();
    this.#copy = null;
    await this.#storeMoved();
    const ended = await this.#storeEnds();
    return {
      rows: this.#rows,
      lastRow: this.#lastRow,
      lastEnd: this.list.lastEnd + ended,
      contentSha256: this.#hash.digest('hex'),
    };
  }

  async abort(reason: Error): Promise<void> {
    await this.#copy?.abort(reason);
  }

  async #settleBlock(): Promise<void> {
    const { block } = this;
    if (block.starts.length === 0) return;
    this.#hash.update(block.written);
    this.#rows += block.starts.length;
    if (this.#plan === null) {
      const { starts } = block;
      for (let k = 0; k < starts.length; k += 1) {
        const start = starts[k] ?? 0;
        this.#identify(start, starts[k + 1] ?? block.end);
        this.#place(block, start, SPACING * (this.#lastRow - this.list.lastRow + 1));
      }
      await this.#send(block.take(2 * BLOCK));
      return;
    }
    this.#compare(this.#plan);
    block.clear();
    if (this.#fresh.end >= WAITING) await this.#settleFresh(this.#plan, false);
  }

  #compare(plan: RowPlan): void {
    const { block } = this;
    const { starts } = block;
    for (let k = 0; k < starts.length; k += 1) {
      const start = starts[k] ?? 0;
      const end = starts[k + 1] ?? block.end;
      this.#identify(start, end);
      const index = this.former?.find(this.#print) ?? -1;
      if (index >= 0) plan.known(index);
      else plan.fresh(this.#fresh.append(block.bytes, start, end));
    }
  }

  async #settleFresh(plan: RowPlan, last: boolean): Promise<void> {
    plan.settle(last);
    if (this.#fresh.end > 0) await this.#send(this.#fresh.take(64));
  }

  #identify(start: number, end: number): void {
    const { view } = this.block;
    const print = this.#print;
    fingerprint(view, start + VALUES_AT, end, this.list.key, print);
    for (let k = 0; k < 4; k += 1) view.setInt32(start + FINGERPRINT_AT + 4 * k, print[k] ?? 0);
  }

  #place({ view }: RowBytes, start: number, sortKey: number): void {
    this.#lastRow += 1;
    view.setInt32(start + LIST_NO_AT, this.list.listNo);
    view.setInt32(start + ROW_NO_AT, this.#lastRow);
    view.setInt32(start + SORT_KEY_AT, Math.floor(sortKey / WORD));
    view.setUint32(start + SORT_KEY_AT + 4, sortKey % WORD);
  }

  async #send(rows: Buffer): Promise<void> {
    this.#copy ??= new BinaryCopy(this.client, 'row_versions', COLUMNS);
    await this.#copy.write(rows);
  }

  #move(from: number, sortKey: number): void {
    this.#lastRow += 1;
    this.#moved.from.push(from);
    this.#moved.to.push(this.#lastRow);
    this.#moved.keys.push(sortKey);
  }

  async #storeMoved(): Promise<void> {
    const { from, to, keys } = this.#moved;
    const same = ['fingerprint', ...VALUE_COLUMNS].map((column) => `r.${column}`);
    for (let at = 0; at < from.length; at += MOVED) {
      const part = (all: readonly number[]): number[] => all.slice(at, at + MOVED);
      await this.client.query(
        `insert into row_versions (${COLUMNS.join(', ')})
         select r.list_no, m.to_no, m.sort_key, ${same.join(', ')}
         from unnest($2::int[], $3::int[], $4::bigint[]) m(from_no, to_no, sort_key)
         join row_versions r on r.list_no = $1 and r.row_no = m.from_no`,
        [this.list.listNo, part(from), part(to), part(keys)],
      );
    }
  }

  async #storeEnds(): Promise<number> {
    const { former, list } = this;
    if (former === null) return 0;
    const ends: number[] = [];
    for (let index = 0; index < former.size; index += 1)
      if (this.#kept[index] !== 1) ends.push(former.rowNos[index] ?? 0);
    if (ends.length === 0) return 0;
    this.#copy = new BinaryCopy(this.client, 'row_ends', ['list_no', 'end_no', 'row_no']);
    for (let at = 0; at < ends.length; at += ENDS)
      await this.#copy.write(endBytes(list, ends.slice(at, at + ENDS), at));
    await this.#copy.end();
    this.#copy = null;
    return ends.length;
  }
}

const WORD = 2 ** 32;
/** So many ends go to the socket at once. */
const ENDS = 4096;
const END_BYTES = 26;

function endBytes(list: ListRows, rowNos: readonly number[], before: number): Buffer {
  const bytes = Buffer.allocUnsafeSlow(END_BYTES * rowNos.length);
  let at = 0;
  for (const [k, rowNo] of rowNos.entries()) {
    at = bytes.writeInt16BE(3, at);
    for (const value of [list.listNo, list.lastEnd + before + k + 1, rowNo]) {
      at = bytes.writeInt32BE(4, at);
      at = bytes.writeInt32BE(value, at);
    }
  }
  return bytes;
}
