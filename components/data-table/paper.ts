import { columnName, columnWidth, type DataColumn } from '@/components/data-table/column';

/** Columns on paper are narrower than on a screen by this factor, and so is their type. */
export const PAPER_SCALE = 0.75;

/** What is between the margins of the narrower of A4 and US Letter, in px: upright 186 mm of A4, lying 255 mm of Letter. */
const UPRIGHT = 703;
const LYING = 964;

/** The columns that go on a sheet, from the first, and the names of those that don't; a wide table lies on it. */
export function columnsOnPaper<Row>(columns: readonly DataColumn<Row>[]) {
  const widths = columns.map((column) => columnWidth(column) * PAPER_SCALE);
  const all = widths.reduce((sum, width) => sum + width, 0);
  const room = all > UPRIGHT ? LYING : UPRIGHT;
  let used = 0;
  const fitting = columns.filter((_, at) => {
    used += widths[at] ?? 0;
    return at === 0 || used <= room;
  });
  return {
    columns: fitting,
    left: columns.slice(fitting.length).map(columnName),
    isWide: all > UPRIGHT,
  };
}
