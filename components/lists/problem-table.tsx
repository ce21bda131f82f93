import { Quoted } from '@/components/lists/quoted';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type ImportView } from '@/lib/contracts/list-imports';

/** The problems of a file: where, what was found there, what would be right. */
export function ProblemTable({ problems }: { readonly problems: ImportView['problems'] }) {
  return (
    <Table caption="Problems in the order of the file" captionHidden tall>
      <thead>
        <tr>
          <ColumnHead side="right">Line</ColumnHead>
          <ColumnHead>Column</ColumnHead>
          <ColumnHead>Found</ColumnHead>
          <ColumnHead>What would be right</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {problems.map((problem, index) => (
          <tr key={index}>
            <RowHead>
              <span className="num block text-right">{problem.line ?? 'File'}</span>
            </RowHead>
            <Cell className="font-mono whitespace-nowrap">{problem.column}</Cell>
            <Cell className="max-w-60 font-mono wrap-anywhere">{problem.found}</Cell>
            <Cell className="min-w-72">
              <Quoted text={problem.message} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
