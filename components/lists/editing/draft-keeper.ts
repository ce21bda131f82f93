import { AskFailed } from '@/components/lists/ask';
import {
  type Draft,
  type DraftEdit,
  type DraftPatch,
  PATCH_ROWS,
  type PatchedDraft,
} from '@/lib/contracts/list-draft';
import { type EditProblem } from '@/lib/contracts/list-edits';
import { type Edits, keyOf } from '@/lib/editing/edits';
import { differences } from '@/lib/editing/history';
import { alike } from '@/lib/editing/rejoin';

/** What the server has of a draft, and how it stands with what is typed since. */
export interface Keeping {
  /** `elsewhere`: another window changed the draft. `failed`: not answered or refused; it is tried again. */
  readonly state: 'kept' | 'waiting' | 'failed' | 'elsewhere';
  /** 0 before anything is kept. */
  readonly version: number;
  readonly changedAt: string | null;
  /** Of the edits as a set, as the server sees them. */
  readonly problems: readonly EditProblem[];
  readonly failure: string | null;
}

interface Services {
  readonly send: (patch: DraftPatch) => Promise<PatchedDraft>;
  readonly load: () => Promise<Draft | null>;
  /** Told what the server has and what it is to have, whenever either changes. */
  readonly note: (kept: Edits, wanted: Edits) => void;
}

const REST_MS = 500;
const FIRST_RETRY_MS = 2_000;
const LAST_RETRY_MS = 30_000;
const PATCH_LENGTH = 400_000;

/** Keeps edits on the server as they are made: a moment after the last one, only what differs, one patch at a time. */
export class DraftKeeper {
  #kept: Edits;
  #wanted: Edits;
  #now: Keeping;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #running: Promise<void> | null = null;
  #retryMs = FIRST_RETRY_MS;
  /** A patch that was sent and not answered: the server may have taken it. */
  #unanswered = false;

  constructor(
    private readonly base: number,
    draft: Draft | null,
    private readonly services: Services,
    private readonly onChange: () => void,
  ) {
    this.#kept = new Map(draft?.edits.map((edit) => [keyOf(edit), edit]));
    this.#wanted = this.#kept;
    this.#now = {
      state: 'kept',
      version: draft?.version ?? 0,
      changedAt: draft?.changedAt ?? null,
      problems: draft?.problems ?? [],
      failure: null,
    };
  }

  get now(): Keeping {
    return this.#now;
  }

  /** The edits as the server has them. */
  get kept(): Edits {
    return this.#kept;
  }

  want(edits: Edits): void {
    this.#wanted = edits;
    if (this.#now.state === 'elsewhere') {
      this.#set({});
      return;
    }
    this.#set({ state: 'waiting' });
    this.#later(REST_MS);
  }

  /** Sends what is left at once; true when the server then has everything. */
  async flush(): Promise<boolean> {
    clearTimeout(this.#timer);
    await this.#run();
    return this.#now.state === 'kept';
  }

  /** Goes on from the draft as another window has left it. */
  rejoin(draft: Draft | null): void {
    this.#kept = new Map(draft?.edits.map((edit) => [keyOf(edit), edit]));
    this.#set({
      state: 'waiting',
      version: draft?.version ?? 0,
      changedAt: draft?.changedAt ?? null,
      problems: draft?.problems ?? [],
      failure: null,
    });
  }

  stop(): void {
    clearTimeout(this.#timer);
  }

  #set(next: Partial<Keeping>): void {
    this.#now = { ...this.#now, ...next };
    this.services.note(this.#kept, this.#wanted);
    this.onChange();
  }

  #later(ms: number): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.#run(), ms);
  }

  #run(): Promise<void> {
    this.#running ??= this.#sendAll().finally(() => {
      this.#running = null;
    });
    return this.#running;
  }

  async #sendAll(): Promise<void> {
    for (;;) {
      if (this.#now.state === 'elsewhere') return;
      const patch = this.#nextPatch();
      if (patch === null) {
        this.#set({ state: 'kept', failure: null });
        return;
      }
      try {
        this.#took(patch, await this.services.send(patch));
      } catch (error) {
        if (!(error instanceof AskFailed)) throw error;
        if (!(await this.#survives(patch, error))) return;
      }
    }
  }

  #nextPatch(): DraftPatch | null {
    const { put, drop } = differences(this.#kept, this.#wanted);
    if (put.length === 0 && drop.length === 0) return null;
    const some: DraftEdit[] = [];
    let length = 0;
    for (const edit of put) {
      length += JSON.stringify(edit).length;
      if (some.length > 0 && (length > PATCH_LENGTH || some.length === PATCH_ROWS)) break;
      some.push(edit);
    }
    return { base: this.base, version: this.#now.version, put: some, drop: drop.slice(0, PATCH_ROWS) };
  }

  #took(patch: DraftPatch, answer: Pick<PatchedDraft, 'version' | 'changedAt' | 'problems'>): void {
    this.#kept = patched(this.#kept, patch);
    this.#retryMs = FIRST_RETRY_MS;
    this.#unanswered = false;
    const { version, changedAt, problems } = answer;
    this.#set({ state: 'waiting', version, changedAt, problems, failure: null });
  }

  /** Whether to go on sending after a failure. */
  async #survives(patch: DraftPatch, error: AskFailed): Promise<boolean> {
    if (error.status === 409) {
      if (this.#unanswered && (await this.#wasTaken(patch))) return true;
      this.#set({ state: 'elsewhere', failure: error.message });
      return false;
    }
    if (error.status === 0) this.#unanswered = true;
    this.#set({ state: 'failed', failure: error.message });
    this.#later(this.#retryMs);
    this.#retryMs = Math.min(2 * this.#retryMs, LAST_RETRY_MS);
    return false;
  }

  /** Whether the server has taken a patch whose answer was lost: its draft is then what ours would be. */
  async #wasTaken(patch: DraftPatch): Promise<boolean> {
    const draft = await this.services.load();
    const ours = patched(this.#kept, patch);
    if (draft === null || draft.base !== this.base || draft.edits.length !== ours.size) return false;
    if (!draft.edits.every((edit) => alike(edit, ours.get(keyOf(edit))))) return false;
    this.#took(patch, draft);
    return true;
  }
}

function patched(edits: Edits, { put, drop }: Pick<DraftPatch, 'put' | 'drop'>): Edits {
  const next = new Map(edits);
  for (const key of drop) next.delete(key);
  for (const edit of put) next.set(keyOf(edit), edit);
  return next;
}
