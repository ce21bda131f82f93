import { Num } from '@/components/mass/num';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';

export interface LeftOutLine {
  readonly list: string;
  readonly status: 'pending' | 'potential';
  readonly rows: number;
  /** kg */
  readonly mass: number;
}

/** Adjustments that a submission leaves out, by list and status. */
export function LeftOutTable({ lines }: { readonly lines: readonly LeftOutLine[] }) {
  return (
    <>
      <p className="measure text-ink-2">Only approved adjustments are submitted. These are not:</p>
      <Table caption="Adjustments left out" captionHidden>
        <thead>
          <tr>
            <ColumnHead>List</ColumnHead>
            <ColumnHead>Status</ColumnHead>
            <ColumnHead side="right">Rows</ColumnHead>
            <ColumnHead side="right" unit="kg">
              Mass
            </ColumnHead>
          </tr>
        </thead>
        <tbody>
          {lines.map((line) => (
            <tr key={`${line.list}-${line.status}`}>
              <RowHead>{line.list}</RowHead>
              <Cell>{line.status}</Cell>
              <Cell side="right">
                <span className="num">{line.rows}</span>
              </Cell>
              <Cell side="right">
                <Num value={line.mass} decimals={2} plus />
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </>
  );
}
