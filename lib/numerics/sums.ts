/** a + b = sum + error exactly (Knuth, TAOCP vol. 2, 4.2.2). */
export function sumError(a: number, b: number, sum: number): number {
  const bRounded = sum - a;
  return a - (sum - bRounded) + (b - bRounded);
}

// 2^27 + 1 halves a double's 53-bit significand (Veltkamp).
export const SPLITTER = 134217729;

/** a b = product + error exactly (Dekker 1971), as long as no term over- or underflows. */
export function productError(a: number, b: number, product: number): number {
  const aShift = SPLITTER * a;
  const aHigh = aShift - (aShift - a);
  const aLow = a - aHigh;
  const bShift = SPLITTER * b;
  const bHigh = bShift - (bShift - b);
  const bLow = b - bHigh;
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

/** A running sum whose error does not grow with the number of terms (Neumaier 1974). */
export class CompensatedSum {
  #sum = 0;
  #lost = 0;

  add(term: number): void {
    const sum = this.#sum + term;
    this.#lost += sumError(this.#sum, term, sum);
    this.#sum = sum;
  }

  /** Adds a b without rounding the product (Ogita, Rump and Oishi 2005, Dot2). */
  addProduct(a: number, b: number): void {
    const product = a * b;
    this.add(product);
    this.#lost += productError(a, b, product);
  }

  get value(): number {
    return this.#sum + this.#lost;
  }

  /** What `value` leaves out: value and rest are the sum to twice the precision. */
  get rest(): number {
    return sumError(this.#sum, this.#lost, this.value);
  }
}

/** The same for several running sums that always grow together: `length` numbers at a time. */
export class CompensatedSums {
  readonly #sums;
  readonly #lost;

  constructor(length: number) {
    this.#sums = new Float64Array(length);
    this.#lost = new Float64Array(length);
  }

  /** Adds k times each term without rounding the product; `rest` is what rounding left out of the terms. */
  add(terms: ArrayLike<number>, k = 1, rest?: ArrayLike<number>): void {
    const [sums, lost] = [this.#sums, this.#lost];
    if (k === 1 && rest === undefined) {
      for (let i = 0; i < sums.length; i += 1) {
        const [before, term] = [sums[i] ?? NaN, terms[i] ?? NaN];
        const sum = before + term;
        lost[i] = (lost[i] ?? NaN) + sumError(before, term, sum);
        sums[i] = sum;
      }
      return;
    }
    for (let i = 0; i < sums.length; i += 1) {
      const [before, factor] = [sums[i] ?? NaN, terms[i] ?? NaN];
      const term = k * factor;
      const sum = before + term;
      let error = sumError(before, term, sum);
      if (k !== 1) error += productError(k, factor, term);
      if (rest !== undefined) error += k * (rest[i] ?? NaN);
      lost[i] = (lost[i] ?? NaN) + error;
      sums[i] = sum;
    }
  }

  get values(): number[] {
    return Array.from(this.#sums, (sum, i) => sum + (this.#lost[i] ?? NaN));
  }

  /** What `values` leave out: values and rests are the sums to twice the precision. */
  get rests(): number[] {
    return Array.from(this.#sums, (sum, i) => {
      const lost = this.#lost[i] ?? NaN;
      return sumError(sum, lost, sum + lost);
    });
  }
}
