import { describe, expect, it } from 'vitest';
import { findingsOnLimits } from '@/lib/findings/limits/look';
import { ruleOf } from '@/lib/findings/rules';
import { inForce, type Limit, limitStandings, tightest } from '@/lib/loading/limits';
import { type Component } from '@/lib/mass/component';
import { Placement } from '@/lib/mass/place';
import { rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

const LIMIT: Limit = {
  kind: 'contract',
  quantity: 'mass',
  sense: 'at-most',
  value: 30,
  group: '',
  condition: null,
  frameIssue: null,
  source: 'a contract',
  sourceDate: '2026-01-05',
  from: '2026-01-05',
  until: null,
};

/* Two points of 10 kg at x = ±1 m in group Wing and one of 5 kg at x = 3 m, y = 1 m in Body; E grows by 10 %. */
const ROWS: readonly Partial<Component>[] = [
  { group: 'Wing/Left', mass: 10, position: [1, 0, 0], maturity: 'E' },
  { group: 'Wing/Right', mass: 10, position: [-1, 0, 0], maturity: 'E' },
  { group: 'Body', mass: 5, position: [3, 1, 0], maturity: 'A' },
];
const AIRFRAME = geometry({ lemac: [5, 0, 0], mac: 4 } as never);

function condition(code: string, rows = ROWS) {
  const book = new SubtotalBook(new Placement(declarations(), AIRFRAME));
  rows.forEach((row, index) => book.add(aComponent({ item: `R${index}`, ...row })));
  return {
    code,
    title: `Condition ${code}`,
    rollUp: rollUp(book.subtotals(), [], AIRFRAME, { E: 0.1, C: 0, A: 0 }),
  };
}

const stand = (limit: Partial<Limit>, conditions = [condition('empty')], issue: number | null = 1) =>
  limitStandings([{ ...LIMIT, ...limit }], conditions, AIRFRAME, issue);
const one = (limit: Partial<Limit>) => {
  const [standing, ...more] = stand(limit);
  if (standing === undefined || more.length > 0) throw new Error('one limit, one condition');
  return standing;
};

describe('how a figure stands to a limit', () => {
  it('is basic, predicted and the room of both, from the side that the limit is on', () => {
    expect(one({ value: 30 })).toMatchObject({
      basic: 25,
      predicted: 27,
      margin: { basic: 5, predicted: 3 },
      verdict: 'within',
    });
    expect(one({ value: 26 })).toMatchObject({
      margin: { basic: 1, predicted: -1 },
      verdict: 'predicted-beyond',
    });
    expect(one({ value: 24 })).toMatchObject({ margin: { basic: -1, predicted: -3 }, verdict: 'beyond' });
    expect(one({ value: 24, sense: 'at-least' })).toMatchObject({
      margin: { basic: 1, predicted: 3 },
      verdict: 'within',
    });
    expect(one({ value: 26, sense: 'at-least' })).toMatchObject({ verdict: 'beyond' });
  });

  it('is no breach by what rounding of a sum may do', () => {
    expect(one({ value: 25 })).toMatchObject({ margin: { basic: 0 }, verdict: 'predicted-beyond' });
    expect(one({ value: 27 * (1 - 1e-13) }).verdict).toBe('within');
    expect(one({ value: 27 * (1 - 1e-9) }).verdict).toBe('predicted-beyond');
  });

  it('is of a group with those below it about the group’s own CG, in mass, CG, moments and products', () => {
    expect(one({ group: 'Wing', value: 21 })).toMatchObject({
      basic: 20,
      predicted: 22,
      verdict: 'predicted-beyond',
    });
    // Two points of 10 kg, 1 m on either side of their CG: Iyy = Izz = 2 · 10 · 1² (first principles).
    expect(one({ group: 'Wing', quantity: 'izz', value: 19.9 })).toMatchObject({
      basic: 20,
      verdict: 'beyond',
    });
    expect(one({ group: 'Wing', quantity: 'izz', value: 23 })).toMatchObject({ verdict: 'within' });
    expect(one({ group: 'Wing', quantity: 'cgx', frameIssue: 1, value: 0 })).toMatchObject({
      basic: 0,
      verdict: 'within',
    });
    // Ixy = Σ m (x - xc)(y - yc) = 5 · 3 · 1 - 25 · 0.6 · 0.2 = 12, the positive integral; body axes are the airframe's here.
    const product = one({ quantity: 'ixy', value: 11 });
    expect(product.basic).toBeCloseTo(12, 12);
    expect(product.verdict).toBe('beyond');
  });

  it('reads a CG in % of the mean chord', () => {
    // 100 a·(r_cg - r_LEMAC)/MAC with a = -x: the CG at x = 0.6, LEMAC at 5, MAC 4 (domain, section 3).
    expect(one({ quantity: 'percentMac', value: 100 }).basic).toBeCloseTo((100 * (5 - 0.6)) / 4, 10);
  });

  it('is asked of the condition it is about, or of every one', () => {
    const two = [condition('empty'), condition('take-off', [...ROWS, { group: 'Load', mass: 8 }])];
    expect(stand({}, two).map(({ condition: { code }, basic }) => [code, basic])).toEqual([
      ['empty', 25],
      ['take-off', 33],
    ]);
    expect(stand({ condition: 'take-off' }, two).map(({ verdict }) => verdict)).toEqual(['beyond']);
    expect(stand({ condition: 'landing' }, two)).toMatchObject([
      { verdict: 'no-condition', condition: { code: 'landing' } },
    ]);
  });

  it('says why it is not judged: no row in the group, no CG, a place in another frame issue', () => {
    expect(one({ group: 'Tail' })).toMatchObject({ verdict: 'not-judged', basic: null });
    expect(one({ group: 'Tail' }).obstacle).toContain('Tail');
    expect(one({ group: 'Wing/Left', quantity: 'ixx', value: 1 }).verdict).toBe('within');
    const removed = [condition('empty', [...ROWS, { group: 'Removed', mass: -2 }])];
    expect(stand({ group: 'Removed', quantity: 'cgx', frameIssue: 1 }, removed)[0]?.verdict).toBe(
      'not-judged',
    );
    const elsewhere = stand({ quantity: 'cgx', frameIssue: 2 })[0];
    expect(elsewhere).toMatchObject({ verdict: 'not-judged' });
    expect(elsewhere?.obstacle).toContain('frame issue 2');
  });

  it('counts from its first day to its last', () => {
    const limit = { from: '2026-01-05', until: '2026-02-01' };
    const days = ['2026-01-04', '2026-01-05', '2026-02-01', '2026-02-02'];
    expect(days.map((day) => inForce(limit, day))).toEqual([false, true, true, false]);
    expect(inForce({ from: '2026-01-05', until: null }, '2999-01-01')).toBe(true);
  });

  it('is drawn by the tightest on each side, of the whole aircraft and that condition', () => {
    const limits: Limit[] = [
      { ...LIMIT, value: 30 },
      { ...LIMIT, value: 28, condition: 'empty' },
      { ...LIMIT, value: 20, condition: 'take-off' },
      { ...LIMIT, value: 1, group: 'Wing' },
      { ...LIMIT, value: 10, sense: 'at-least' },
      { ...LIMIT, value: 12, sense: 'at-least', kind: 'target' },
    ];
    const { least, most } = tightest(limits, 'mass', 'empty');
    expect([least?.value, most?.value]).toEqual([12, 28]);
    expect(tightest(limits, 'ixx', 'empty')).toEqual({ least: null, most: null });
  });
});

describe('findings on limits', () => {
  const found = (...limits: readonly Partial<Limit>[]) =>
    findingsOnLimits(
      limitStandings(
        limits.map((limit) => ({ ...LIMIT, ...limit })),
        [condition('empty')],
        AIRFRAME,
        1,
      ),
    );

  it.each([
    ['contract', 'warning'],
    ['specification', 'warning'],
    ['target', 'note'],
    ['allocation', 'note'],
  ] as const)('beyond a %s: a %s, basic or only predicted, and nothing within it', (kind, severity) => {
    const rule = `beyond-${kind}`;
    expect(found({ kind, value: 27.001 })).toEqual([]);
    expect(found({ kind, value: 26.999 })).toMatchObject([{ rule, severity }]);
    expect(found({ kind, value: 24 })).toMatchObject([
      { rule, severity, rows: [], count: 1, where: { kind: 'condition', code: 'empty' } },
    ]);
    expect(ruleOf(rule)?.severity).toBe(severity);
  });

  it('say the figure, the room and the limit with their unit, and name the groups', () => {
    const [finding, ...more] = found(
      { value: 24 },
      { group: 'Wing', value: 21, source: 'DN-1' },
      { group: 'Body', value: 6 },
    );
    expect(more).toEqual([]);
    expect(finding?.message).toBe(
      '2 figures are beyond their contract. Basic mass is 25 kg, 1 kg beyond the most allowed, 24 kg (a contract). ' +
        'Predicted mass of Wing is 22 kg, 1 kg beyond the most allowed, 21 kg (DN-1); basic is within.',
    );
    expect(finding?.rows).toEqual(['Wing']);
  });

  it('note what is not judged, and say nothing of a limit about another condition', () => {
    expect(found({ group: 'Tail' })).toMatchObject([
      { rule: 'limit-not-judged', severity: 'note', rows: ['Tail'] },
    ]);
    expect(found({ condition: 'landing', value: 1 })).toEqual([]);
  });
});
