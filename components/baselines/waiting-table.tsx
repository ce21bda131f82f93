import { Num } from '@/components/mass/num';
import { InertiaSymbol } from '@/components/mass/tensor-plate';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';
import { type ConditionChange } from '@/lib/baselines/compare';
import { largestInertiaChange } from '@/lib/baselines/largest-change';

export interface WaitingLine {
  readonly href: string;
  readonly title: string;
  readonly build: string;
  readonly submitter: string;
  readonly submittedAt: Date;
  /** The baseline that the changes are against; null when the build has no current one. */
  readonly against: number | null;
  /** In the submission's first condition. */
  readonly change: ConditionChange | null;
}

/** Decisions that wait, the oldest first, each with what it would change. */
export function WaitingTable({ lines }: { readonly lines: readonly WaitingLine[] }) {
  return (
    <Table caption="Changes of mass, CG and inertia in the first condition of each, against the current baseline of its build">
      <thead>
        <tr>
          <ColumnHead>Submission</ColumnHead>
          <ColumnHead side="right" unit="kg">
            Mass
          </ColumnHead>
          <ColumnHead side="right" unit="% MAC">
            CG
          </ColumnHead>
          <ColumnHead side="right" unit="kg·m²">
            Largest of the tensor
          </ColumnHead>
          <ColumnHead>Against</ColumnHead>
          <ColumnHead>Build</ColumnHead>
          <ColumnHead>Submitted</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.href}>
            <RowHead>
              <TextLink href={line.href}>{line.title}</TextLink>
            </RowHead>
            <Cell side="right">
              <Num value={line.change?.mass.delta ?? null} decimals={2} plus />
            </Cell>
            <Cell side="right">
              <Num value={line.change?.percentMac.delta ?? null} decimals={3} plus />
            </Cell>
            <Cell side="right" className="whitespace-nowrap">
              <Largest change={line.change} />
            </Cell>
            <Cell className="whitespace-nowrap">
              {line.against === null ? (
                <span className="text-ink-2">no current baseline</span>
              ) : (
                `Baseline ${line.against}`
              )}
            </Cell>
            <Cell>{line.build}</Cell>
            <Cell>
              <Day at={line.submittedAt} /> {line.submitter}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Largest({ change }: { readonly change: ConditionChange | null }) {
  const largest = change && largestInertiaChange(change);
  if (largest === null) return <Num value={null} />;
  return (
    <>
      <span className="text-ink-2">
        <InertiaSymbol symbol={largest.element} />
      </span>{' '}
      <Num value={largest.delta} decimals={1} plus />
    </>
  );
}
