import { type CellValue, columnName, type DataColumn } from '@/components/data-table/column';

/** Text that a spreadsheet would run as a formula gets an apostrophe before it; numbers are numbers and stay. */
export function neutralised(value: CellValue): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  return /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
}

/** Tab-separated lines for a spreadsheet, full precision. Tabs and line ends inside a text become spaces. */
export function toTsv<Row>(columns: readonly DataColumn<Row>[], rows: readonly Row[], head: boolean): string {
  const flat = (text: string) => text.replace(/[\t\r\n]+/g, ' ');
  const lines = rows.map((row) => columns.map((column) => flat(neutralised(column.value(row)))).join('\t'));
  return (head ? [columns.map((column) => flat(columnName(column))).join('\t'), ...lines] : lines).join('\n');
}

/** RFC 4180, one header row, full precision. */
export function toCsv<Row>(columns: readonly DataColumn<Row>[], rows: readonly Row[]): string {
  const quoted = (text: string) => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
  const head = columns.map((column) => quoted(columnName(column))).join(',');
  const lines = rows.map((row) => columns.map((column) => quoted(neutralised(column.value(row)))).join(','));
  return [head, ...lines].map((line) => `${line}\r\n`).join('');
}
