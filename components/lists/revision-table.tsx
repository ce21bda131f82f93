import { ChangeCounts } from '@/components/lists/change-counts';
import { FindingCounts } from '@/components/lists/finding-counts';
import { countWords } from '@/components/lists/list-words';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink, LINK_CLASS } from '@/components/ui/text-link';
import { type Finding } from '@/lib/findings/finding';

export interface RevisionLine {
  readonly number: number;
  readonly author: string;
  readonly at: Date;
  readonly reason: string;
  readonly rows: number;
  readonly findings: readonly Pick<Finding, 'severity'>[];
  /** The file it was read from; null when it was not made from one. */
  readonly file: string | null;
  /** The revision that it brings back. */
  readonly restoredFrom: number | null;
  /** The import that read its file by a mapping; null for a file of the contract. */
  readonly mappedBy: string | null;
}

interface RevisionTableProps {
  readonly revisions: readonly RevisionLine[];
  readonly newest: number;
  readonly mayRestore: boolean;
  readonly listHref: string;
  /** The internal routes of the list's revisions. */
  readonly route: string;
}

/** The revisions of a list, newest first: who, when, why, from what, and how they differ. */
export function RevisionTable({ revisions, newest, mayRestore, listHref, route }: RevisionTableProps) {
  return (
    <Table caption="Revisions, newest first" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Revision</ColumnHead>
          <ColumnHead>When</ColumnHead>
          <ColumnHead>Who</ColumnHead>
          <ColumnHead>Why</ColumnHead>
          <ColumnHead>Made from</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead>Against the one before</ColumnHead>
          <ColumnHead>Findings</ColumnHead>
          <ColumnHead>Against the newest</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {revisions.map((revision) => (
          <tr key={revision.number}>
            <RowHead>
              <TextLink
                href={`${listHref}?revision=${revision.number}`}
              >{`Revision ${revision.number}`}</TextLink>
            </RowHead>
            <Cell>
              <Day at={revision.at} time />
            </Cell>
            <Cell className="whitespace-nowrap">{revision.author}</Cell>
            <Cell className="max-w-90 min-w-48 wrap-anywhere">{revision.reason}</Cell>
            <Cell className="max-w-60 wrap-anywhere">
              {revision.restoredFrom !== null ? (
                <TextLink
                  href={`${listHref}?revision=${revision.restoredFrom}`}
                >{`Revision ${revision.restoredFrom}`}</TextLink>
              ) : revision.file === null ? (
                'Edits'
              ) : (
                <>
                  <a href={`${route}/${revision.number}/file`} download className={LINK_CLASS}>
                    {revision.file}
                  </a>
                  {revision.mappedBy === null ? null : (
                    <span className="block text-note">
                      <TextLink href={`${listHref}/imports/${revision.mappedBy}`}>How it was read</TextLink>
                    </span>
                  )}
                </>
              )}
            </Cell>
            <Cell side="right" className="num">
              {countWords(revision.rows)}
            </Cell>
            <Cell className="whitespace-nowrap">
              {revision.number === 1 ? (
                <span className="text-ink-2">The first</span>
              ) : (
                <ChangeCounts
                  from={`${route}/${revision.number}/changes`}
                  href={`${listHref}/changes?from=${revision.number - 1}&to=${revision.number}`}
                />
              )}
            </Cell>
            <Cell>
              <FindingCounts findings={revision.findings} />
            </Cell>
            <Cell className="whitespace-nowrap">
              {revision.number === newest ? (
                <span className="text-ink-2">The newest</span>
              ) : (
                <TextLink href={`${listHref}/changes?from=${newest}&to=${revision.number}`}>
                  {mayRestore ? 'Compare or bring back' : 'Compare'}
                </TextLink>
              )}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
