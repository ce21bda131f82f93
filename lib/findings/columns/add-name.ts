import { type RowBlock } from '@/lib/ingest/blocks/row-block';

import { type NameIndex } from './name-index';
import { encoded } from './text-bytes';

/** Adds what people call a row to a key: its description, or its item where it has none. */
export function addName(key: NameIndex, rows: RowBlock, row: number): void {
  const { start, end } = rows.texts.description;
  const [from, to] = [start[row] ?? 0, end[row] ?? 0];
  if (to > from) {
    key.bytes(rows.bytes, from, to);
    return;
  }
  const text = (to < 0 ? rows.text('description', row) : null) ?? rows.text('item', row) ?? '';
  const bytes = encoded(text);
  key.bytes(bytes, 0, bytes.length);
}
