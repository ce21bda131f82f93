import { type TableView } from '@/components/data-table/view';
import { sharedDecimals } from '@/components/mass/number-text';
import { Num } from '@/components/mass/num';
import { countWords } from '@/components/lists/list-words';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type RowGroup, type RowGroups } from '@/lib/contracts/list-groups';
import { type RowTotals } from '@/lib/contracts/list-rows';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

/** A line of the tree: a group, how deep it lies, and whether there is anything below it. */
export interface Branch {
  readonly group: RowGroup;
  readonly name: string;
  readonly depth: number;
  readonly hasMore: boolean;
}

/** The groups in sight: those at the top, and those below groups that are unfolded. Paths are a tree; other values are not. */
export function branchesInSight(
  groups: readonly RowGroup[],
  isTree: boolean,
  unfolded: TableView['unfolded'],
): readonly Branch[] {
  if (!isTree) return groups.map((group) => ({ group, name: group.value, depth: 0, hasMore: false }));
  const open = new Set(unfolded);
  const values = new Set(groups.map(({ value }) => value));
  const parents = new Set(groups.map(({ value }) => above(value)));
  const inSight = (path: string): boolean => {
    const parent = above(path);
    return !values.has(parent) || ((open.has('*') || open.has(parent)) && inSight(parent));
  };
  return groups
    .filter(({ value }) => inSight(value))
    .map((group) => {
      const levels = group.value.split('/');
      return {
        group,
        name: levels.at(-1) ?? group.value,
        depth: levels.length - 1,
        hasMore: parents.has(group.value),
      };
    });
}

const above = (path: string): string => path.slice(0, Math.max(0, path.lastIndexOf('/')));

interface GroupTableProps {
  /** The column that gives the groups, in words. */
  readonly by: string;
  readonly groups: RowGroups;
  readonly branches: readonly Branch[];
  readonly unfolded: TableView['unfolded'];
  readonly declarations: Pick<ListDeclarations, 'massUnit' | 'lengthUnit' | 'axes'>;
  /** The value whose rows alone are shown; null: all are. */
  readonly chosen: string | null;
  readonly onChoose: (value: string) => void;
  readonly onFold: (value: string) => void;
}

/** What each group adds up to, with all that is below it; its name chooses its rows. */
export function GroupTable(props: GroupTableProps) {
  const { by, groups, branches, unfolded, declarations, chosen, onChoose, onFold } = props;
  const { massUnit, lengthUnit, axes } = declarations;
  const { whole } = groups;
  const decimals = sharedDecimals([whole.mass], [], 6);
  const left = [whole, ...groups.groups].some((one) => one.memoRows + one.waitingRows > 0);
  const sums = (totals: RowTotals, share: number | null) => (
    <>
      <Cell side="right" className="num">
        {countWords(totals.rows)}
      </Cell>
      <Cell side="right" className="num">
        {countWords(totals.pieces)}
      </Cell>
      <Cell side="right">
        <Num value={totals.mass} decimals={decimals} />
      </Cell>
      <Cell side="right">
        <Num value={share === null ? null : share * 100} decimals={2} />
      </Cell>
      {[0, 1, 2].map((axis) => (
        <Cell key={axis} side="right">
          <Num value={totals.cg?.[axis] ?? null} decimals={3} padTo={3} />
        </Cell>
      ))}
      {left ? (
        <Cell side="right" className="num">
          {totals.memoRows + totals.waitingRows === 0 ? '' : countWords(totals.memoRows + totals.waitingRows)}
        </Cell>
      ) : null}
    </>
  );
  return (
    <Table
      caption={`Each with all below it, without growth; mirror images included. ${by} chosen: its rows`}
      captionHidden
      tall
    >
      <thead>
        <tr>
          <ColumnHead>{by}</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead side="right">Pieces</ColumnHead>
          <ColumnHead side="right" unit={unitLabel(massUnit)}>
            Mass
          </ColumnHead>
          <ColumnHead side="right" unit="%">
            Share
          </ColumnHead>
          {axes.map((direction, axis) => (
            <ColumnHead key={direction} side="right" unit={unitLabel(lengthUnit)}>
              {`CG ${'xyz'.charAt(axis)} ${direction}`}
            </ColumnHead>
          ))}
          {left ? <ColumnHead side="right">Rows not summed</ColumnHead> : null}
        </tr>
      </thead>
      <tbody>
        {branches.map(({ group, name, depth, hasMore }) => (
          <tr key={group.value} className={group.value === chosen ? 'open-line' : undefined}>
            <RowHead>
              <span className="flex items-center" style={{ paddingLeft: `${16 * depth}px` }}>
                {hasMore ? (
                  <Fold
                    open={unfolded.includes('*') || unfolded.includes(group.value)}
                    of={group.value}
                    onFold={() => onFold(group.value)}
                  />
                ) : (
                  <span className="w-5 shrink-0" />
                )}
                <button
                  type="button"
                  aria-pressed={group.value === chosen}
                  onClick={() => onChoose(group.value)}
                  className="max-w-96 cursor-pointer truncate text-left text-spin underline decoration-1 underline-offset-4"
                >
                  {name === '' ? `No ${by.toLowerCase()}` : name}
                </button>
              </span>
            </RowHead>
            {sums(group, group.share)}
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          <RowHead>
            <span className="pl-5">All</span>
          </RowHead>
          {sums(whole, whole.mass > 0 ? 1 : null)}
        </tr>
      </tfoot>
    </Table>
  );
}

function Fold({
  open,
  of,
  onFold,
}: {
  readonly open: boolean;
  readonly of: string;
  readonly onFold: () => void;
}) {
  return (
    <button
      type="button"
      aria-expanded={open}
      aria-label={`What is below ${of}`}
      onClick={onFold}
      className="no-print grid h-6 w-5 shrink-0 cursor-pointer place-items-center"
    >
      <svg width="8" height="8" viewBox="0 0 8 8" aria-hidden="true" className="fill-none stroke-current">
        <path d={open ? 'M1 2.5 4 6 7 2.5' : 'M2.5 1 6 4 2.5 7'} strokeWidth="1.5" />
      </svg>
    </button>
  );
}
