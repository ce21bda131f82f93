import { type ShownQuantity } from '@/components/baselines/quantity';
import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';

interface AccountLine {
  readonly key: string;
  readonly name: string;
  /** The rows behind the step. */
  readonly href: string | null;
  /** The steps of the groups below this one. */
  readonly deeper: string | null;
  readonly from: number;
  readonly to: number;
}

interface AccountTableProps {
  readonly quantity: ShownQuantity;
  /** As shown. */
  readonly before: number;
  readonly after: number;
  readonly steps: readonly AccountLine[];
  readonly unchanged: number;
}

/** The figures behind a step chart. */
export function AccountTable({ quantity, before, after, steps, unchanged }: AccountTableProps) {
  const largest = Math.max(...steps.map(({ from, to }) => Math.abs(to - from)));
  const decimals = Math.max(decimalsFor(largest, 5), decimalsFor(after, 6));
  const columns = { decimals, padTo: decimals };
  return (
    <Table
      caption={`${quantity.name} by group. ${unchanged === 1 ? '1 group' : `${unchanged} groups`} did not change.`}
    >
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          <ColumnHead side="right" unit={quantity.unit}>
            Step
          </ColumnHead>
          <ColumnHead side="right" unit={quantity.unit}>
            {quantity.name} after it
          </ColumnHead>
          <ColumnHead>Below it</ColumnHead>
        </tr>
      </thead>
      <tbody>
        <tr>
          <RowHead>Before</RowHead>
          <Cell />
          <Cell side="right">
            <Num value={before} {...columns} />
          </Cell>
          <Cell />
        </tr>
        {steps.map((step) => (
          <tr key={step.key}>
            <RowHead>
              {step.href === null ? step.name : <TextLink href={step.href}>{step.name}</TextLink>}
            </RowHead>
            <Cell side="right">
              <Num value={step.to - step.from} {...columns} plus />
            </Cell>
            <Cell side="right">
              <Num value={step.to} {...columns} />
            </Cell>
            <Cell>{step.deeper === null ? null : <TextLink href={step.deeper}>Its groups</TextLink>}</Cell>
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          <RowHead>Whole change</RowHead>
          <Cell side="right">
            <Num value={after - before} {...columns} plus />
          </Cell>
          <Cell side="right">
            <Num value={after} {...columns} />
          </Cell>
          <Cell />
        </tr>
      </tfoot>
    </Table>
  );
}
