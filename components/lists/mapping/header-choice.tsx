import { SelectField } from '@/components/ui/select-field';
import { cellText, type FileSample, type GridRow } from '@/lib/ingest/mapping/grid';
import { type Draft } from '@/lib/ingest/mapping/mapping';

interface HeaderChoiceProps {
  readonly sample: FileSample;
  readonly header: Draft['header'];
  readonly disabled: boolean;
  readonly onSheet: (name: string) => void;
  readonly onHeader: (header: NonNullable<Draft['header']>) => void;
}

/** The sheet of a workbook, and the rows that hold the headings: the first of them and the last. */
export function HeaderChoice({ sample, header, disabled, onSheet, onHeader }: HeaderChoiceProps) {
  const rows = sample.head.slice(0, 40).map((row) => ({ value: String(row.line), label: rowWords(row) }));
  const chosen = (first: number, last: number) => onHeader({ first, last: Math.max(first, last) });
  return (
    <div className="grid gap-4 md:grid-cols-3">
      {sample.sheet === null ? null : (
        <SelectField
          name="sheet"
          label="Sheet"
          value={sample.sheet}
          disabled={disabled}
          onChange={({ target }) => onSheet(target.value)}
          options={sample.sheets.map((name) => ({ value: name, label: name }))}
        />
      )}
      <SelectField
        name="header-first"
        label="Row of the headings"
        value={header === null ? '' : String(header.first)}
        placeholder="Choose a row"
        onChange={({ target }) => {
          if (target.value !== '') chosen(Number(target.value), Number(target.value));
        }}
        options={rows}
      />
      {header === null ? null : (
        <SelectField
          name="header-last"
          label="They end in row"
          value={String(header.last)}
          onChange={({ target }) => chosen(header.first, Number(target.value))}
          options={rows.filter(
            ({ value }) => Number(value) >= header.first && Number(value) < header.first + 5,
          )}
        />
      )}
    </div>
  );
}

function rowWords({ line, cells }: GridRow): string {
  const words = cells.map(cellText).filter((text) => text !== '');
  return `${line}: ${words.slice(0, 6).join(' | ').slice(0, 70)}`;
}
