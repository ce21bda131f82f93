/** a + b = sum + error exactly (Knuth, TAOCP vol. 2, 4.2.2). */
function sumError(a: number, b: number, sum: number): number {
  const bRounded = sum - a;
  return a - (sum - bRounded) + (b - bRounded);
}

// 2^27 + 1 halves a double's 53-bit significand (Veltkamp).
const SPLITTER = 134217729;

/** a b = product + error exactly (Dekker 1971), as long as no term over- or underflows. */
function productError(a: number, b: number, product: number): number {
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
}

/** The same for several running sums that always grow together: `length` numbers at a time. */
export class CompensatedSums {
  readonly #sums;
  readonly #lost;

  constructor(length: number) {
    this.#sums = new Float64Array(length);
    this.#lost = new Float64Array(length);
  }

  /** Adds k times each term; the product is rounded. */
  add(terms: ArrayLike<number>, k = 1): void {
    const [sums, lost] = [this.#sums, this.#lost];
    for (let i = 0; i < sums.length; i += 1) {
      const before = sums[i] ?? NaN;
      const term = k * (terms[i] ?? NaN);
      const sum = before + term;
      lost[i] = (lost[i] ?? NaN) + sumError(before, term, sum);
      sums[i] = sum;
    }
  }

  get values(): number[] {
    return Array.from(this.#sums, (sum, i) => sum + (this.#lost[i] ?? NaN));
  }
}
