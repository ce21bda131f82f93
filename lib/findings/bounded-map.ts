/** How many entries a watch keeps at most. */
export const KEPT = 20_000;

/** A map that takes no new key once it is full, so that what a watch keeps does not grow with a list. */
export class BoundedMap<V> {
  readonly #map = new Map<string, V>();

  constructor(readonly most = KEPT) {}

  get(key: string): V | undefined {
    return this.#map.get(key);
  }

  /** Keeps the value unless the map is full and the key new. */
  set(key: string, value: V): void {
    if (this.#map.size < this.most || this.#map.has(key)) this.#map.set(key, value);
  }

  entries(): IterableIterator<[string, V]> {
    return this.#map.entries();
  }
}
