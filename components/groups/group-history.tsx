import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';
import { type GroupChangeKind } from '@/lib/groups/breakdown';

interface HistoryLine {
  readonly number: number;
  readonly kind: GroupChangeKind;
  readonly path: string;
  readonly to: string | null;
  readonly code: string | null;
  readonly author: string;
  readonly changed_at: Date;
}

const KIND_WORDS: Readonly<Record<GroupChangeKind, string>> = {
  added: 'Added',
  moved: 'Renamed or moved',
  recoded: 'Code set',
  removed: 'Removed',
};

/** Everything done to a breakdown, newest first. */
export function GroupHistory({ lines }: { readonly lines: readonly HistoryLine[] }) {
  return (
    <Table caption="What was done to the breakdown, newest first" captionHidden tall>
      <thead>
        <tr>
          <ColumnHead>When</ColumnHead>
          <ColumnHead>Who</ColumnHead>
          <ColumnHead>What</ColumnHead>
          <ColumnHead>From</ColumnHead>
          <ColumnHead>To</ColumnHead>
          <ColumnHead>Code</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {[...lines].reverse().map((line) => (
          <tr key={line.number}>
            <RowHead>
              <Day at={line.changed_at} time />
            </RowHead>
            <Cell>{line.author}</Cell>
            <Cell>{KIND_WORDS[line.kind]}</Cell>
            <Cell>{line.kind === 'added' ? '' : line.path}</Cell>
            <Cell>{line.kind === 'added' ? line.path : line.to}</Cell>
            <Cell className="font-mono">
              {line.kind === 'recoded' && line.code === null ? 'none' : line.code}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
