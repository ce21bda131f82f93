import {
  type CellValue,
  type DataColumn,
  DEFAULT_DECIMALS,
  ownDecimals,
} from '@/components/data-table/column';
import { NumberDigits } from '@/components/mass/num';
import { numberText } from '@/components/mass/number-text';

/** A value as its column sets it: text cut at the column's end, numbers under each other by their decimal points. */
export function CellContent<Row>({
  column,
  value,
}: {
  readonly column: DataColumn<Row>;
  readonly value: CellValue;
}) {
  if (value === null || value === '') return null;
  if (typeof value === 'string') {
    return (
      <span className="block truncate" title={value}>
        {value}
      </span>
    );
  }
  const most = column.decimals ?? DEFAULT_DECIMALS;
  const title = column.unit ? `${value} ${column.unit}` : String(value);
  return (
    <data value={String(value)} title={title} className="num block text-right">
      <NumberDigits text={numberText(value, ownDecimals(value, most))} padTo={most} />
    </data>
  );
}
