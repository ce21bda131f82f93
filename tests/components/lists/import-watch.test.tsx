import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it, vi } from 'vitest';
import { ImportWatch } from '@/components/lists/import-watch';
import { QueryRoot } from '@/components/lists/query-root';
import { type ImportView } from '@/lib/contracts/list-imports';

vi.mock('next/navigation', () => ({ useRouter: () => ({ replace: () => undefined }) }));

const running: ImportView = {
  import: 'i',
  state: 'running',
  file: 'wing.csv',
  reason: 'weighed',
  rows: 250_000,
  ofRows: 1_000_000,
  secondsLeft: 42,
  unchanged: false,
  revision: null,
  problems: [],
  counts: [],
  failure: null,
  inForce: 3,
};

/** What the page says, without its markup. */
function said(found: Partial<ImportView>, mayUpload = true): string {
  const page = renderToStaticMarkup(
    <QueryRoot>
      <ImportWatch
        initial={{ ...running, ...found }}
        from="/from"
        listHref="/lists/wing"
        mayUpload={mayUpload}
      />
    </QueryRoot>,
  );
  return page.replace(/<[^>]*>/g, ' ').replace(/\s+/g, ' ');
}

describe('The page of an import', () => {
  it('tells rows done of how many, the time left, and how to call it off', () => {
    expect(said({})).toMatch(/250 000 of 1 000 000 rows.*About 45 seconds left\..*Cancel import/);
    expect(said({ secondsLeft: 3 })).toContain('A few seconds left.');
    expect(said({ secondsLeft: 61 })).toContain('About 2 minutes left.');
  });

  it('says so where nothing tells the time, before it begins and when the rows are read', () => {
    expect(said({ secondsLeft: null })).toContain('Too early to say how long it takes.');
    expect(said({ state: 'waiting', rows: 0, secondsLeft: null })).toContain('It has not begun.');
    expect(said({ rows: 1_000_000 })).toContain('All rows are read; they are being stored.');
  });

  it('offers nothing to those who may only look', () => {
    expect(said({}, false)).not.toContain('Cancel import');
  });

  it('says of one that was called off what stays in force', () => {
    expect(said({ state: 'cancelled' })).toMatch(
      /The import was called off.*Nothing of it was kept; revision 3 stays in force\./,
    );
  });

  it('names the revision that a file is already', () => {
    const page = said({ state: 'done', revision: 3, unchanged: true });
    expect(page).toMatch(/This file is revision 3 already.*No new revision was made\./);
    expect(said({ state: 'done', revision: 4, rows: 5 })).toContain('Revision 4 is made of this file');
  });
});
