import type pg from 'pg';
import { type RowRange } from '@/db/queries/revision-rows';
import { type Fingerprint, fingerprint, type FingerprintKey } from './fingerprint';
import { RowBytes, VALUES_AT } from './row-bytes';
import { componentOf, type StoredRow } from './row-codec';

/** So many rows come as one value, so that the driver need not take each apart. */
const CHUNK = 16_384;
const RECORD = 28;
/** Rows without a fingerprint are read whole, so many at a time. */
const WHOLE = 2_000;

/** The rows of a revision by their fingerprints: 36 bytes a row, whatever it holds. */
export class FormerRows {
  readonly rowNos: Int32Array;
  readonly sortKeys: Float64Array;
  readonly #prints: Fingerprint;
  /** Open addressing; index + 1, 0 where free. */
  readonly #table: Int32Array;
  readonly #mask: number;
  #size = 0;
  #order: Float64Array | null = null;

  constructor(capacity: number) {
    this.rowNos = new Int32Array(capacity);
    this.sortKeys = new Float64Array(capacity);
    this.#prints = new Int32Array(4 * capacity);
    const slots = 2 ** Math.ceil(Math.log2(Math.max(2, capacity * 1.5)));
    this.#table = new Int32Array(slots);
    this.#mask = slots - 1;
  }

  get size(): number {
    return this.#size;
  }

  add(rowNo: number, sortKey: number, print: Fingerprint): void {
    const index = this.#size;
    this.#size += 1;
    this.rowNos[index] = rowNo;
    this.sortKeys[index] = sortKey;
    this.#prints.set(print, 4 * index);
    let slot = (print[0] ?? 0) & this.#mask;
    while (this.#table[slot] !== 0) slot = (slot + 1) & this.#mask;
    this.#table[slot] = index + 1;
  }

  /** The index of the row with this fingerprint, -1 if there is none. */
  find(print: Fingerprint): number {
    const prints = this.#prints;
    for (let slot = (print[0] ?? 0) & this.#mask; ; slot = (slot + 1) & this.#mask) {
      const index = (this.#table[slot] ?? 0) - 1;
      if (index < 0) return -1;
      const k = 4 * index;
      if (
        prints[k] === print[0] &&
        prints[k + 1] === print[1] &&
        prints[k + 2] === print[2] &&
        prints[k + 3] === print[3]
      )
        return index;
    }
  }

  /** The largest sort key, 0 without rows. */
  get lastKey(): number {
    return this.#inOrder().at(-1) ?? 0;
  }

  /** The smallest sort key above `key`, Infinity when there is none. */
  keyAfter(key: number): number {
    const order = this.#inOrder();
    let [low, high] = [0, order.length];
    while (low < high) {
      const middle = (low + high) >>> 1;
      if ((order[middle] ?? Infinity) > key) high = middle;
      else low = middle + 1;
    }
    return order[low] ?? Infinity;
  }

  #inOrder(): Float64Array {
    return (this.#order ??= this.sortKeys.slice(0, this.#size).sort());
  }
}

/** Reads the fingerprints of a revision's rows; those of rows that were stored without one are worked out. */
export async function loadFormerRows(
  client: pg.PoolClient,
  range: RowRange,
  key: FingerprintKey,
): Promise<FormerRows> {
  const former = new FormerRows(range.lastRow - range.lastEnd);
  const print: Fingerprint = new Int32Array(4);
  const { rows } = await client.query<{ chunk: Buffer }>(
    `select string_agg(int4send(row_no) || int8send(sort_key) || uuid_send(fingerprint), '') as chunk
      from row_versions r where ${IN_RANGE} and fingerprint is not null group by row_no / ${CHUNK}`,
    valuesOf(range),
  );
  for (const { chunk } of rows) {
    const view = new DataView(chunk.buffer, chunk.byteOffset, chunk.byteLength);
    for (let at = 0; at < chunk.length; at += RECORD) {
      for (let k = 0; k < 4; k += 1) print[k] = view.getInt32(at + 12 + 4 * k);
      former.add(view.getInt32(at), Number(view.getBigInt64(at + 4)), print);
    }
  }
  if (former.size < range.lastRow - range.lastEnd) await workOut(client, range, key, former);
  if (former.size !== range.lastRow - range.lastEnd)
    throw new Error(`the revision should have ${range.lastRow - range.lastEnd} rows and has ${former.size}`);
  return former;
}

async function workOut(
  client: pg.PoolClient,
  range: RowRange,
  key: FingerprintKey,
  former: FormerRows,
): Promise<void> {
  const block = new RowBytes(1024);
  const print: Fingerprint = new Int32Array(4);
  for (let after = 0; ;) {
    const { rows } = await client.query<StoredRow>(
      `select * from row_versions r where ${IN_RANGE} and fingerprint is null and row_no > $4 order by row_no limit ${WHOLE}`,
      [...valuesOf(range), after],
    );
    for (const row of rows) {
      block.clear();
      block.add(componentOf(row));
      fingerprint(block.view, VALUES_AT, block.end, key, print);
      former.add(row.row_no, row.sort_key, print);
    }
    const last = rows.at(-1);
    if (last === undefined || rows.length < WHOLE) return;
    after = last.row_no;
  }
}

const IN_RANGE = `r.list_no = $1 and r.row_no <= $2 and not exists (
  select from row_ends e where e.list_no = r.list_no and e.row_no = r.row_no and e.end_no <= $3)`;

function valuesOf({ listNo, lastRow, lastEnd }: RowRange): number[] {
  return [listNo, lastRow, lastEnd];
}
