import fc from 'fast-check';
import Papa from 'papaparse';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it, vi } from 'vitest';
import { type DataColumn, ownDecimals } from '@/components/data-table/column';
import { DataTable } from '@/components/data-table/data-table';
import { toCsv, toTsv } from '@/components/data-table/export-text';
import { groupedLines, groupPaths } from '@/components/data-table/lines';
import { at, bounds, moved } from '@/components/data-table/selection';
import {
  inGroup,
  nextSort,
  paramsWithView,
  columnsShown,
  PLAIN_VIEW,
  type TableView,
  viewFromParams,
} from '@/components/data-table/view';

interface Part {
  readonly item: string;
  readonly group: string;
  readonly mass: number | null;
}
const parts: readonly Part[] = [
  { item: 'B', group: 'Wing/Ribs', mass: 2.5 },
  { item: 'A', group: 'Wing', mass: 10.125 },
  { item: 'C', group: 'Winglet', mass: null },
];
const columns: readonly DataColumn<Part>[] = [
  { id: 'item', title: 'Item', kind: 'text', value: (part) => part.item },
  { id: 'group', title: 'Group', kind: 'text', value: (part) => part.group },
  {
    id: 'mass',
    title: 'Mass',
    unit: 'kg',
    kind: 'number',
    value: (part) => part.mass,
    total: (rows) => rows.reduce((sum, part) => sum + (part.mass ?? 0), 0),
  },
];

function render(view: Partial<TableView>, more: Partial<Parameters<typeof DataTable<Part>>[0]> = {}): string {
  return renderToStaticMarkup(
    <DataTable
      caption="Parts"
      columns={columns}
      rows={parts}
      rowId={(part) => part.item}
      view={{ ...PLAIN_VIEW, ...view }}
      onView={vi.fn()}
      groupColumn="group"
      {...more}
    />,
  );
}
const items = (markup: string) => [...markup.matchAll(/title="([A-C])"/g)].map((found) => found[1]);

describe('the data table', () => {
  it('sorts numbers as numbers, with empty cells last both ways', () => {
    expect(items(render({ sort: { column: 'mass', descending: false } }))).toEqual(['B', 'A', 'C']);
    expect(items(render({ sort: { column: 'mass', descending: true } }))).toEqual(['A', 'B', 'C']);
  });

  it('filters by a group with its subgroups, and not by a name that only begins alike', () => {
    expect(items(render({ group: 'Wing' }))).toEqual(['B', 'A']);
  });

  it('finds text whatever its case, and totals what is shown', () => {
    const markup = render({ text: 'ribs' });
    expect(items(markup)).toEqual(['B']);
    expect(markup).toContain('1 of 3 rows');
    expect(markup).toMatch(/<tfoot>.*value="2\.5".*<\/tfoot>/);
  });

  it('gives each group its subtotal', () => {
    const markup = render({ subtotals: true });
    expect(markup.match(/group-line/g)).toHaveLength(3);
    expect(markup).toContain('Wing/Ribs, 1');
  });

  it('shows a failure and a retry, never an empty list', () => {
    const markup = render({}, { rows: [], failure: { message: 'The server answered 503.', retry: vi.fn() } });
    expect(markup).toContain('The server answered 503.');
    expect(markup).toContain('Try again');
    expect(markup).not.toContain('role="grid"');
  });

  it('offers the way back when nothing matches', () => {
    const markup = render({ text: 'no such part' });
    expect(markup).toContain('No rows match what is asked for.');
    expect(markup).toContain('Show all rows');
  });

  it('leaves order and filters to the server in manual mode', () => {
    expect(
      items(render({ sort: { column: 'mass', descending: true }, text: 'ribs' }, { manual: true })),
    ).toEqual(['B', 'A', 'C']);
  });

  it('puts only the lines in sight into the document, of a hundred thousand', () => {
    const rows = Array.from({ length: 100_000 }, (_, index) => ({
      item: `P${index}`,
      group: 'Wing',
      mass: index,
    }));
    const markup = render({}, { rows });
    expect(markup).toContain('aria-rowcount="100001"');
    expect((markup.match(/aria-rowindex/g) ?? []).length).toBeLessThan(80);
  });

  it('shows a number with the decimals it was given, at most those of its column', () => {
    expect([1, 1.5, 1.23456, 1e-9].map((value) => ownDecimals(value, 3))).toEqual([0, 1, 3, 3]);
  });
});

describe("the view in a page's address", () => {
  it('comes back as it went, and leaves what belongs to others', () => {
    fc.assert(
      fc.property(
        fc.record({
          sort: fc.option(fc.record({ column: fc.stringMatching(/^[a-z]{1,8}$/), descending: fc.boolean() })),
          text: fc.string(),
          group: fc.string(),
          subtotals: fc.boolean(),
          hidden: fc.array(fc.stringMatching(/^[a-z]{1,8}$/)),
          shown: fc.array(fc.string()),
          by: fc.string(),
          only: fc.option(fc.record({ column: fc.string({ minLength: 1 }), value: fc.string() })),
          unfolded: fc.array(fc.string()),
          open: fc.option(fc.string()),
        }),
        (view) => {
          const params = paramsWithView(new URLSearchParams('revision=6&sort=old'), view);
          expect(viewFromParams(new URLSearchParams(params.toString()))).toEqual(view);
          expect(params.get('revision')).toBe('6');
        },
      ),
    );
  });

  it('shows the columns chosen in the order chosen, after the first, and the usual ones where none is', () => {
    const columns = ['item', 'mass', 'x', 'note'].map((id) => ({ id }));
    const ids = (view: Partial<typeof PLAIN_VIEW>) =>
      columnsShown(columns, { ...PLAIN_VIEW, ...view }, ({ id }) => id !== 'note').map(({ id }) => id);
    expect(ids({})).toEqual(['item', 'mass', 'x']);
    expect(ids({ hidden: ['mass'] })).toEqual(['item', 'x']);
    expect(ids({ shown: ['note', 'gone', 'mass', 'note', 'item'] })).toEqual(['item', 'note', 'mass']);
  });

  it('leaves no trace when it is plain', () => {
    expect(paramsWithView(new URLSearchParams(), PLAIN_VIEW).toString()).toBe('');
  });

  it('goes from ascending to descending to the order of the file', () => {
    const up = nextSort(null, 'mass');
    const down = nextSort(up, 'mass');
    expect([up, down, nextSort(down, 'mass'), nextSort(down, 'item')]).toEqual([
      { column: 'mass', descending: false },
      { column: 'mass', descending: true },
      null,
      { column: 'item', descending: false },
    ]);
  });

  it('takes a group path with what lies under it', () => {
    expect(['Wing', 'Wing/Ribs', 'Winglet'].map((path) => inGroup(path, 'Wing'))).toEqual([
      true,
      true,
      false,
    ]);
  });
});

describe('the selection', () => {
  const extent = { lines: 100, columns: 5, screen: 20 };
  const press = (key: string, more: { shift?: boolean; control?: boolean } = {}) => ({
    key,
    shift: false,
    control: false,
    ...more,
  });

  it('moves by arrow keys and stops at the edges', () => {
    expect(moved(at(0, 0), press('ArrowUp'), extent)).toEqual(at(0, 0));
    expect(moved(at(3, 2), press('ArrowRight'), extent)).toEqual(at(3, 3));
    expect(moved(at(90, 4), press('PageDown'), extent)).toEqual(at(99, 4));
    expect(moved(at(3, 2), press('End', { control: true }), extent)).toEqual(at(99, 4));
  });

  it('grows with Shift from where it began, and holds everything after Ctrl+A', () => {
    const grown = moved(at(5, 2), press('ArrowUp', { shift: true }), extent);
    expect(grown && bounds(grown)).toEqual({ top: 4, bottom: 5, left: 2, right: 2 });
    const all = moved(at(5, 2), press('a', { control: true }), extent);
    expect(all && bounds(all)).toEqual({ top: 0, bottom: 99, left: 0, right: 4 });
  });

  it('leaves other keys to the page', () => {
    expect(moved(at(5, 2), press('x'), extent)).toBeNull();
  });
});

describe('lines', () => {
  it('put every row under its group once, groups by path', () => {
    const lines = groupedLines(
      parts,
      (part) => part.item,
      (part) => part.group,
    );
    expect(lines.map((line) => (line.kind === 'group' ? line.path : line.id))).toEqual([
      'Wing',
      'A',
      'Wing/Ribs',
      'B',
      'Winglet',
      'C',
    ]);
  });

  it('know the groups above a group', () => {
    expect(groupPaths(['Wing/Ribs/Left', 'Fuselage'])).toEqual([
      'Fuselage',
      'Wing',
      'Wing/Ribs',
      'Wing/Ribs/Left',
    ]);
  });
});

describe('an export', () => {
  const odd: readonly Part[] = [{ item: '=1+1', group: 'a "b", c\nd', mass: -0.1 }];

  it('is read back by a CSV reader as it was, with the unit in the head', () => {
    const read = Papa.parse<string[]>(toCsv(columns, odd), { skipEmptyLines: true }).data;
    expect(read).toEqual([
      ['Item', 'Group', 'Mass (kg)'],
      ["'=1+1", 'a "b", c\nd', '-0.1'],
    ]);
  });

  it('takes from text what a spreadsheet would run, and leaves numbers alone', () => {
    const risky = ['=1', '+1', '-1', '@x', '\tx'].map((item) => ({ item, group: 'G', mass: -1 }));
    for (const line of toCsv(columns, risky).trim().split('\r\n').slice(1)) expect(line).toMatch(/^'.*,-1$/);
  });

  it('copies as one line a row, whatever breaks the text', () => {
    expect(toTsv(columns, odd, false)).toBe('\'=1+1\ta "b", c d\t-0.1');
  });
});
