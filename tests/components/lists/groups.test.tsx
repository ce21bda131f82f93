import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { columnsOnPaper, PAPER_SCALE } from '@/components/data-table/paper';
import { columnWidth } from '@/components/data-table/column';
import { branchesInSight, GroupTable } from '@/components/lists/group-table';
import { groupingColumns, isUsual, rowColumns } from '@/components/lists/row-columns';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { declare } from '@/tests/ingest/support';

const group = (value: string, mass: number) => ({
  value,
  rows: 1,
  pieces: 1,
  mass,
  cg: [1, 2, 3] as [number, number, number],
  memoRows: 0,
  waitingRows: 0,
  share: mass / 20,
});
const GROUPS: RowGroups = {
  of: 5,
  groups: [
    group('Tail', 5),
    group('Wing', 15),
    group('Wing/Ribs', 6),
    group('Wing/Ribs/Nose', 2),
    group('Wing tips', 0),
  ],
  whole: { ...group('', 20), rows: 3 },
};

describe('The groups in sight', () => {
  const names = (unfolded: readonly string[], isTree = true) =>
    branchesInSight(GROUPS.groups, isTree, unfolded).map(({ group: { value } }) => value);

  it('are those at the top, and those below unfolded ones', () => {
    expect(names([])).toEqual(['Tail', 'Wing', 'Wing tips']);
    expect(names(['Wing'])).toEqual(['Tail', 'Wing', 'Wing/Ribs', 'Wing tips']);
    expect(names(['Wing/Ribs'])).toEqual(['Tail', 'Wing', 'Wing tips']);
    expect(names(['*'])).toEqual(GROUPS.groups.map(({ value }) => value));
  });

  it('are all where values are no paths', () => {
    expect(names([], false)).toHaveLength(5);
  });

  it('show mass and share, what can be unfolded, and which is chosen', () => {
    const markup = renderToStaticMarkup(
      <GroupTable
        by="Group"
        groups={GROUPS}
        branches={branchesInSight(GROUPS.groups, true, [])}
        unfolded={[]}
        declarations={declare()}
        chosen="Wing"
        onChoose={() => undefined}
        onFold={() => undefined}
      />,
    );
    expect(markup.match(/aria-expanded="false"/g)).toHaveLength(1);
    expect(markup).toMatch(/aria-pressed="true"[^>]*>Wing</);
    expect(markup).toContain('value="75"');
    expect(markup).not.toContain('Rows not summed');
  });
});

describe('The columns of a list', () => {
  const columns = rowColumns(declare(), ['Supplier', 'x']);

  it('take in the list’s own, told from those of the contract, and leave them out until chosen', () => {
    const row = { cells: { item: 'A', x: 4 }, own: { Supplier: 'Tern Metals', x: 'own text' } };
    const value = (id: string) => columns.find((one) => one.id === id)?.value(row);
    expect([value('x'), value('own:x'), value('own:Supplier')]).toEqual([4, 'own text', 'Tern Metals']);
    expect(columns.filter(isUsual).some(({ id }) => id.startsWith('own:'))).toBe(false);
    expect(new Set(columns.map(({ id }) => id)).size).toBe(columns.length);
  });

  it('can group rows by what is said in words, and not by a number', () => {
    const ids = groupingColumns(columns).map(({ id }) => id);
    expect(ids).toEqual(expect.arrayContaining(['group', 'category', 'maturity', 'own:Supplier']));
    expect(ids).not.toContain('mass');
  });

  it('fit on a sheet as far as they are printed, and those that do not are named', () => {
    const usual = columns.filter(isUsual);
    const paper = columnsOnPaper(usual);
    const width = paper.columns.reduce((sum, column) => sum + columnWidth(column) * PAPER_SCALE, 0);
    // Common practice: US Letter lying, 279 mm less two margins of 12 mm, at 96 px an inch.
    expect(width).toBeLessThanOrEqual(((279.4 - 24) / 25.4) * 96);
    expect(paper.isWide).toBe(true);
    expect(paper.left).toHaveLength(usual.length - paper.columns.length);
    expect(columnsOnPaper(usual.slice(0, 3))).toMatchObject({ isWide: false, left: [] });
  });
});
