import { CROWDED, ItemIndex, enlarged, hashOf } from '@/lib/ingest/blocks/item-index';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { type ProblemLog } from '@/lib/ingest/problem-log';

const encoder = new TextEncoder();
const decoder = new TextDecoder('utf-8', { ignoreBOM: true });

/** The items of a list and who belongs to whom: the bytes of each item and a few numbers, whatever the rows hold. */
export class ItemTree {
  readonly #items = new ItemIndex();
  readonly #lines = new Lines();
  readonly #parents = new ItemIndex();
  /** Per item the ordinal of its parent's text + 1, 0 for none; empty until a row has a parent. */
  #parentOf = new Uint32Array(0);

  constructor(private readonly log: ProblemLog) {}

  /** Notes a row; false when its item stands in an earlier line. */
  add(item: string, parent: string | null, line: number, column: string): boolean {
    const bytes = encoder.encode(item);
    if (!this.addBytes(bytes, 0, bytes.length, hashOf(bytes, 0, bytes.length), line, column)) return false;
    if (parent !== null) this.addParentText(parent);
    return true;
  }

  addParentText(parent: string): void {
    const bytes = encoder.encode(parent);
    this.addParent(bytes, 0, bytes.length);
  }

  /** What the table of items holds where one of this `hashOf` would be: asked for early, it is at hand when needed. */
  foresee(hash: number): number {
    return this.#items.foresee(hash);
  }

  /** The same for an item in UTF-8, whose `hashOf` is `hash`; its parent, if any, comes by `addParent`. */
  addBytes(
    bytes: Uint8Array,
    start: number,
    end: number,
    hash: number,
    line: number,
    column: string,
  ): boolean {
    const earlier = this.#items.add(bytes, start, end, hash);
    if (earlier === CROWDED) throw crowded(line, column);
    if (earlier === -1) {
      this.#lines.add(line);
      return true;
    }
    const found = decoder.decode(bytes.subarray(start, end));
    const message = `The ${column} stands already in line ${this.#lines.at(earlier)}. Give every row one of its own.`;
    this.log.add({ kind: `duplicate-${column}`, line, column, found, message });
    return false;
  }

  /** The parent of the item that was added last. */
  addParent(bytes: Uint8Array, start: number, end: number): void {
    const known = this.#parents.add(bytes, start, end, hashOf(bytes, start, end));
    if (known === CROWDED) throw crowded(this.#lines.at(this.#items.count - 1), 'parent');
    const parent = known === -1 ? this.#parents.count - 1 : known;
    const item = this.#items.count - 1;
    if (this.#parentOf.length === 0) this.#parentOf = new Uint32Array(1024);
    while (item >= this.#parentOf.length) this.#parentOf = enlarged(this.#parentOf);
    this.#parentOf[item] = parent + 1;
  }

  /** Logs parents that are not in the list, and circles. To be called after the last row. */
  finish(): void {
    const items = this.#parents.count === 0 ? 0 : Math.min(this.#items.count, this.#parentOf.length);
    const above = this.#parentItems();
    const settled = new Uint8Array(this.#items.count);
    for (let item = 0; item < items; item += 1) {
      const parent = (this.#parentOf[item] ?? 0) - 1;
      if (parent === -1) continue;
      const line = this.#lines.at(item);
      const found = (): string => decoder.decode(this.#parents.bytesOf(parent));
      if (above[parent] === -1) {
        const message = `No row has the item \`${found()}\`. Write the item of the assembly this row belongs to.`;
        this.log.add({ kind: 'unknown-parent', line, column: 'parent', found: found(), message });
      } else if (this.#closesCircle(item, above, settled)) {
        const own = decoder.decode(this.#items.bytesOf(item));
        const message = `\`${own}\` is its own parent, by way of \`${found()}\`. Break the circle.`;
        this.log.add({ kind: 'parent-circle', line, column: 'parent', found: found(), message });
      }
    }
  }

  /** For every text that stands as a parent the item that it names, -1 where there is none. */
  #parentItems(): Int32Array {
    return Int32Array.from({ length: this.#parents.count }, (_, parent) => {
      const bytes = this.#parents.bytesOf(parent);
      return this.#items.find(bytes, 0, bytes.length, hashOf(bytes, 0, bytes.length));
    });
  }

  /** Goes up from an item; `settled` marks what has been gone through before, and is marked. */
  #closesCircle(item: number, above: Int32Array, settled: Uint8Array): boolean {
    const path = new Set<number>();
    let at = item;
    while (at !== -1 && settled[at] === 0 && !path.has(at)) {
      path.add(at);
      const parent = (this.#parentOf[at] ?? 0) - 1;
      at = parent === -1 ? -1 : (above[parent] ?? -1);
    }
    for (const seen of path) settled[seen] = 1;
    return at !== -1 && path.has(at);
  }
}

function crowded(line: number, column: string): CsvFault {
  const message = `The texts of ${column} are too alike to be told apart. Give the rows other ones.`;
  return new CsvFault({ kind: 'crowded', line, column, found: null, message });
}

/** The line of every item, kept only where it is not the next one after the item before. */
class Lines {
  readonly #from: number[] = [];
  readonly #offset: number[] = [];
  #count = 0;

  add(line: number): void {
    const offset = line - this.#count;
    if (offset !== this.#offset.at(-1)) {
      this.#from.push(this.#count);
      this.#offset.push(offset);
    }
    this.#count += 1;
  }

  at(ordinal: number): number {
    let [low, high] = [0, this.#from.length - 1];
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((this.#from[middle] ?? 0) <= ordinal) low = middle;
      else high = middle - 1;
    }
    return ordinal + (this.#offset[low] ?? 0);
  }
}
