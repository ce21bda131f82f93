/** Keeps those of many that weigh most, without regard to sign, in memory that does not grow with their number. */
export class Largest<T> {
  readonly #kept: { readonly weight: number; readonly order: number; readonly of: T }[] = [];
  #seen = 0;
  #least = 0;

  constructor(readonly most: number) {}

  /** Whether one of this weight would be kept: asked before anything is made of it. */
  takes(weight: number): boolean {
    return this.#kept.length < this.most || Math.abs(weight) > this.#least;
  }

  add(weight: number, of: T): void {
    const order = this.#seen;
    this.#seen += 1;
    if (!this.takes(weight)) return;
    this.#kept.push({ weight: Math.abs(weight), order, of });
    // Sorted now and then: what is above the limit is let go of in one go.
    if (this.#kept.length >= 2 * this.most) this.#settle();
  }

  /** Largest first; of equal ones the earlier first. */
  all(): T[] {
    this.#settle();
    return this.#kept.map(({ of }) => of);
  }

  #settle(): void {
    this.#kept.sort((a, b) => b.weight - a.weight || a.order - b.order);
    this.#kept.length = Math.min(this.#kept.length, this.most);
    this.#least = this.#kept.length < this.most ? 0 : (this.#kept.at(-1)?.weight ?? 0);
  }
}
