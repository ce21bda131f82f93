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

  /** The code of a field, -1 for one that is none of the values. */
  code(bytes: Uint8Array, start: number, end: number): number {
    if (start === end) return this.blank;
    for (let k = 0; k < this.#spellings.length; k += 1) {
      const spelling = this.#spellings[k];
      if (spelling !== undefined && isSame(spelling, bytes, start, end)) return this.#codes[k] ?? -1;
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

export function isSame(text: Uint8Array, bytes: Uint8Array, start: number, end: number): boolean {
  const length = end - start;
  if (text.length !== length) return false;
  for (let k = length - 1; k >= 0; k -= 1) if (text[k] !== bytes[start + k]) return false;
  return true;
}
