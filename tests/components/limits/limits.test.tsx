import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { HistoryChart } from '@/components/baselines/history-chart';
import { placedFindings } from '@/components/configurations/placed-findings';
import { StandingTable } from '@/components/limits/standing-table';
import { maturityLines } from '@/components/mass/maturity-lines';
import { MaturityTable } from '@/components/mass/maturity-table';
import { type Limit, limitStandings } from '@/lib/loading/limits';
import { Placement } from '@/lib/mass/place';
import { type GrowthAllowances, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

const ALLOWANCES: GrowthAllowances = {
  E: 0.1,
  C: 0.04,
  A: 0,
  groups: [{ group: 'Wing', maturity: 'E', fraction: 0.2 }],
};
const book = new SubtotalBook(new Placement(declarations(), geometry()));
[
  aComponent({ item: 'a', group: 'Wing/Spars', mass: 30, maturity: 'E' }),
  aComponent({ item: 'b', group: 'Wing/Ribs', mass: 10, maturity: 'C' }),
  aComponent({ item: 'c', group: 'Body', mass: 60, maturity: 'A' }),
].forEach((row) => book.add(row));
const TOTAL = rollUp(book.subtotals(), [], geometry(), ALLOWANCES);
const text = (markup: string): string => markup.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ');

describe('the mass of all baselines', () => {
  const points = [
    { number: 1, build: 'Design', mass: 4200, predicted: 4300 },
    { number: 2, build: 'Design', mass: 4220, predicted: 4310 },
  ];
  const drawn = (value: number) =>
    renderToStaticMarkup(
      <HistoryChart
        label="mass"
        unit="kg"
        points={points}
        limits={[{ value, words: 'contract, at most' }]}
      />,
    );
  const ticks = (markup: string): number[] =>
    [...markup.matchAll(/text-anchor="end"[^>]*>(\d+)</g)].map(([, tick]) => Number(tick));

  it('is drawn to its own scale however far a limit lies, which stands at the edge with its figure', () => {
    const far = drawn(7450);
    expect(Math.max(...ticks(far))).toBeLessThan(4500);
    expect(text(far)).toContain('contract, at most 7450 kg, above this drawing');
    expect(text(drawn(1000))).toContain('contract, at most 1000 kg, below this drawing');
  });

  it('has a line for a limit that lies near', () => {
    const near = drawn(4350);
    expect(text(near)).toContain('contract, at most 4350 kg');
    expect(text(near)).not.toContain('this drawing');
    expect(Math.max(...ticks(near))).toBeGreaterThanOrEqual(4350);
  });
});

describe('mass by maturity on a page', () => {
  const lines = maturityLines(TOTAL, geometry(), ALLOWANCES) ?? [];

  it('says for each group which rule gives the growth', () => {
    expect(lines.map(({ group, rule }) => [group, rule])).toEqual([
      ['Body', 'E 10 %, C 4 %, A 0 % by the program'],
      ['Wing', 'E 20 % by Wing; C 4 %, A 0 % by the program'],
      ['Wing/Ribs', 'E 20 % by Wing; C 4 %, A 0 % by the program'],
      ['Wing/Spars', 'E 20 % by Wing; C 4 %, A 0 % by the program'],
    ]);
  });

  it('shows top groups with kg and share, and folds those below', () => {
    const whole = { basic: 100, predicted: 106.4, byMaturity: { E: 30, C: 10, A: 60, none: 0 } };
    const shown = text(renderToStaticMarkup(<MaturityTable lines={lines} whole={whole} unit="kg" />));
    // 30 kg of the wing's 40 kg are estimated.
    expect(shown).toMatch(/Wing 30 \. 00 75 \. 0 %/);
    expect(shown).not.toContain('Spars');
    expect(shown).toContain('Unfold all groups');
  });

  it('is nothing, not zero, for results of before it was kept', () => {
    const { byMaturity, ...stored } = TOTAL;
    expect(byMaturity).toBeDefined();
    expect(maturityLines(stored, geometry(), ALLOWANCES)).toBeNull();
  });
});

describe('limits on a page', () => {
  const limit: Limit = {
    kind: 'contract',
    quantity: 'mass',
    sense: 'at-most',
    value: 39,
    group: 'Wing',
    condition: null,
    frameIssue: null,
    source: 'DN-1',
    sourceDate: '2026-01-05',
    from: '2026-01-05',
    until: null,
  };
  const condition = { code: 'empty', title: 'Empty', rollUp: TOTAL };

  it('tell figure, room and how it stands, in the units asked for, one click from the components', () => {
    const standings = limitStandings([limit], [condition], geometry(), 1);
    const markup = (system: 'si' | 'us') =>
      renderToStaticMarkup(
        <StandingTable
          standings={standings}
          units={OUTPUT_UNITS[system]}
          rowsHref={(code, group) => `/rows?${code}&${group}`}
        />,
      );
    expect(markup('si')).toContain('href="/rows?empty&amp;Wing"');
    expect(markup('si')).toMatch(/<data value="-1"/);
    expect(text(markup('si'))).toMatch(/Mass Wing, Empty kg .*Beyond .*Contract DN-1/);
    // 39 kg over 0.45359237 kg in a pound, exact (NIST SP 811).
    expect(markup('us')).toContain(`value="${39 / 0.45359237}"`);
  });

  it('lead from a finding to the components of each group', () => {
    const [finding] = placedFindings(
      [
        {
          rule: 'beyond-contract',
          severity: 'warning',
          message: 'x',
          rows: ['Wing', 'Body'],
          count: 2,
          where: { kind: 'condition', code: 'empty' },
        },
      ],
      'hopper',
      [condition],
      'release',
    );
    expect(finding?.groups).toEqual([
      {
        words: 'Components of Wing',
        href: '/programs/hopper/configurations/release/views?condition=empty&within=Wing',
      },
      {
        words: 'Components of Body',
        href: '/programs/hopper/configurations/release/views?condition=empty&within=Body',
      },
    ]);
  });
});
