import { z } from 'zod';
import { type DraftEdit, draftEditSchema } from '@/lib/contracts/list-draft';
import { type Edits, keyOf } from '@/lib/editing/edits';
import { differences } from '@/lib/editing/history';

/** What was typed and has not reached the server: per key what the server had, and what is to be. */
const journalSchema = z.object({
  base: z.number().int(),
  was: z.array(draftEditSchema),
  put: z.array(draftEditSchema),
  drop: z.array(z.string()),
});

export interface Unsent {
  readonly kept: Edits;
  readonly wanted: Edits;
}

/** Keeps in this browser what the server has not got yet, so that not even a crash between two keystrokes loses it. */
export class Journal {
  /** `key` names the list and the person. */
  constructor(
    private readonly storage: Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>,
    private readonly key: string,
    private readonly base: number,
  ) {}

  write(kept: Edits, wanted: Edits): void {
    const { put, drop } = differences(kept, wanted);
    if (put.length === 0 && drop.length === 0) {
      this.storage.removeItem(this.key);
      return;
    }
    const was = [...put.map(keyOf), ...drop].flatMap((key) => kept.get(key) ?? []);
    try {
      this.storage.setItem(this.key, JSON.stringify({ base: this.base, was, put, drop }));
    } catch (error) {
      // The browser's room is full: the edits are on their way to the server all the same.
      if (!(error instanceof DOMException) || error.name !== 'QuotaExceededError') throw error;
      this.storage.removeItem(this.key);
    }
  }

  /** What a window left unsent, if it was of the same revision; null where nothing is. */
  read(): Unsent | null {
    const text = this.storage.getItem(this.key);
    if (text === null) return null;
    const told = journalSchema.safeParse(JSON.parse(text));
    if (!told.success || told.data.base !== this.base) return null;
    const { was, put, drop } = told.data;
    const kept = new Map(was.map((edit) => [keyOf(edit), edit]));
    const wanted = new Map([...kept, ...put.map((edit): [string, DraftEdit] => [keyOf(edit), edit])]);
    for (const key of drop) wanted.delete(key);
    return { kept, wanted };
  }
}
