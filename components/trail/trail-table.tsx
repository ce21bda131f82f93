import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';

export interface TrailLine {
  readonly number: number;
  readonly at: Date;
  /** Null for the product itself. */
  readonly person: string | null;
  readonly address: string;
  /** Kind and event in words. */
  readonly kind: string;
  readonly subject: string;
  readonly words: string;
  readonly hash: string;
}

/** Events, the newest first. */
export function TrailTable({ events }: { readonly events: readonly TrailLine[] }) {
  return (
    <Table caption="Events, the newest first" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Event</ColumnHead>
          <ColumnHead>What</ColumnHead>
          <ColumnHead>Who</ColumnHead>
          <ColumnHead>When</ColumnHead>
          <ColumnHead>From</ColumnHead>
          <ColumnHead>Hash begins</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {events.map((event) => (
          <tr key={event.number} id={`event-${event.number}`}>
            <RowHead>
              <span className="num">{event.number}</span>
            </RowHead>
            <Cell className="min-w-64 wrap-anywhere">
              <span className="font-semibold">{event.kind}</span>
              <span className="text-ink-2"> {event.subject}</span>
              <br />
              {event.words}
            </Cell>
            <Cell className="whitespace-nowrap">{event.person ?? 'the system'}</Cell>
            <Cell className="whitespace-nowrap">
              <Day at={event.at} time />
            </Cell>
            <Cell className="font-mono whitespace-nowrap">{event.address}</Cell>
            <Cell className="font-mono" title={event.hash}>
              {event.hash.slice(0, 12)}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
