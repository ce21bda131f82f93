import { type ListColumn, scaled, type ScaledColumn } from '@/lib/ingest/mass-list/columns';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { cellText, type GridRow } from './grid';
import { dimensionOfColumn, type Draft, isNumberColumn, type MappedColumn } from './mapping';
import { PLAIN_NUMBERS, readStyled } from './number-style';
import { type RowKind, RowKinds } from './row-kind';
import { mappedScales } from './scales';
import { type Dimension } from './unit-words';

/** What a cell became: a number in SI, or its text; `wrong` says why it is neither. */
export interface PreviewCell {
  readonly column: ListColumn;
  readonly shown: string;
  readonly wrong: string | null;
}

export interface PreviewRow {
  readonly line: number;
  readonly kind: RowKind;
  /** Whether the draft leaves it out. */
  readonly leftOut: boolean;
  /** Its first text, for rows that are left out. */
  readonly words: string;
  readonly cells: readonly PreviewCell[];
}

export const SI_UNITS: Readonly<Record<Dimension, string>> = {
  mass: 'kg',
  length: 'm',
  inertia: 'kg.m2',
  angle: 'rad',
  share: '1',
};

/** The contract columns that a draft fills, in its file's order. */
export function filledColumns({ columns }: Pick<Draft, 'columns'>): ListColumn[] {
  return columns.flatMap(({ to }) => (to?.use === 'column' ? [to.column] : []));
}

/** What a draft makes of some rows, as far as it is decided. */
export function previewRows(
  rows: readonly GridRow[],
  draft: Draft,
  declarations: ListDeclarations,
): PreviewRow[] {
  const columns = draft.columns.map(({ heading, to }): MappedColumn => ({
    heading,
    to: to ?? { use: 'extra' },
  }));
  const scales = mappedScales(declarations, columns);
  const kinds = new RowKinds({ columns });
  const style = draft.numbers ?? PLAIN_NUMBERS;
  const cellOf = (row: GridRow, column: ListColumn, index: number): PreviewCell => {
    const cell = row.cells[index];
    const text = cellText(cell);
    if (text === '' || !isNumberColumn(column)) return { column, shown: text, wrong: null };
    const percent = column === 'growth_percent' && text.endsWith('%');
    const value =
      typeof cell === 'number' ? cell : readStyled(percent ? text.slice(0, -1).trim() : text, style);
    if (typeof value !== 'number') return { column, shown: text, wrong: value.message };
    const si = dimensionOfColumn(column) === null ? value : scaled(value, scales[column as ScaledColumn]);
    return { column, shown: String(Number(si.toPrecision(7))), wrong: null };
  };
  return rows.map((row) => {
    const kind = kinds.kindOf(row);
    const { totals, texts, headings } = draft.leaveOut;
    const leftOut =
      (kind === 'total' && totals === true) ||
      (kind === 'text' && texts === true) ||
      (kind === 'heading' && headings === true);
    const cells = columns.flatMap(({ to }, index) =>
      to.use === 'column' ? [cellOf(row, to.column, index)] : [],
    );
    return { line: row.line, kind, leftOut, words: RowKinds.words(row), cells };
  });
}
