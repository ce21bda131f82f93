import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';

interface IssueLine {
  readonly number: number;
  readonly title: string;
  readonly valid_from: string;
  readonly reason: string;
  readonly author: string;
  readonly created_at: Date;
  readonly href: string;
  /** The one that the page shows. */
  readonly shown: boolean;
}

/** The frame issues of a program, newest first. */
export function FrameIssueTable({ issues }: { readonly issues: readonly IssueLine[] }) {
  return (
    <Table caption="Frame issues" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Issue</ColumnHead>
          <ColumnHead>Title</ColumnHead>
          <ColumnHead>Valid from</ColumnHead>
          <ColumnHead>Reason</ColumnHead>
          <ColumnHead>Issued by</ColumnHead>
          <ColumnHead>On</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {issues.map((issue) => (
          <tr key={issue.number}>
            <RowHead>
              {issue.shown ? (
                <span className="num font-semibold">{issue.number}</span>
              ) : (
                <TextLink href={issue.href}>{`Issue ${issue.number}`}</TextLink>
              )}
            </RowHead>
            <Cell>{issue.title}</Cell>
            <Cell className="num">{issue.valid_from}</Cell>
            <Cell>{issue.reason}</Cell>
            <Cell>{issue.author}</Cell>
            <Cell>
              <Day at={issue.created_at} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
