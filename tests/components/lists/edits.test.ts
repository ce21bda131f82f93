import { describe, expect, it } from 'vitest';
import { changeOf, textsOf, withEdit } from '@/components/lists/edits';
import { type RowEdit } from '@/lib/contracts/list-edits';
import { type ListRow } from '@/lib/contracts/list-rows';

const row: ListRow = {
  cells: { item: 'A', mass: 7.3, note: 'first' },
  own: { Zone: '12' },
};

describe('The change that a form makes to a row', () => {
  it('holds the fields that differ and what they were, and nothing else', () => {
    const form = { ...textsOf(row), mass: ' 7.4 ', note: '', Zone: '12', x: '' };
    expect(changeOf(row, form)).toEqual({
      kind: 'change',
      item: 'A',
      fields: { mass: '7.4', note: '' },
      seen: { mass: '7.3', note: 'first' },
    });
  });

  it('is none when the form says what the row says', () => {
    expect(changeOf(row, textsOf(row))).toBeNull();
  });
});

describe('Gathering edits', () => {
  const change = (fields: Record<string, string>, seen: Record<string, string>): RowEdit => ({
    kind: 'change',
    item: 'A',
    fields,
    seen,
  });

  it('merges the edits of one row and keeps what was seen first', () => {
    const once = withEdit([], change({ mass: '7.4' }, { mass: '7.3' }));
    expect(withEdit(once, change({ mass: '7.5', note: 'x' }, { mass: '7.4', note: 'first' }))).toEqual([
      change({ mass: '7.5', note: 'x' }, { mass: '7.3', note: 'first' }),
    ]);
  });

  it('drops a field that is put back, and an edit without fields', () => {
    const once = withEdit([], change({ mass: '7.4', note: 'x' }, { mass: '7.3', note: 'first' }));
    const back = withEdit(once, change({ mass: '7.3' }, { mass: '7.3' }));
    expect(back).toEqual([change({ note: 'x' }, { note: 'first' })]);
    expect(withEdit(back, change({ note: 'first' }, { note: 'first' }))).toEqual([]);
  });

  it('lets a removal take the place of a change, and takes an added row out again', () => {
    expect(withEdit([change({ mass: '1' }, { mass: '7.3' })], { kind: 'remove', item: 'A' })).toEqual([
      { kind: 'remove', item: 'A' },
    ]);
    expect(withEdit([{ kind: 'add', fields: { item: 'B' } }], { kind: 'remove', item: 'B' })).toEqual([]);
  });
});
