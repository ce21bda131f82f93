import { StateWord } from '@/components/baselines/state-word';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';
import { type BaselineState } from '@/lib/baselines/states';

export interface SignedLine {
  readonly href: string;
  readonly number: number;
  readonly title: string;
  readonly build: string;
  readonly state: BaselineState;
  readonly signedAt: Date;
  readonly signer: string;
  readonly supersedes: number | null;
  readonly digest: string;
}

/** The signed baselines of a program, the newest first. */
export function SignedTable({ lines }: { readonly lines: readonly SignedLine[] }) {
  return (
    <Table caption="Signed baselines" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Baseline</ColumnHead>
          <ColumnHead>State</ColumnHead>
          <ColumnHead>Build</ColumnHead>
          <ColumnHead>Signed</ColumnHead>
          <ColumnHead side="right">Supersedes</ColumnHead>
          <ColumnHead>Digest begins</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.number}>
            <RowHead>
              <TextLink href={line.href}>{`${line.number}. ${line.title}`}</TextLink>
            </RowHead>
            <Cell>
              <StateWord state={line.state} />
            </Cell>
            <Cell>{line.build}</Cell>
            <Cell>
              <Day at={line.signedAt} /> {line.signer}
            </Cell>
            <Cell side="right">
              {line.supersedes === null ? (
                <span className="text-ink-2">none</span>
              ) : (
                <span className="num">{line.supersedes}</span>
              )}
            </Cell>
            <Cell className="font-mono" title={line.digest}>
              {line.digest.slice('sha256:'.length, 'sha256:'.length + 12)}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
