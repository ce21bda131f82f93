import { columnWords } from '@/components/lists/mapping/column-words';
import { SeverityMark } from '@/components/ui/severity';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type GridRow } from '@/lib/ingest/mapping/grid';
import { dimensionOfColumn, type Draft, isNumberColumn } from '@/lib/ingest/mapping/mapping';
import { filledColumns, previewRows, type PreviewRow, SI_UNITS } from '@/lib/ingest/mapping/preview';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface PreviewTableProps {
  readonly rows: readonly GridRow[];
  readonly draft: Draft;
  readonly declarations: ListDeclarations;
}

const LEFT_OUT: Readonly<Record<PreviewRow['kind'], string>> = {
  row: '',
  total: 'Left out as a total',
  text: 'Left out, a text alone',
  heading: 'Left out, headings again',
};

/** The first and last rows of a file as they would stand in the list: SI, the file's line beside each. */
export function PreviewTable({ rows, draft, declarations }: PreviewTableProps) {
  const columns = filledColumns(draft);
  return (
    <Table caption="Rows as they would be read, in SI" captionHidden tall>
      <thead>
        <tr>
          <ColumnHead side="right">{draft.sheet === null ? 'Line' : 'Row'}</ColumnHead>
          {columns.map((column, index) => {
            const dimension = dimensionOfColumn(column);
            return (
              <ColumnHead
                key={index}
                side={isNumberColumn(column) ? 'right' : 'left'}
                {...(dimension === null || dimension === 'share' ? {} : { unit: SI_UNITS[dimension] })}
              >
                {columnWords(column)}
              </ColumnHead>
            );
          })}
        </tr>
      </thead>
      <tbody>
        {previewRows(rows, draft, declarations).map((row) => (
          <tr key={row.line}>
            <RowHead>
              <span className="num block text-right">{row.line}</span>
            </RowHead>
            {row.leftOut ? (
              <td colSpan={Math.max(1, columns.length)} className="text-ink-2">
                {LEFT_OUT[row.kind]}: {row.words}
              </td>
            ) : (
              row.cells.map(({ column, shown, wrong }, index) => (
                <Cell
                  key={index}
                  side={isNumberColumn(column) ? 'right' : 'left'}
                  className={isNumberColumn(column) ? 'num' : 'max-w-60 truncate'}
                >
                  {wrong === null ? (
                    shown
                  ) : (
                    <span className="inline-flex items-center gap-1 text-limit" title={wrong}>
                      <SeverityMark severity="blocker" />
                      {shown}
                      <span className="sr-only">{wrong}</span>
                    </span>
                  )}
                </Cell>
              ))
            )}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
