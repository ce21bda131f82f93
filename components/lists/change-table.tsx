import { Num } from '@/components/mass/num';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';

type CellValue = string | number | null;

export interface RowChangeLine {
  readonly item: string;
  readonly kind: 'added' | 'removed' | 'changed';
  readonly fields: readonly {
    readonly column: string;
    readonly before: CellValue;
    readonly after: CellValue;
  }[];
}

interface ChangeTableProps {
  readonly rows: readonly RowChangeLine[];
  /** The address of a row in the older revision, and in the newer one. */
  readonly hrefOf: (item: string, kind: RowChangeLine['kind']) => string;
}

const KIND_WORDS = { added: 'Added', removed: 'Removed', changed: 'Changed' } as const;

/** Rows that differ between two revisions, a line for each field. */
export function ChangeTable({ rows, hrefOf }: ChangeTableProps) {
  return (
    <Table caption="Rows that differ, in the order of the newer revision" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Item</ColumnHead>
          <ColumnHead>How</ColumnHead>
          <ColumnHead>Column</ColumnHead>
          <ColumnHead side="right">Before</ColumnHead>
          <ColumnHead side="right">After</ColumnHead>
          <ColumnHead side="right">Difference</ColumnHead>
        </tr>
      </thead>
      <tbody>{rows.map((row) => lines(row, hrefOf(row.item, row.kind)))}</tbody>
    </Table>
  );
}

/** An added or removed row is told by what matters of it; a changed one by every field that differs. */
function lines(row: RowChangeLine, href: string) {
  const told = row.kind === 'changed' ? row.fields : row.fields.filter(({ column }) => TOLD.includes(column));
  return told.map((field, index) => (
    <tr key={`${row.item} ${field.column}`}>
      <RowHead>
        {index === 0 ? (
          <TextLink href={href}>{row.item}</TextLink>
        ) : (
          <span className="sr-only">{row.item}</span>
        )}
      </RowHead>
      <Cell>{index === 0 ? KIND_WORDS[row.kind] : null}</Cell>
      <Cell className="font-mono whitespace-nowrap">{field.column}</Cell>
      <Value value={field.before} />
      <Value value={field.after} />
      <Cell side="right">
        {typeof field.before === 'number' && typeof field.after === 'number' ? (
          <Num value={field.after - field.before} digits={4} plus />
        ) : null}
      </Cell>
    </tr>
  ));
}

function Value({ value }: { readonly value: CellValue }) {
  return (
    <Cell side="right" className={typeof value === 'number' ? 'num' : 'max-w-90 min-w-32 wrap-anywhere'}>
      {value === null ? <span className="text-ink-2">blank</span> : value}
    </Cell>
  );
}

const TOLD: readonly string[] = ['description', 'group', 'quantity', 'mass', 'x', 'y', 'z'];
