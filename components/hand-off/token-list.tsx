import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';

export interface WorkingToken {
  readonly id: string;
  readonly name: string;
  readonly hint: string;
  readonly lastUsedAt: Date | null;
  readonly expiresAt: Date;
}

/** One's own tokens that read this program today. */
export function TokenList({ tokens }: { readonly tokens: readonly WorkingToken[] }) {
  return (
    <Table caption="Your tokens that read this program" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Name</ColumnHead>
          <ColumnHead>Ends in</ColumnHead>
          <ColumnHead>Last used</ColumnHead>
          <ColumnHead>Works until</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <tr key={token.id}>
            <RowHead>{token.name}</RowHead>
            <Cell className="font-mono">{token.hint}</Cell>
            <Cell>{token.lastUsedAt === null ? 'Never' : <Day at={token.lastUsedAt} time />}</Cell>
            <Cell>
              <Day at={token.expiresAt} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
