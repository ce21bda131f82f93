import { ask, AskFailed } from '@/components/lists/ask';
import { type RowPage, rowPageSchema, ROWS_PER_PAGE } from '@/lib/contracts/list-rows';
import { type Draft } from '@/lib/contracts/list-draft';
import { type Texts, textsOfRow } from '@/lib/editing/edits';
import { type BaseRow } from '@/lib/editing/sheet';

/** Rows of the base revision that are here, whatever view they came by. */
export class KnownRows {
  readonly #texts = new Map<string, Texts>();
  /** Places in the whole list, from 0. */
  readonly places = new Map<string, number>();

  constructor(draft: Draft | null) {
    for (const { index, row } of draft?.stated ?? []) {
      const texts = textsOfRow(row);
      this.#texts.set(texts['item'] ?? '', texts);
      this.places.set(texts['item'] ?? '', index);
    }
  }

  textsOf = (item: string): Texts | null => this.#texts.get(item) ?? null;

  take(row: BaseRow, place: number | null): void {
    this.#texts.set(row.item, row.texts);
    if (place !== null) this.places.set(row.item, place);
  }
}

/** The rows of one view of the base revision, by line, loaded a page at a time as they are wanted. */
export class BaseRows {
  readonly #rows = new Map<number, BaseRow>();
  readonly #lines = new Map<string, number>();
  readonly #underway = new Map<number, Promise<void>>();
  readonly #listeners = new Set<() => void>();
  /** Changes with whatever arrives. */
  age = 0;
  /** Null until the first page is here. */
  total: number | null = null;
  failure: AskFailed | null = null;

  constructor(
    private readonly route: string,
    readonly query: string,
    private readonly known: KnownRows,
    /** The first page of the view, where it is at hand. */
    first: RowPage | null,
  ) {
    if (first !== null) this.#take(first);
  }

  subscribe = (changed: () => void): (() => void) => {
    this.#listeners.add(changed);
    return () => this.#listeners.delete(changed);
  };

  rowAt = (line: number): BaseRow | null => this.#rows.get(line) ?? null;

  lineOf(item: string): number | null {
    return this.#lines.get(item) ?? null;
  }

  /** Loads what is missing of some lines, ends included. What fails is told by `failure`. */
  async load(first: number, last: number): Promise<void> {
    const end = this.total === null ? last : Math.min(last, this.total - 1);
    const pages: Promise<void>[] = [];
    for (
      let page = Math.floor(Math.max(0, first) / ROWS_PER_PAGE);
      page * ROWS_PER_PAGE <= Math.max(0, end);
      page += 1
    )
      if (this.total === null || page * ROWS_PER_PAGE < this.total) pages.push(this.#page(page));
    await Promise.all(pages);
  }

  #page(page: number): Promise<void> {
    if (this.#rows.has(page * ROWS_PER_PAGE)) return Promise.resolve();
    const underway =
      this.#underway.get(page) ??
      this.#fetch(page * ROWS_PER_PAGE).finally(() => this.#underway.delete(page));
    this.#underway.set(page, underway);
    return underway;
  }

  async #fetch(offset: number): Promise<void> {
    const params = new URLSearchParams(this.query);
    params.set('offset', String(offset));
    try {
      this.#take(await ask(`${this.route}/rows?${params.toString()}`, rowPageSchema));
      this.failure = null;
    } catch (error) {
      if (!(error instanceof AskFailed)) throw error;
      this.failure = error;
    }
    this.age += 1;
    for (const changed of this.#listeners) changed();
  }

  #take({ offset, total, rows }: RowPage): void {
    this.total = total;
    for (const [at, stated] of rows.entries()) {
      const texts = textsOfRow(stated);
      const row = { item: texts['item'] ?? '', texts };
      this.#rows.set(offset + at, row);
      this.#lines.set(row.item, offset + at);
      this.known.take(row, this.query === '' ? offset + at : null);
    }
  }
}
