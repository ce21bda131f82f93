import { OneButtonForm } from '@/components/forms/one-button-form';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';

export interface TokenLine {
  readonly id: string;
  readonly name: string;
  readonly hint: string;
  readonly scopes: readonly string[];
  readonly programs: readonly string[] | null;
  readonly expiresAt: Date;
  readonly lastUsedAt: Date | null;
  readonly revokedAt: Date | null;
}

interface TokenTableProps {
  readonly tokens: readonly TokenLine[];
  readonly now: Date;
  readonly revoke: FormAction;
}

/** A person's tokens; of each only its last four characters are known. */
export function TokenTable({ tokens, now, revoke }: TokenTableProps) {
  return (
    <Table caption="Your tokens" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Name</ColumnHead>
          <ColumnHead>Ends in</ColumnHead>
          <ColumnHead>May</ColumnHead>
          <ColumnHead>Programs</ColumnHead>
          <ColumnHead>Last used</ColumnHead>
          <ColumnHead>Works until</ColumnHead>
          <ColumnHead>
            <span className="sr-only">Revoke</span>
          </ColumnHead>
        </tr>
      </thead>
      <tbody>
        {tokens.map((token) => (
          <tr key={token.id}>
            <RowHead>{token.name}</RowHead>
            <Cell className="font-mono">{token.hint}</Cell>
            <Cell className="font-mono">{token.scopes.join(', ')}</Cell>
            <Cell>{token.programs === null ? 'All yours' : token.programs.join(', ')}</Cell>
            <Cell>{token.lastUsedAt === null ? 'Never' : <Day at={token.lastUsedAt} time />}</Cell>
            <Cell>
              {token.revokedAt !== null ? (
                <span className="text-ink-2">
                  Revoked <Day at={token.revokedAt} />
                </span>
              ) : token.expiresAt <= now ? (
                <span className="text-ink-2">
                  Ended <Day at={token.expiresAt} />
                </span>
              ) : (
                <Day at={token.expiresAt} />
              )}
            </Cell>
            <Cell>
              {token.revokedAt === null && token.expiresAt > now ? (
                <OneButtonForm
                  inRow
                  action={revoke}
                  fields={{ id: token.id }}
                  words="Revoke token"
                  pendingWords="Revoking"
                />
              ) : null}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
