import { describe, expect, it } from 'vitest';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { rejoined } from '@/lib/editing/rejoin';
import { editsOf } from './support';

const change = (item: string, fields: Record<string, string>): DraftEdit => ({
  kind: 'change',
  item,
  fields,
});
const NONE = editsOf();

describe('Bringing two windows of one draft together', () => {
  it('makes again what only this window changed, and leaves what only the other did', () => {
    const kept = editsOf(change('A', { mass: '1' }), change('B', { mass: '2' }), change('C', { mass: '3' }));
    const mine = editsOf(change('A', { mass: '1.5' }), change('B', { mass: '2' }));
    const theirs = editsOf(
      change('A', { mass: '1' }),
      change('B', { mass: '2.5' }),
      change('C', { mass: '3' }),
    );
    expect(rejoined(kept, mine, theirs)).toEqual({
      changes: [
        { key: 'row A', after: change('A', { mass: '1.5' }) },
        { key: 'row C', after: null },
      ],
      leftBehind: [],
    });
  });

  it('takes fields of one row from both, and names the field that both changed', () => {
    const kept = editsOf(change('A', { mass: '1' }));
    const mine = editsOf(change('A', { mass: '2', x: '5' }));
    const theirs = editsOf(change('A', { mass: '3', note: 'n' }));
    expect(rejoined(kept, mine, theirs)).toEqual({
      changes: [{ key: 'row A', after: change('A', { mass: '3', note: 'n', x: '5' }) }],
      leftBehind: [{ key: 'row A', column: 'mass', text: '2' }],
    });
  });

  it('names a row that one window removed and the other changed', () => {
    const removed: DraftEdit = { kind: 'remove', item: 'A' };
    const typed = editsOf(change('A', { mass: '2', note: '' }));
    expect(rejoined(NONE, typed, editsOf(removed)).leftBehind).toEqual([
      { key: 'row A', column: null, text: 'mass 2, note blank' },
    ]);
    expect(rejoined(NONE, editsOf(removed), typed).leftBehind).toEqual([
      { key: 'row A', column: null, text: 'removed' },
    ]);
  });

  it('has nothing to do where both say the same, whatever the order of their fields', () => {
    const [a, b] = [change('A', { mass: '1', x: '2' }), change('A', { x: '2', mass: '1' })];
    expect(rejoined(NONE, editsOf(a), editsOf(b))).toEqual({ changes: [], leftBehind: [] });
  });
});
