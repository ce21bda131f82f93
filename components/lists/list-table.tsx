import { FindingCounts } from '@/components/lists/finding-counts';
import { counted, countWords, KIND_WORDS, unitWords } from '@/components/lists/list-words';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type Finding } from '@/lib/findings/finding';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface ListLine {
  readonly code: string;
  readonly title: string;
  readonly marking: string | null;
  readonly declarations: ListDeclarations;
  /** Null before the first. */
  readonly revision: {
    readonly number: number;
    readonly rows: number;
    readonly memoRows: number;
    readonly at: Date;
    readonly author: string;
    readonly findings: readonly Pick<Finding, 'severity'>[];
  } | null;
  /** Its newest file, when that is being read or was refused. */
  readonly file: { readonly import: string; readonly state: 'waiting' | 'running' | 'failed' } | null;
}

const FILE_WORDS = {
  waiting: 'A file waits to be read',
  running: 'A file is being read',
  failed: 'The newest file was refused',
} as const;

/** The lists of a program, each as its newest revision stands. */
export function ListTable({ lists, home }: { readonly lists: readonly ListLine[]; readonly home: string }) {
  return (
    <Table caption="Mass lists" captionHidden>
      <thead>
        <tr>
          <ColumnHead>List</ColumnHead>
          <ColumnHead>Kind</ColumnHead>
          <ColumnHead>Units</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead>Newest revision</ColumnHead>
          <ColumnHead>Findings</ColumnHead>
          <ColumnHead>Files</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lists.map((list) => (
          <tr key={list.code}>
            <RowHead>
              <TextLink href={`${home}/${list.code}`}>{list.title}</TextLink>
              <span className="block font-mono text-note text-ink-2">{list.code}</span>
              {list.marking === null ? null : (
                <span className="block text-note font-semibold">{list.marking}</span>
              )}
            </RowHead>
            <Cell>{KIND_WORDS[list.declarations.kind]}</Cell>
            <Cell className="whitespace-nowrap">{unitWords(list.declarations)}</Cell>
            <Cell side="right">{list.revision === null ? null : <Rows {...list.revision} />}</Cell>
            <Cell>{list.revision === null ? 'None yet' : <Newest {...list.revision} />}</Cell>
            <Cell>{list.revision === null ? null : <FindingCounts findings={list.revision.findings} />}</Cell>
            <Cell>
              {list.file === null ? null : (
                <TextLink href={`${home}/${list.code}/imports/${list.file.import}`}>
                  {FILE_WORDS[list.file.state]}
                </TextLink>
              )}
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Rows({ rows, memoRows }: { readonly rows: number; readonly memoRows: number }) {
  return (
    <>
      <span className="num">{countWords(rows)}</span>
      {memoRows > 0 ? (
        <span className="block text-note text-ink-2">{counted(memoRows, 'memo row')}</span>
      ) : null}
    </>
  );
}

function Newest({
  number,
  at,
  author,
}: {
  readonly number: number;
  readonly at: Date;
  readonly author: string;
}) {
  return (
    <>
      <span className="num">{number}</span>, <Day at={at} />
      <span className="block text-note text-ink-2">{author}</span>
    </>
  );
}
