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

  it('on removals lead to each removal, which its list does not know by the finding', () => {
    const markup = lines([finding({ rule: 'removal-exceeds-row', rows: ['-P-7'], count: 1 })]);
    expect(markup).toContain('href="/programs/p/lists/wing?revision=3&amp;find=-P-7&amp;row=-P-7#rows"');
    expect(markup).not.toContain('finding=');
  });

  it('on groups of a condition lead to the components of each', () => {
    const where = { kind: 'condition' as const, code: 'empty' };
    for (const rule of ['impossible-group', 'group-without-mass', 'beyond-allocation']) {
      const [line] = placedFindings([finding({ rule, rows: ['Wing/Ribs'], where })], 'p', [], 'c');
      const [link] = line?.groups ?? [];
      const href = new URL(link?.href ?? '', 'http://x');
      expect(href.pathname).toBe('/programs/p/configurations/c/views');
      expect(href.searchParams.get('within')).toBe('Wing/Ribs');
      expect(href.searchParams.get('condition')).toBe('empty');
    }
  });

  it('say so when there are none', () => {
    expect(lines([])).toContain('saw nothing');
  });
});
