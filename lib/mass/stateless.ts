import { NO_POSE, listToAirframe, placeFrom } from '@/lib/frames/pose';
import { type Vec3 } from '@/lib/numerics/vec3';

import { ColumnBook } from './columns/column-book';
import { type RowColumns } from './columns/row-columns';
import { type Component } from './component';
import { type ListDeclarations } from './declarations';
import { type AirframeGeometry, bareGeometry } from './geometry';
import { Placement } from './place';
import { NO_GROWTH, type RollUp, rollUp } from './roll-up';
import { SubtotalBook } from './subtotals';
import { UncertaintyBook } from './uncertainty/book';
import { type CombinedUncertainty, combineUncertainty } from './uncertainty/combine';

function booksAt(placement: Placement) {
  return { subtotals: new SubtotalBook(placement), uncertainty: new UncertaintyBook(placement) };
}

/**
 * A roll-up of one list that belongs to no program: the airframe frame has the list's axis words, there is no chord, growth is
 * only what rows state, and r0 is the first row's place. Rows come one at a time or by column; only subtotals are kept.
 */
export class StatelessRollUp {
  readonly #declarations;
  #placement: Placement | null = null;
  #books: { readonly subtotals: SubtotalBook; readonly uncertainty: UncertaintyBook } | null = null;
  #columns: ColumnBook | null = null;

  constructor(declarations: ListDeclarations) {
    this.#declarations = declarations;
  }

  add(component: Component): void {
    this.#books ??= booksAt(this.#placementAt(component.position));
    this.#books.subtotals.add(component);
    this.#books.uncertainty.add(component);
  }

  addRows(rows: RowColumns): void {
    if (rows.rows === 0) return;
    const { x, y, z } = rows.numbers;
    this.#columns ??= new ColumnBook(this.#placementAt([x[0] ?? NaN, y[0] ?? NaN, z[0] ?? NaN]));
    this.#columns.add(rows);
  }

  /** The geometry in use; before the first row, r0 is the datum. */
  get geometry(): AirframeGeometry {
    return this.#placement?.geometry ?? bareGeometry(this.#declarations.axes, [0, 0, 0]);
  }

  result(): RollUp {
    const subtotals = [...(this.#books?.subtotals.subtotals() ?? []), ...(this.#columns?.subtotals() ?? [])];
    return rollUp(subtotals, [], this.geometry, NO_GROWTH);
  }

  /** How uncertain the basic and the predicted account of `result` are. */
  uncertainty(): CombinedUncertainty {
    const sums = [...(this.#books?.uncertainty.sums() ?? []), ...(this.#columns?.uncertainties() ?? [])];
    return combineUncertainty(sums, [], NO_GROWTH);
  }

  /** About the first row's place, whichever way it came. */
  #placementAt(position: Vec3): Placement {
    if (this.#placement !== null) return this.#placement;
    const { axes, pose } = this.#declarations;
    const matrix = listToAirframe(axes, pose, axes);
    const r0 = placeFrom(NO_POSE.origin, matrix, pose.origin, position);
    this.#placement = new Placement(this.#declarations, bareGeometry(axes, r0));
    return this.#placement;
  }
}
