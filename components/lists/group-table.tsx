import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { countWords } from '@/components/lists/list-words';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type RowTotals } from '@/lib/contracts/list-rows';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

interface GroupTableProps {
  readonly groups: readonly (RowTotals & { readonly group: string })[];
  readonly whole: RowTotals;
  readonly declarations: Pick<ListDeclarations, 'massUnit' | 'lengthUnit' | 'axes'>;
  readonly hrefOf: (group: string) => string;
}

/** What each group adds up to, with all that is below it; its name leads to its rows. */
export function GroupTable({ groups, whole, declarations, hrefOf }: GroupTableProps) {
  const { massUnit, lengthUnit, axes } = declarations;
  const decimals = sharedDecimals([whole.mass], [], 6);
  const sums = (totals: RowTotals) => (
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
      {[0, 1, 2].map((axis) => (
        <Cell key={axis} side="right">
          <Num value={totals.cg?.[axis] ?? null} decimals={3} padTo={3} />
        </Cell>
      ))}
    </>
  );
  return (
    <Table
      caption="Each group with the groups below it, without growth; mirror images included, memo rows left out"
      tall
    >
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead side="right">Pieces</ColumnHead>
          <ColumnHead side="right" unit={unitLabel(massUnit)}>
            Mass
          </ColumnHead>
          {axes.map((direction, axis) => (
            <ColumnHead key={direction} side="right" unit={unitLabel(lengthUnit)}>
              {`CG ${'xyz'.charAt(axis)} ${direction}`}
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {groups.map((totals) => {
          const levels = totals.group.split('/');
          return (
            <tr key={totals.group}>
              <RowHead>
                <span style={{ paddingLeft: `${16 * (levels.length - 1)}px` }}>
                  <TextLink href={hrefOf(totals.group)}>{levels.at(-1) ?? totals.group}</TextLink>
                </span>
              </RowHead>
              {sums(totals)}
            </tr>
          );
        })}
      </tbody>
      <tfoot>
        <tr>
          <RowHead>All groups</RowHead>
          {sums(whole)}
        </tr>
      </tfoot>
    </Table>
  );
}
