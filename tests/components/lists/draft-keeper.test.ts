import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { AskFailed } from '@/components/lists/ask';
import { DraftKeeper } from '@/components/lists/editing/draft-keeper';
import { Journal } from '@/components/lists/editing/journal';
import { type Draft, type DraftEdit, type DraftPatch, type PatchedDraft } from '@/lib/contracts/list-draft';
import { keyOf } from '@/lib/editing/edits';
import { editsOf } from '@/tests/editing/support';

const change = (item: string, mass: string): DraftEdit => ({ kind: 'change', item, fields: { mass } });

/** A server that keeps one draft by its version, as ours does. */
class Server {
  edits = editsOf();
  version = 0;
  patches: DraftPatch[] = [];
  /** What becomes of the next patches: refused before they are taken, or taken and the answer lost. */
  fate: ('lost before' | 'lost after' | 'down')[] = [];

  send = (patch: DraftPatch): Promise<PatchedDraft> => {
    const fate = this.fate.shift();
    if (fate === 'lost before') return Promise.reject(new AskFailed('no answer', 0));
    if (fate === 'down') return Promise.reject(new AskFailed('not available', 503));
    if (patch.version !== this.version)
      return Promise.reject(new AskFailed('changed in another window', 409));
    this.patches.push(patch);
    this.type(patch);
    if (fate === 'lost after') return Promise.reject(new AskFailed('no answer', 0));
    return Promise.resolve(this.facts());
  };

  type({ put, drop }: Pick<DraftPatch, 'put' | 'drop'>): void {
    for (const key of drop) this.edits.delete(key);
    for (const edit of put) this.edits.set(keyOf(edit), edit);
    this.version += 1;
  }

  facts(): PatchedDraft {
    const at = '2026-12-01T14:32:00.000Z';
    return { base: 1, since: at, changedAt: at, rows: this.edits.size, version: this.version, problems: [] };
  }

  load = (): Promise<Draft | null> =>
    Promise.resolve({ ...this.facts(), edits: [...this.edits.values()], stated: [] });
}

let server: Server;
let keeper: DraftKeeper;
const store = new Map<string, string>();
const storage = {
  getItem: (key: string) => store.get(key) ?? null,
  setItem: (key: string, text: string) => void store.set(key, text),
  removeItem: (key: string) => void store.delete(key),
};
const journal = new Journal(storage, 'here', 1);

beforeEach(() => {
  vi.useFakeTimers();
  store.clear();
  server = new Server();
  keeper = new DraftKeeper(
    1,
    null,
    { send: server.send, load: server.load, note: (kept, wanted) => journal.write(kept, wanted) },
    () => undefined,
  );
});
afterEach(() => {
  keeper.stop();
  vi.useRealTimers();
});

describe('Keeping a draft', () => {
  it('sends one small patch a moment after the last of several edits, and only what differs', async () => {
    keeper.want(editsOf(change('A', '1')));
    keeper.want(editsOf(change('A', '12')));
    const kept = editsOf(change('A', '123'), change('B', '2'));
    keeper.want(kept);
    expect(keeper.now.state).toBe('waiting');
    await vi.advanceTimersByTimeAsync(600);
    expect(server.patches).toEqual([
      { base: 1, version: 0, put: [change('A', '123'), change('B', '2')], drop: [] },
    ]);
    expect(keeper.now).toMatchObject({ state: 'kept', version: 1, changedAt: '2026-12-01T14:32:00.000Z' });
    const next = new Map(kept);
    next.delete('row B');
    keeper.want(next);
    await vi.advanceTimersByTimeAsync(600);
    expect(server.patches[1]).toEqual({ base: 1, version: 1, put: [], drop: ['row B'] });
  });

  it('sends a large paste in patches that a body takes', async () => {
    keeper.want(editsOf(...Array.from({ length: 2500 }, (_, at) => change(`P${at}`, '1'))));
    expect(await keeper.flush()).toBe(true);
    expect(server.patches.map(({ put }) => put.length)).toEqual([1000, 1000, 500]);
    expect(server.edits.size).toBe(2500);
  });

  it('tries again by itself while the server is away, and loses nothing', async () => {
    server.fate = ['down', 'lost before'];
    keeper.want(editsOf(change('A', '1')));
    expect(await keeper.flush()).toBe(false);
    expect(keeper.now).toMatchObject({ state: 'failed', failure: 'not available' });
    await vi.advanceTimersByTimeAsync(60_000);
    expect(keeper.now).toMatchObject({ state: 'kept', version: 1 });
    expect(server.edits).toEqual(editsOf(change('A', '1')));
  });

  it('knows its own patch again when only the answer was lost', async () => {
    server.fate = ['lost after'];
    keeper.want(editsOf(change('A', '1')));
    await keeper.flush();
    expect(keeper.now.state).toBe('failed');
    await vi.advanceTimersByTimeAsync(5_000);
    expect(keeper.now).toMatchObject({ state: 'kept', version: 1 });
    expect(server.patches).toHaveLength(1);
  });

  it('stops, and overwrites nothing, when another window changed the draft', async () => {
    keeper.want(editsOf(change('A', '1')));
    await keeper.flush();
    server.type({ put: [change('B', '9')], drop: [] });
    keeper.want(editsOf(change('A', '2')));
    expect(await keeper.flush()).toBe(false);
    expect(keeper.now.state).toBe('elsewhere');
    keeper.want(editsOf(change('A', '3')));
    await vi.advanceTimersByTimeAsync(60_000);
    expect(server.edits).toEqual(editsOf(change('A', '1'), change('B', '9')));
    keeper.rejoin(await server.load());
    keeper.want(editsOf(change('A', '3'), change('B', '9')));
    await vi.advanceTimersByTimeAsync(600);
    expect(keeper.now.state).toBe('kept');
    expect(server.edits).toEqual(editsOf(change('A', '3'), change('B', '9')));
  });
});

describe('What is not sent yet', () => {
  it('stands in the journal of the browser until the server has it', async () => {
    keeper.want(editsOf(change('A', '1')));
    await keeper.flush();
    expect(journal.read()).toBeNull();
    server.fate = ['down'];
    keeper.want(editsOf(change('B', '2')));
    await keeper.flush();
    expect(journal.read()).toEqual({
      kept: editsOf(change('A', '1')),
      wanted: editsOf(change('B', '2')),
    });
    expect(new Journal(storage, 'here', 2).read()).toBeNull();
    await vi.advanceTimersByTimeAsync(5_000);
    expect(journal.read()).toBeNull();
  });
});
