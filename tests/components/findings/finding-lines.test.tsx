import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { placedFindings } from '@/components/configurations/placed-findings';
import { FindingLines } from '@/components/findings/finding-lines';
import { type PlacedFinding } from '@/lib/findings/finding';

const finding = (said: Partial<PlacedFinding>): PlacedFinding => ({
  rule: 'memo-rows',
  severity: 'note',
  message: 'Row `W-1` is not summed.',
  rows: ['W-1', 'W-2'],
  count: 2,
  where: { kind: 'list', code: 'wing', revision: 3 },
  ...said,
});

const lines = (findings: readonly PlacedFinding[], answer?: string) =>
  renderToStaticMarkup(
    <FindingLines
      findings={placedFindings(findings, 'p', [], null).map((line) => ({ ...line, answer: answer ?? null }))}
    />,
  );

describe('the findings on a page', () => {
  it('stand by severity, blockers first', () => {
    const markup = lines([
      finding({ message: 'third' }),
      finding({ severity: 'warning', message: 'second' }),
      finding({ severity: 'blocker', message: 'first' }),
    ]);
    const places = ['first', 'second', 'third'].map((word) => markup.indexOf(word));
    expect(places).toEqual([...places].sort((a, b) => a - b));
    expect(Math.min(...places)).toBeGreaterThan(0);
  });

  it('lead to the rows of their list with one click, and quote what a row holds', () => {
    const markup = lines([finding({})]);
    expect(markup).toContain('href="/programs/p/lists/wing?revision=3&amp;finding=memo-rows#rows"');
    expect(markup).toContain('Show 2 rows');
    expect(markup).toContain('W-1</code>');
    expect(lines([finding({ count: 900 })])).toContain('Show the first 2 of 900 rows');
  });

  it('name the rows where no page shows them, and carry the answer that the submitter gave', () => {
    const where = { kind: 'condition' as const, code: 'empty' };
    const markup = lines([finding({ where })], 'Weighed twice.');
    expect(markup).toContain('W-1, W-2');
    expect(markup).toContain('Weighed twice.');
  });

  it('say so when there are none', () => {
    expect(lines([])).toContain('saw nothing');
  });
});
