/** A value of a row. */
export interface Ranked<T> {
  readonly value: number;
  readonly of: T;
}

/** How many rows at each end may be out of place without hiding each other. */
const ENDS = 3;
/** With fewer rows there is no telling what is usual. */
export const FEWEST = 10;

/**
 * The lowest and the highest values of one quantity over the rows of a group: what lies between them is the core, whatever the
 * rows at the ends are. Keeps 2 (ENDS + 1) rows.
 */
export class Scatter<T> {
  readonly #low: Ranked<T>[] = [];
  readonly #high: Ranked<T>[] = [];
  count = 0;
  /** Values from here to there only count: the ends are beyond them. */
  #from = Infinity;
  #to = -Infinity;

  /** Takes a value in where it is none of the ends; false where it has to be added. */
  pass(value: number): boolean {
    if (!(value >= this.#from && value <= this.#to)) return false;
    this.count += 1;
    return true;
  }

  add(value: number, of: T): void {
    this.count += 1;
    const lowest = this.#low.at(-1);
    if (this.#low.length <= ENDS || (lowest !== undefined && value < lowest.value))
      keep(this.#low, { value, of }, (a, b) => a.value - b.value);
    const highest = this.#high.at(-1);
    if (this.#high.length <= ENDS || (highest !== undefined && value > highest.value))
      keep(this.#high, { value, of }, (a, b) => b.value - a.value);
    if (this.#low.length <= ENDS) return;
    this.#from = this.#low.at(-1)?.value ?? Infinity;
    this.#to = this.#high.at(-1)?.value ?? -Infinity;
  }

  /** The values between the three lowest and the three highest; null where there are too few rows. */
  get core(): readonly [number, number] | null {
    const [low, high] = [this.#low[ENDS], this.#high[ENDS]];
    return this.count < FEWEST || low === undefined || high === undefined ? null : [low.value, high.value];
  }

  /** The three lowest and the three highest rows. */
  get ends(): readonly Ranked<T>[] {
    return [...this.#low.slice(0, ENDS), ...this.#high.slice(0, ENDS)];
  }
}

function keep<T>(list: Ranked<T>[], one: Ranked<T>, order: (a: Ranked<T>, b: Ranked<T>) => number): void {
  list.push(one);
  list.sort(order);
  if (list.length > ENDS + 1) list.pop();
}

/** How far a value is outside a range; 0 within. */
export function outside(value: number, [low, high]: readonly [number, number]): number {
  return Math.max(low - value, value - high, 0);
}
