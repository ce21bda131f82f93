import { describe, expect, it } from 'vitest';
import { type DraftEdit } from '@/lib/contracts/list-draft';
import { type Texts } from '@/lib/editing/edits';
import { Ledger, problemsByKey } from '@/lib/editing/ledger';
import { RowReader } from '@/lib/editing/read-row';
import { type Account, AccountSum, readAccount } from '@/lib/mass/account';
import { Placement } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { randomNumbers } from '@/tests/support/random';
import { declarations, geometry } from '@/tests/support/mass';
import { byItem, editsOf } from './support';

const list = declarations({ massUnit: 'lb', lengthUnit: 'in', inertiaUnit: 'lb.in2', products: 'negative' });
const frame = geometry({ reference: [1, 0.5, -0.25] });

const row = (item: string, mass: string, x: string, y: string, z: string, more: Texts = {}): Texts => ({
  item,
  mass,
  x,
  y,
  z,
  ...more,
});

/** The sums of rows made from scratch. */
function whole(rows: readonly Texts[]): Account {
  const [reader, placement, sum] = [new RowReader(list), new Placement(list, frame), new AccountSum()];
  for (const texts of rows) {
    const { component, problems } = reader.read(texts);
    if (component === null) throw new Error(problems.map(({ message }) => message).join());
    if (component.counting === 'counted') sum.add(placement.account(component));
  }
  return sum.account;
}

describe('the running effect of edits', () => {
  it('of two point masses is that of the textbook: reduced mass times the distance squared', () => {
    // Two points m1, m2 a distance d apart: I = m1 m2 / (m1 + m2) d² about the CG (Goldstein, Classical Mechanics, 3.1: reduced mass).
    const si = declarations();
    const ledger = new Ledger(si, geometry());
    const rows = byItem([row('A', '2', '0', '0', '0'), row('B', '3', '0', '1', '0')]);
    const start = new AccountSum();
    const [placement, reader] = [new Placement(si, geometry()), new RowReader(si)];
    for (const texts of rows.values()) {
      const { component } = reader.read(texts);
      if (component !== null) start.add(placement.account(component));
    }
    const edits = editsOf({ kind: 'change', item: 'B', fields: { mass: '6', y: '4' } });
    const { account } = ledger.effect(start.account, edits, (item) => rows.get(item) ?? null);
    const { mass, properties } = resultOf(account, geometry());
    expect(mass).toBe(8);
    expect(properties?.cg[1]).toBeCloseTo(3, 14);
    expect(properties?.inertia.ixx).toBeCloseTo((2 * 6 * 16) / 8, 12);
    expect(properties?.inertia.iyy).toBeCloseTo(0, 12);
  });

  it('agrees with the edited list summed from scratch, after hundreds of edits of every kind', () => {
    const random = randomNumbers(7);
    const number = (size: number): string => ((random() - 0.5) * size).toFixed(3);
    const rows = Array.from({ length: 400 }, (_, index) =>
      row(`P${index}`, (1 + 40 * random()).toFixed(2), number(900), number(700), number(90), {
        ixx: '30.5',
        iyy: '28.25',
        izz: '41',
        ixy: number(2),
        ...(index % 7 === 0 ? { symmetry: 'pair' } : {}),
        ...(index % 11 === 0 ? { counting: 'memo' } : {}),
      }),
    );
    const base = byItem(rows);
    const edits = rows.flatMap(({ item = '' }, index): DraftEdit[] => {
      if (index % 3 === 0)
        return [{ kind: 'change', item, fields: { mass: (1 + random()).toFixed(3), x: number(900) } }];
      if (index % 5 === 0) return [{ kind: 'remove', item }];
      if (index % 13 === 0) return [{ kind: 'change', item, fields: { counting: 'memo' } }];
      return [];
    });
    const added: DraftEdit[] = [{ kind: 'add', id: 'q', place: 1, fields: row('N', '12', '10', '-3', '4') }];
    const all = editsOf(...edits, ...added);
    const result = rows.flatMap((texts): Texts[] => {
      const edit = all.get(`row ${texts['item']}`);
      if (edit === undefined) return [texts];
      return edit.kind === 'change' ? [{ ...texts, ...edit.fields }] : [];
    });
    const want = readAccount(whole([...result, row('N', '12', '10', '-3', '4')]));
    const got = new Ledger(list, frame).effect(whole(rows), all, (item) => base.get(item) ?? null);
    const read = readAccount(got.account);
    if (want === null || read === null) throw new Error('no mass');
    expect(got.leftOut).toBe(0);
    expect(Math.abs(read.mass - want.mass)).toBeLessThanOrEqual(1e-15 * want.mass);
    for (const at of [0, 1, 2] as const) expect(read.place[at]).toBeCloseTo(want.place[at], 13);
    for (const name of ['xx', 'yy', 'zz', 'xy', 'xz', 'yz'] as const)
      expect(Math.abs(read.tensor[name] - want.tensor[name])).toBeLessThan(1e-14 * want.tensor.zz);
  });

  it('counts a row with a problem as it was, and a new one not at all, and says how many', () => {
    const rows = byItem([row('A', '2', '0', '0', '0'), row('B', '3', '0', '1', '0')]);
    const sums = whole([...rows.values()]);
    const edits = editsOf(
      { kind: 'change', item: 'A', fields: { mass: 'heavy', x: '99' } },
      { kind: 'add', id: 'n', place: 1, fields: { item: 'C', mass: '5' } },
    );
    const effect = new Ledger(list, frame).effect(sums, edits, (item) => rows.get(item) ?? null);
    expect(effect.leftOut).toBe(2);
    expect(effect.account.mass).toBe(sums.mass);
  });
});

describe('a cell says what is wrong as a file would', () => {
  const problems = (fields: Texts) =>
    new RowReader(list)
      .read({ ...row('A', '2', '0', '0', '0'), ...fields })
      .problems.map(({ column, message }) => [column, message]);

  it.each<[string, Texts, string, RegExp]>([
    ['a formula', { mass: '=A1*2' }, 'mass', /`=A1\*2` is a formula\./],
    ['a comma that may separate thousands', { x: '12,500' }, 'x', /thousands separator.*`12500`.*`12\.500`/],
    ['a blank where a number is needed', { z: '' }, 'z', /z is blank/],
    ['a negative mass', { mass: '-2' }, 'mass', /negative/],
    ['a negative uncertainty', { x_sigma: '-1' }, 'x_sigma', /zero or more/],
    ['a word that is not known', { category: 'emptty' }, 'category', /not known here/],
    ['a part of a piece', { quantity: '1.5' }, 'quantity', /whole number/],
    ['inertia without mass', { mass: '0', iyy: '3' }, 'iyy', /without mass/],
  ])('%s', (_title, fields, column, words) => {
    expect(problems(fields)).toEqual([[column, expect.stringMatching(words)]]);
  });

  it('lets a text begin like a formula, as a file does', () => {
    const read = new RowReader(list).read({ ...row('=W-3', '2', '0', '0', '0'), note: '=not a formula' });
    expect(read.component).toMatchObject({ item: '=W-3', note: '=not a formula' });
  });

  it('adds what only the whole list shows, and that an item stays', () => {
    const rows = byItem([row('A', '2', '0', '0', '0')]);
    const edits = editsOf({ kind: 'change', item: 'A', fields: { item: 'Z' } });
    const ofSet = new Map([['row A', [{ column: 'parent', message: 'no such row' }]]]);
    const found = problemsByKey(new Ledger(list, frame), edits, (item) => rows.get(item) ?? null, ofSet);
    expect(found.get('row A')?.map(({ column }) => column)).toEqual(['item', 'parent']);
  });
});
