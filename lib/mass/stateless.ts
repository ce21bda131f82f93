import { NO_POSE, listToAirframe, placeFrom } from '@/lib/frames/pose';

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
 * only what rows state, and r0 is the first row's place. Rows come one at a time; only subtotals are kept.
 */
export class StatelessRollUp {
  readonly #declarations;
  #books: { readonly subtotals: SubtotalBook; readonly uncertainty: UncertaintyBook } | null = null;

  constructor(declarations: ListDeclarations) {
    this.#declarations = declarations;
  }

  add(component: Component): void {
    this.#books ??= booksAt(new Placement(this.#declarations, this.#geometryAt(component)));
    this.#books.subtotals.add(component);
    this.#books.uncertainty.add(component);
  }

  /** The geometry in use; before the first row, r0 is the datum. */
  get geometry(): AirframeGeometry {
    return this.#books?.subtotals.placement.geometry ?? bareGeometry(this.#declarations.axes, [0, 0, 0]);
  }

  result(): RollUp {
    return rollUp(this.#books?.subtotals.subtotals() ?? [], [], this.geometry, NO_GROWTH);
  }

  /** How uncertain the basic and the predicted account of `result` are. */
  uncertainty(): CombinedUncertainty {
    return combineUncertainty(this.#books?.uncertainty.sums() ?? [], [], NO_GROWTH);
  }

  #geometryAt({ position }: Component): AirframeGeometry {
    const { axes, pose } = this.#declarations;
    const matrix = listToAirframe(axes, pose, axes);
    return bareGeometry(axes, placeFrom(NO_POSE.origin, matrix, pose.origin, position));
  }
}
