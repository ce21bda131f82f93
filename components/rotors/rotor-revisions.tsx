import { FindingCounts } from '@/components/lists/finding-counts';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type Finding } from '@/lib/findings/finding';

export interface RotorRevisionLine {
  readonly number: number;
  readonly reason: string;
  readonly author: string;
  readonly created_at: Date;
  readonly file_name: string | null;
  readonly rotors: readonly unknown[];
  readonly points: readonly unknown[];
  readonly findings: readonly Finding[];
  readonly href: string;
}

interface RotorRevisionsProps {
  readonly revisions: readonly RotorRevisionLine[];
  /** Number of the one that the page shows. */
  readonly shown: number;
}

/** Who revised the rotating parts, when and why; newest first. */
export function RotorRevisions({ revisions, shown }: RotorRevisionsProps) {
  return (
    <Table caption="Revisions of the rotating parts" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Revision</ColumnHead>
          <ColumnHead>Reason</ColumnHead>
          <ColumnHead side="right">Rotors</ColumnHead>
          <ColumnHead side="right">Points</ColumnHead>
          <ColumnHead>Findings</ColumnHead>
          <ColumnHead>Made from</ColumnHead>
          <ColumnHead>By</ColumnHead>
          <ColumnHead>On</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {revisions.map((revision) => (
          <tr key={revision.number}>
            <RowHead>
              {revision.number === shown ? (
                <span className="num font-semibold">{revision.number}</span>
              ) : (
                <TextLink href={revision.href}>{`Revision ${revision.number}`}</TextLink>
              )}
            </RowHead>
            <Cell className="min-w-56">{revision.reason}</Cell>
            <Cell side="right" className="num">
              {revision.rotors.length}
            </Cell>
            <Cell side="right" className="num">
              {revision.points.length}
            </Cell>
            <Cell>
              <FindingCounts findings={revision.findings} />
            </Cell>
            <Cell>{revision.file_name ?? 'the grid'}</Cell>
            <Cell>{revision.author}</Cell>
            <Cell>
              <Day at={revision.created_at} time />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
