import { Quoted } from '@/components/lists/quoted';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type ImportView } from '@/lib/contracts/list-imports';

/** The problems of a file: where, what was found there, what would be right. On a narrow page place and find stand above the remedy. */
export function ProblemTable({ problems }: { readonly problems: ImportView['problems'] }) {
  return (
    <Table caption="Problems in the order of the file" captionHidden tall>
      <thead>
        <tr>
          <ColumnHead side="right">Line</ColumnHead>
          <th scope="col" className="text-left max-sm:hidden">
            Column
          </th>
          <th scope="col" className="text-left max-sm:hidden">
            Found
          </th>
          <ColumnHead>What would be right</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {problems.map((problem, index) => (
          <tr key={index}>
            <RowHead>
              <span className="num block text-right">{problem.line ?? 'File'}</span>
            </RowHead>
            <Cell className="font-mono whitespace-nowrap max-sm:hidden">{problem.column}</Cell>
            <Cell className="max-w-60 font-mono wrap-anywhere max-sm:hidden">{problem.found}</Cell>
            <Cell className="wrap-anywhere sm:min-w-72">
              <Place problem={problem} />
              <Quoted text={problem.message} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Place({ problem }: { readonly problem: ImportView['problems'][number] }) {
  const { column, found } = problem;
  if (column === null && found === null) return null;
  return (
    <span className="block font-mono text-note text-ink-2 sm:hidden">
      {[column, found].filter((part) => part !== null).join(': ')}
    </span>
  );
}
