import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Choice, type DraftEdit } from '@/lib/contracts/list-draft';
import { editedTexts, type Texts } from '@/lib/editing/edits';
import { merge, settle } from '@/lib/editing/merge';
import { restated, unlike } from '@/lib/editing/restate';
import { declarations } from '@/tests/support/mass';
import { byItem, editsOf } from './support';

const before = byItem([
  { item: 'A', mass: '7.3', x: '100', note: 'first' },
  { item: 'B', mass: '2', x: '110' },
  { item: 'C', mass: '4', x: '120' },
]);

const change = (item: string, fields: Record<string, string>): DraftEdit => ({
  kind: 'change',
  item,
  fields,
});

function against(edit: DraftEdit, ...rows: Texts[]) {
  return merge([edit], { before, theirs: byItem(rows) });
}

describe('merging edits with a newer revision', () => {
  it('keeps an edit of a row that they left alone', () => {
    const edit = change('A', { mass: '7.4' });
    const same = { item: 'A', mass: '7.30', x: '100', note: 'first' };
    expect(against(edit, same)).toEqual({ edits: [edit], clashes: [], together: [], settled: [] });
  });

  it('takes fields that one side changed, and names the rows that both worked on', () => {
    const edit = change('A', { mass: '7.4' });
    const theirs = { item: 'A', mass: '7.3', x: '101', note: '' };
    expect(against(edit, theirs)).toEqual({ edits: [edit], clashes: [], together: ['A'], settled: [] });
  });

  it('leaves nothing to do of what they did too', () => {
    expect(
      against(change('A', { mass: '7.4' }), { item: 'A', mass: '7.40', x: '100', note: 'first' }),
    ).toEqual({
      edits: [],
      clashes: [],
      together: [],
      settled: ['A'],
    });
    expect(against({ kind: 'remove', item: 'A' })).toMatchObject({ edits: [], settled: ['A'] });
  });

  it('refuses a field that both changed, with both versions and the one before', () => {
    const theirs = { item: 'A', mass: '7.5', x: '101', note: 'first' };
    expect(against(change('A', { mass: '7.4', note: 'weighed' }), theirs)).toEqual({
      edits: [],
      clashes: [
        {
          key: 'row A',
          item: 'A',
          kind: 'fields',
          fields: [{ column: 'mass', before: '7.3', mine: '7.4', theirs: '7.5' }],
        },
      ],
      together: [],
      settled: [],
    });
  });

  it('refuses what one changed and the other removed, whichever way', () => {
    expect(against(change('A', { mass: '7.4' })).clashes).toMatchObject([
      { kind: 'they-removed', fields: [{ column: 'mass', before: '7.3', mine: '7.4', theirs: null }] },
    ]);
    const theirs = { item: 'A', mass: '7.5', x: '100', note: 'first' };
    expect(against({ kind: 'remove', item: 'A' }, theirs).clashes).toMatchObject([
      { kind: 'i-removed', fields: [{ column: 'mass', before: '7.3', mine: null, theirs: '7.5' }] },
    ]);
  });

  it('refuses rows of one item that both added, unless they are alike', () => {
    const add: DraftEdit = { kind: 'add', id: 'n', place: 1, fields: { item: 'N', mass: '1', x: '5' } };
    expect(against(add, { item: 'N', mass: '1', x: '6' }).clashes).toMatchObject([
      { key: 'new n', kind: 'both-added', fields: [{ column: 'x', before: null, mine: '5', theirs: '6' }] },
    ]);
    expect(against(add, { item: 'N', mass: '1.0', x: '5', note: 'theirs' }).settled).toEqual(['N']);
  });

  it('never takes either side of a field that both changed, and takes every other change of both', () => {
    const columns = ['mass', 'x', 'note'] as const;
    const value = fc.constantFrom('1', '2', '3');
    const version = fc.record({ mass: value, x: value, note: value });
    fc.assert(
      fc.property(version, version, version, (was, mine, theirs) => {
        const edited = Object.fromEntries(
          columns.filter((name) => mine[name] !== was[name]).map((name) => [name, mine[name]]),
        );
        if (Object.keys(edited).length === 0) return;
        const sides = { before: byItem([{ item: 'A', ...was }]), theirs: byItem([{ item: 'A', ...theirs }]) };
        const merged = merge([change('A', edited)], sides);
        const both = columns.filter(
          (name) => mine[name] !== was[name] && theirs[name] !== was[name] && mine[name] !== theirs[name],
        );
        expect(merged.clashes.flatMap(({ fields }) => fields.map(({ column }) => column)).sort()).toEqual(
          [...both].sort(),
        );
        if (both.length > 0) return;
        const texts = editedTexts({ item: 'A', ...theirs }, merged.edits[0]);
        for (const name of columns)
          expect(texts?.[name]).toBe(mine[name] === was[name] ? theirs[name] : mine[name]);
      }),
    );
  });
});

describe('choosing between two versions', () => {
  const theirs = byItem([
    { item: 'A', mass: '7.5', x: '101', note: 'first' },
    { item: 'C', mass: '5', x: '120' },
    { item: 'N', mass: '1', x: '6' },
  ]);
  const edits = editsOf(
    change('A', { mass: '7.4', x: '99', note: 'weighed' }),
    change('B', { mass: '3' }),
    { kind: 'remove', item: 'C' },
    { kind: 'add', id: 'n', place: 4, fields: { item: 'N', mass: '1', x: '5' } },
  );
  const sides = { before, theirs };
  const { clashes } = merge(edits.values(), sides);
  const chosen = (...choices: Choice[]) => settle(edits, clashes, choices, sides);

  it('leaves open what is not chosen, field by field', () => {
    expect(chosen().open).toEqual(clashes);
    const half = chosen({ key: 'row A', column: 'mass', take: 'mine' });
    expect(half.open.map(({ key }) => key)).toEqual(['row A', 'row B', 'row C', 'new n']);
  });

  it('takes each field from the side that was chosen, and keeps the fields that did not clash', () => {
    const { edits: made } = chosen(
      { key: 'row A', column: 'mass', take: 'theirs' },
      { key: 'row A', column: 'x', take: 'mine' },
    );
    expect(made).toEqual([change('A', { x: '99', note: 'weighed' })]);
  });

  it('for the whole of every row: mine', () => {
    const take = clashes.map(({ key }): Choice => ({ key, column: null, take: 'mine' }));
    const { edits: made, open } = chosen(...take);
    expect(open).toEqual([]);
    expect(made).toEqual([
      change('A', { mass: '7.4', x: '99', note: 'weighed' }),
      {
        kind: 'add',
        id: expect.stringMatching(/^back-1-[a-z0-9]+$/),
        place: 5,
        fields: { item: 'B', mass: '3', x: '110' },
      },
      { kind: 'remove', item: 'C' },
      change('N', { x: '5' }),
    ]);
  });

  it('for the whole of every row: theirs, which leaves only what did not clash', () => {
    const take = clashes.map(({ key }): Choice => ({ key, column: null, take: 'theirs' }));
    expect(chosen(...take)).toEqual({ edits: [change('A', { note: 'weighed' })], open: [] });
  });
});

describe('edits under other declarations', () => {
  it('are carried over with the units, the sign of products and the meaning of uncertainties', () => {
    const old = declarations({
      massUnit: 'lb',
      lengthUnit: 'in',
      products: 'negative',
      uncertainty: '2sigma',
    });
    const now = declarations({
      massUnit: 'kg',
      lengthUnit: 'mm',
      products: 'positive',
      uncertainty: '1sigma',
    });
    const edit = change('A', { mass: '1', x: '100', ixy: '3', mass_sigma: '2', note: '10', z: 'wrong' });
    // 1 lb = 0.45359237 kg, 1 in = 25.4 mm exactly (NIST SP 811, B.8).
    expect(restated(edit, old, now)).toEqual(
      change('A', {
        mass: '0.45359237',
        x: '2540',
        ixy: '-3',
        mass_sigma: '0.45359237',
        note: '10',
        z: 'wrong',
      }),
    );
  });

  it('cannot be carried over to other axes, another frame, kind or extent', () => {
    const list = declarations();
    expect(unlike(list, { ...list, massUnit: 'lb', marking: 'x' })).toBeNull();
    expect(unlike(list, { ...list, axes: ['aft', 'right', 'up'] })).toBe('other axes');
    expect(unlike(list, { ...list, pose: { ...list.pose, yaw: 0.1 } })).toBe('another frame');
    expect(unlike(list, { ...list, extent: 'left-half' })).toBe('another extent');
  });
});
