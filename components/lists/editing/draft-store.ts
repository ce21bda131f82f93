import { ask } from '@/components/lists/ask';
import { DraftKeeper, type Keeping } from '@/components/lists/editing/draft-keeper';
import { type Journal } from '@/components/lists/editing/journal';
import { type Draft, draftSchema, patchedDraftSchema } from '@/lib/contracts/list-draft';
import { type Edits, keyOf } from '@/lib/editing/edits';
import { freshHistory, type History, redone, undone, withStep } from '@/lib/editing/history';
import { type LeftBehind, rejoined } from '@/lib/editing/rejoin';
import { type Change } from '@/lib/editing/sheet';

export interface DraftState {
  readonly history: History;
  readonly keeping: Keeping;
  /** What was typed in this browser and not taken up, for the draft was changed elsewhere meanwhile. */
  readonly leftBehind: readonly LeftBehind[];
}

/** The edits of one person's draft in this window, with the way back, kept on the server as they are made. */
export class DraftStore {
  readonly #listeners = new Set<() => void>();
  readonly #keeper: DraftKeeper;
  #history: History;
  #leftBehind: readonly LeftBehind[] = [];
  #state: DraftState;

  constructor(
    private readonly route: string,
    base: number,
    draft: Draft | null,
    private readonly journal: Journal,
  ) {
    this.#history = freshHistory((draft?.edits ?? []).map((edit) => [keyOf(edit), edit]));
    this.#keeper = new DraftKeeper(
      base,
      draft,
      {
        send: (patch) => ask(this.route, patchedDraftSchema, json('PATCH', patch)),
        load: () => this.#load(),
        note: (kept, wanted) => this.journal.write(kept, wanted),
      },
      () => this.#tell(),
    );
    this.#state = { history: this.#history, keeping: this.#keeper.now, leftBehind: this.#leftBehind };
  }

  subscribe = (changed: () => void): (() => void) => {
    this.#listeners.add(changed);
    return () => this.#listeners.delete(changed);
  };

  get = (): DraftState => this.#state;

  step(changes: readonly Change[]): void {
    this.#go(withStep(this.#history, changes));
  }

  undo(): void {
    this.#go(undone(this.#history));
  }

  redo(): void {
    this.#go(redone(this.#history));
  }

  /** True when the server has everything. */
  flush(): Promise<boolean> {
    return this.#keeper.flush();
  }

  stop(): void {
    this.#keeper.stop();
  }

  /** Takes up what a window that was closed left unsent; what the draft has otherwise since is named. */
  takeUnsent(): void {
    const unsent = this.journal.read();
    if (unsent === null) return;
    const { changes, leftBehind } = rejoined(unsent.kept, unsent.wanted, this.#history.edits);
    this.#leftBehind = leftBehind;
    this.step(changes);
    this.journal.write(this.#keeper.kept, this.#history.edits);
    this.#tell();
  }

  forgetLeftBehind(): void {
    this.#leftBehind = [];
    this.#tell();
  }

  /** Goes on from the draft as another window has left it; what both windows changed stays theirs and is named. */
  async takeOther(): Promise<void> {
    const draft = await this.#load();
    const theirs: Edits = new Map(draft?.edits.map((edit) => [keyOf(edit), edit]));
    const { changes, leftBehind } = rejoined(this.#keeper.kept, this.#history.edits, theirs);
    this.#leftBehind = leftBehind;
    this.#keeper.rejoin(draft);
    this.#history = withStep(freshHistory(theirs), changes);
    this.#keeper.want(this.#history.edits);
  }

  #load(): Promise<Draft | null> {
    return ask(this.route, draftSchema.nullable());
  }

  #go(next: History): void {
    if (next === this.#history) return;
    this.#history = next;
    this.#keeper.want(next.edits);
  }

  #tell(): void {
    this.#state = { history: this.#history, keeping: this.#keeper.now, leftBehind: this.#leftBehind };
    for (const changed of this.#listeners) changed();
  }
}

export function json(method: string, body: unknown): RequestInit {
  return { method, headers: { 'Content-Type': 'application/json' }, body: JSON.stringify(body) };
}
