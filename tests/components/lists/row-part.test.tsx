import fc from 'fast-check';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { isSummed, partOfRow, placedRow } from '@/components/lists/row-part';
import { RowShares } from '@/components/lists/row-shares';
import { RowViews } from '@/components/lists/row-views';
import { type ListRow } from '@/lib/contracts/list-rows';
import { massListWriter } from '@/lib/export/mass-list';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { AccountSum, toNumbers, toNumbersWithRest } from '@/lib/mass/account';
import { CATEGORIES, type Component } from '@/lib/mass/component';
import { accountOfPart } from '@/lib/mass/contributions/effects';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { Placement } from '@/lib/mass/place';
import { anyComponent } from '@/tests/support/arbitrary';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';

const aircraft = geometry({
  axes: ['aft', 'right', 'up'],
  reference: [12, 0, 1],
  lemac: [11, 0, 1],
  mac: 2,
  length: 20,
  span: 22,
});

/** Customary units, products with the tensor's sign, axes and pose of its own, half an aircraft. */
const US = declarations({
  massUnit: 'lb',
  lengthUnit: 'in',
  inertiaUnit: 'lb.in2',
  products: 'negative',
  axes: ['forward', 'left', 'up'],
  pose: { origin: [3, 0.2, -1], yaw: 0.1, pitch: -0.2, roll: 0.05 },
  extent: 'left-half',
});

function shown(component: Component, declared: ListDeclarations): ListRow {
  const writer = massListWriter(declared, []);
  const all = writer.cells(component);
  const cells: Partial<Record<ListColumn, string | number>> = {};
  for (const column of writer.columns) {
    const value = all[column];
    if (value !== null) cells[column] = value;
  }
  return { position: 1, line: 1, cells, own: {} } as ListRow;
}

describe('a row as its page has it', () => {
  it('has the account that the engine gives the row it shows, whatever the units, signs, axes and extent', () => {
    fc.assert(
      fc.property(anyComponent, fc.constantFrom(US, declarations()), (component, declared) => {
        const row = placedRow(shown(component, declared), declared);
        if (row === null) throw new Error('no row');
        const seen = toNumbers(accountOfPart(partOfRow(row, declared, aircraft)));
        const engine = toNumbers(new Placement(declared, aircraft).account(component));
        const size = Math.max(...engine.map(Math.abs));
        seen.forEach((value, k) =>
          expect(Math.abs(value - (engine[k] ?? NaN))).toBeLessThanOrEqual(1e-12 * size),
        );
      }),
    );
  });

  it('counts where it is counted, approved and on board', () => {
    const row = (said: Partial<Component>) => shown(aComponent(said), declarations({ kind: 'adjustments' }));
    expect(isSummed(row({}), ['empty'])).toBe(true);
    expect(isSummed(row({}), ['payload'])).toBe(false);
    expect(isSummed(row({ counting: 'memo' }), ['empty'])).toBe(false);
    expect(isSummed(row({ status: 'pending' }), ['empty'])).toBe(false);
  });
});

describe('what a row contributes, as the inspector shows it', () => {
  const placement = new Placement(declarations(), aircraft);
  const rows = [
    aComponent({ mass: 30, position: [12, 0, 1], moments: diagonal([1, 1, 1], 30) }),
    aComponent({ mass: 10, position: [12, 4, 1], moments: diagonal([1, 1, 1], 10) }),
  ];
  const sum = new AccountSum();
  for (const row of rows) sum.add(placement.account(row));
  const wholes = [
    { key: '', title: 'Revision 1', account: toNumbersWithRest(sum.account), categories: CATEGORIES },
  ];
  const shares = (component: Component) =>
    renderToStaticMarkup(
      <RowShares
        row={shown(component, declarations())}
        declarations={declarations()}
        geometry={aircraft}
        wholes={wholes}
      />,
    );

  it('is its mass, lever and moments about the CG of the list: 10 of 40 kg, three metres from the common CG', () => {
    // The second is 3 m from the common CG at y = 1: 10 (1 + 9) of 30 (1 + 1) + 10 (1 + 9) = 160 kg.m2, from the definitions.
    const markup = shares(rows[1] as Component);
    expect(markup).toContain('value="100"');
    expect(markup).toContain('value="160"');
    expect(markup).toContain('value="62.5"');
    expect(markup).toContain('value="0.75"');
    expect(markup).toContain('products as positive');
  });

  it('is nothing where the row is not summed', () => {
    expect(shares({ ...(rows[1] as Component), counting: 'memo' })).toContain('Nothing');
  });

  it('stands beside its place and its mirror image in three views', () => {
    const markup = renderToStaticMarkup(
      <RowViews
        row={shown(aComponent({ position: [12, 4, 1], pair: true }), declarations())}
        declarations={declarations()}
        geometry={aircraft}
        cg={[12, 0, 1]}
      />,
    );
    expect(markup.match(/<svg role="img"/g)).toHaveLength(3);
    expect(markup).toContain('mirror image');
  });
});
