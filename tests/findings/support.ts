import { type RowContext } from '@/lib/findings/context';
import { type Finding } from '@/lib/findings/finding';
import { RowChecks } from '@/lib/findings/look';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';
import { inBlocks } from '@/tests/support/row-blocks';
import { expect } from 'vitest';

/** A light row with moments, wherever it is put: nothing to find. */
export const SOUND = { mass: 10, moments: diagonal([1, 1, 1]) };

/** Rows R1, R2 ... well kept and apart from one another, and what the test says of them. */
export function keptRows(rows: readonly Partial<Component>[]): Component[] {
  return rows.map((row, i) =>
    aComponent({
      item: `R${i + 1}`,
      group: 'Body',
      maturity: 'C',
      position: [3 + 0.1 * i, 0, 0],
      ...row,
    }),
  );
}

/** The findings of a list of such rows. */
export function found(
  rows: readonly Partial<Component>[],
  list: Partial<ListDeclarations> = {},
  context: RowContext = {},
): Finding[] {
  return foundBothWays(keptRows(rows), declarations(list), context);
}

/** The findings of a list; shown row by row and in blocks, they must be the same. */
export function foundBothWays(
  rows: readonly Component[],
  list: ListDeclarations,
  context: RowContext = {},
): Finding[] {
  const [byRow, byBlock] = [new RowChecks(list, context), new RowChecks(list, context)];
  for (const row of rows) byRow.see(row);
  for (const block of inBlocks(rows)) byBlock.seeBlock(block);
  const findings = byRow.findings();
  expect(byBlock.findings()).toEqual(findings);
  return findings;
}

export const ids = (findings: readonly Finding[]): string[] => findings.map(({ rule }) => rule);

export const ruled = (findings: readonly Finding[], rule: string): Finding | undefined =>
  findings.find((finding) => finding.rule === rule);

/** An aircraft 20 m in span and 16 m long, its mean chord 7 m behind the datum; body axes. */
export const aircraft = (said: Partial<AirframeGeometry> = {}): AirframeGeometry =>
  geometry({ span: 20, length: 16, mac: 2, lemac: [-7, 0, 0], ...said });
