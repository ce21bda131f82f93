import { isSame } from './bytes';
import { fieldText } from './row-block';

/** Spellings that are remembered of one column. */
const SPELLINGS = 32;

/** The values of a column of few values, found by the bytes of a field. */
export class Choices {
  readonly #spellings: Uint8Array[] = [];
  readonly #codes: number[] = [];

  /** `values` in the order of their codes; `blank` is the code of an empty field. */
  constructor(
    private readonly values: readonly string[],
    readonly blank: number,
  ) {}

  /** The spelling that was asked for last, and its code. */
  last: Uint8Array = new Uint8Array(0);
  lastCode = -1;

  /** The code of a field, -1 for one that is none of the values. */
  code(bytes: Uint8Array, start: number, end: number): number {
    for (let k = 0; k < this.#spellings.length; k += 1) {
      const spelling = this.#spellings[k];
      if (spelling === undefined || !isSame(spelling, bytes, start, end)) continue;
      this.last = spelling;
      this.lastCode = this.#codes[k] ?? -1;
      return this.lastCode;
    }
    const text = fieldText(bytes, start, end).trim().toLowerCase();
    const code = text === '' ? this.blank : this.values.findIndex((value) => value.toLowerCase() === text);
    if (code !== -1 && this.#spellings.length < SPELLINGS) {
      this.#spellings.push(bytes.slice(start, end));
      this.#codes.push(code);
    }
    return code;
  }
}
