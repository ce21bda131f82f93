import { GroupPaths } from '@/lib/ingest/blocks/group-paths';
import { BLOCK_ROWS, RowBlock } from '@/lib/ingest/blocks/row-block';
import { type Component } from '@/lib/mass/component';

/** Rows by column, a block at a time and always in the same block, as a reader gives them. */
export function* inBlocks(rows: readonly Component[]): Generator<RowBlock> {
  const groups = new GroupPaths();
  const block = new RowBlock(groups.paths);
  block.bytes = new Uint8Array(4096 * BLOCK_ROWS);
  for (let from = 0; from < rows.length; from += BLOCK_ROWS) {
    block.first = from;
    block.rows = 0;
    let free = 0;
    for (const [k, row] of rows.slice(from, from + BLOCK_ROWS).entries())
      free = block.put(row, from + k + 2, groups.numberOf(row.group), free);
    yield block;
  }
}
