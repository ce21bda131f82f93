import { type CheckBlock } from './columns/check-block';
import { type RowFacts } from './row-facts';

/** What several rules keep of the rows of one list, kept once: each rule enters every row, and the first entry counts. */
export abstract class Book<T> {
  #last: RowFacts | null = null;
  #answer: T | undefined;

  /** What the book says of the row; the same for all rules. */
  enter(row: RowFacts): T {
    if (this.#last !== row || this.#answer === undefined) {
      this.#last = row;
      this.#answer = this.take(row);
    }
    return this.#answer;
  }

  protected abstract take(row: RowFacts): T;
}

/** The same for rows that come in blocks: each rule enters every block, and the first entry counts. */
export abstract class BlockBook {
  #serial = 0;

  enter(block: CheckBlock): void {
    if (block.serial === this.#serial) return;
    this.#serial = block.serial;
    this.take(block);
  }

  protected abstract take(block: CheckBlock): void;
}

/** The books of one list, one of each kind. */
export class SharedBooks {
  readonly #books: object[] = [];

  of<B extends object>(kind: new () => B): B {
    const known = this.#books.find((book): book is B => book instanceof kind);
    if (known !== undefined) return known;
    const made = new kind();
    this.#books.push(made);
    return made;
  }
}
