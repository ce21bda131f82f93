import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';

export interface ReturnedLine {
  readonly href: string;
  readonly title: string;
  readonly build: string;
  readonly decidedAt: Date | null;
  readonly decider: string | null;
  readonly reason: string;
}

/** Submissions that were sent back, the newest first, with the reasons. */
export function ReturnedTable({ lines }: { readonly lines: readonly ReturnedLine[] }) {
  return (
    <Table caption="Returned submissions" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Submission</ColumnHead>
          <ColumnHead>Build</ColumnHead>
          <ColumnHead>Returned</ColumnHead>
          <ColumnHead>Reasons</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.href}>
            <RowHead>
              <TextLink href={line.href}>{line.title}</TextLink>
            </RowHead>
            <Cell>{line.build}</Cell>
            <Cell className="whitespace-nowrap">
              {line.decidedAt === null ? null : <Day at={line.decidedAt} />} {line.decider}
            </Cell>
            <Cell className="wrap-anywhere">{line.reason}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
