import { StateWord } from '@/components/baselines/state-word';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { LINK_CLASS, TextLink } from '@/components/ui/text-link';
import { type BaselineState } from '@/lib/baselines/states';
import { downloadPath } from './downloads';

export interface BuildLine {
  readonly number: number;
  readonly title: string;
  readonly state: BaselineState;
  readonly signedAt: Date;
  readonly signer: string;
  readonly digest: string;
}

interface BuildTableProps {
  readonly program: string;
  readonly build: string;
  readonly lines: readonly BuildLine[];
  /** The one that the page is about. */
  readonly shown: number;
  readonly home: string;
}

/** The signed baselines of one build, newest first, each with its files. */
export function BuildTable({ program, build, lines, shown, home }: BuildTableProps) {
  return (
    <Table caption={build}>
      <thead>
        <tr>
          <ColumnHead>Baseline</ColumnHead>
          <ColumnHead>State</ColumnHead>
          <ColumnHead>Signed</ColumnHead>
          <ColumnHead>Digest begins</ColumnHead>
          <ColumnHead>Files</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.number} aria-current={line.number === shown ? 'true' : undefined}>
            <RowHead>
              {line.number === shown ? (
                <span className="font-semibold">{`${line.number}. ${line.title}`}</span>
              ) : (
                <TextLink
                  href={`${home}?baseline=${line.number}`}
                >{`${line.number}. ${line.title}`}</TextLink>
              )}
            </RowHead>
            <Cell>
              <StateWord state={line.state} />
            </Cell>
            <Cell>
              <Day at={line.signedAt} /> {line.signer}
            </Cell>
            <Cell className="font-mono" title={line.digest}>
              {line.digest.slice('sha256:'.length, 'sha256:'.length + 12)}
            </Cell>
            <Cell>
              <span className="inline-flex gap-3">
                <FileLink
                  path={downloadPath(program, line.number, 'document')}
                  of={line.number}
                  words="JSON"
                />
                <FileLink
                  path={downloadPath(program, line.number, 'conditions')}
                  of={line.number}
                  words="CSV"
                />
              </span>
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function FileLink({
  path,
  of,
  words,
}: {
  readonly path: string;
  readonly of: number;
  readonly words: string;
}) {
  return (
    <a href={path} download className={LINK_CLASS}>
      {words}
      <span className="sr-only">{` of baseline ${of}`}</span>
    </a>
  );
}
