import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';

export interface ListChange {
  readonly list: string;
  readonly title: string;
  /** Null where that side does not hold the list. */
  readonly before: number | null;
  readonly after: number | null;
  readonly counts: { readonly added: number; readonly removed: number; readonly changed: number };
}

interface ListChangeTableProps {
  readonly lists: readonly ListChange[];
  /** Null for those who may not see rows. */
  readonly rowsHref: ((list: string) => string) | null;
}

/** Which revision of each list was exchanged for which, and how many rows that concerns. */
export function ListChangeTable({ lists, rowsHref }: ListChangeTableProps) {
  return (
    <Table caption="Change by list revision" captionHidden>
      <thead>
        <tr>
          <ColumnHead>List</ColumnHead>
          <ColumnHead>Revision</ColumnHead>
          <ColumnHead>Rows</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lists.map((list) => (
          <tr key={list.list}>
            <RowHead>
              {rowsHref === null || total(list) === 0 ? (
                list.title
              ) : (
                <TextLink href={rowsHref(list.list)}>{list.title}</TextLink>
              )}
            </RowHead>
            <Cell>{revisionWords(list)}</Cell>
            <Cell>{countWords(list)}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

const total = ({ counts }: ListChange): number => counts.added + counts.removed + counts.changed;

function revisionWords({ before, after }: ListChange): string {
  if (before === after) return `${after ?? ''}, the same`;
  if (before === null) return `${after ?? ''}, new here`;
  return after === null ? `${before}, no longer held` : `${after}, was ${before}`;
}

function countWords({ counts }: ListChange): string {
  const words = [
    counts.changed > 0 ? `${counts.changed} changed` : '',
    counts.added > 0 ? `${counts.added} added` : '',
    counts.removed > 0 ? `${counts.removed} removed` : '',
  ].filter(Boolean);
  return words.length === 0 ? 'no change' : words.join(', ');
}
