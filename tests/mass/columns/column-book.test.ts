import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ColumnBook } from '@/lib/mass/columns/column-book';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { SETTINGS, sigmas, uncertainRows } from '@/tests/mass/uncertainty/support';
import { anyComponent } from '@/tests/support/arbitrary';
import { inBlocks } from '@/tests/support/row-blocks';

/** By row and by column, as text that tells every bit of a number but the sign of zero. */
function both(rows: readonly Component[], list: ListDeclarations, frame: AirframeGeometry) {
  const placement = new Placement(list, frame);
  const [subtotals, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
  for (const row of rows) {
    subtotals.add(row);
    uncertainty.add(row);
  }
  const columns = new ColumnBook(placement);
  for (const block of inBlocks(rows)) columns.add(block);
  return {
    byRow: JSON.stringify([subtotals.subtotals(), uncertainty.sums()]),
    byColumn: JSON.stringify([columns.subtotals(), columns.uncertainties()]),
  };
}

describe.each(SETTINGS)('rows booked by column, $name', ({ list, frame }) => {
  it('have the bits of rows booked one by one: turned, several, pairs, removals, all kinds of σ, over several blocks', () => {
    const { byRow, byColumn } = both(uncertainRows(1500, 11), list, frame);
    expect(byColumn).toBe(byRow);
  });

  it('have them with and without growth, σ, moments and a place far from r0', () => {
    const component = fc
      .tuple(
        anyComponent,
        fc.record({
          mass: fc.constantFrom(null, 0, 0.5),
          y: fc.constantFrom(null, 0.25),
          ixz: fc.constantFrom(null, 1e-3),
        }),
        fc.constantFrom(0, 0, 1e4),
        fc.boolean(),
        fc.constantFrom('approved', 'pending'),
      )
      .map(([row, sigma, far, isPoint, status]): Component => {
        const [x, y, z] = row.position;
        const said = Object.values(sigma).some((each) => each !== null);
        return {
          ...row,
          status,
          position: [x + far, y - far, z],
          sigma: said ? sigmas(sigma) : null,
          ...(isPoint ? { moments: { ixx: 0, iyy: 0, izz: 0, ixy: 0, ixz: 0, iyz: 0 } } : {}),
        };
      });
    fc.assert(
      fc.property(fc.array(component, { minLength: 1, maxLength: 20 }), (rows) => {
        const { byRow, byColumn } = both(rows, list, frame);
        expect(byColumn).toBe(byRow);
      }),
      { seed: 12, numRuns: 200 },
    );
  });
});

describe('a roll-up without a program', () => {
  it('is the same whether rows come one by one or by column', () => {
    const rows = uncertainRows(700, 5);
    const { list } = SETTINGS[1] ?? {};
    if (list === undefined) throw new Error('no setting');
    const [byRow, byColumn] = [new StatelessRollUp(list), new StatelessRollUp(list)];
    for (const row of rows) byRow.add(row);
    for (const block of inBlocks(rows)) byColumn.addRows(block);
    expect(byColumn.geometry).toEqual(byRow.geometry);
    expect(JSON.stringify(byColumn.result())).toBe(JSON.stringify(byRow.result()));
    expect(JSON.stringify(byColumn.uncertainty())).toBe(JSON.stringify(byRow.uncertainty()));
  });
});
