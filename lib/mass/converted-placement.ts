import { type AirframeVec } from '@/lib/frames/tags';
import { type Mat3, multiply } from '@/lib/numerics/mat3';
import { subVec } from '@/lib/numerics/vec3';

import { type Account } from './account';
import { type Component } from './component';
import { type ListDeclarations } from './declarations';
import { type IssueConversion } from './issue-conversion';
import { Placement } from './place';

type Placed = Parameters<Placement['account']>[0];

/**
 * The rows of a list that is stated in one frame issue, as they lie in another: each is placed, and mirrored, where its own issue puts
 * it, then carried over. Accounts are about the reference point of the other issue.
 */
class ConvertedPlacement extends Placement {
  override readonly toAirframe: Mat3;
  readonly #own: Placement;
  readonly #conversion: IssueConversion;

  constructor(declarations: ListDeclarations, conversion: IssueConversion) {
    super(declarations, conversion.to);
    this.#own = new Placement(declarations, conversion.from);
    this.#conversion = conversion;
    this.toAirframe = multiply(conversion.change.matrix, this.#own.toAirframe);
  }

  override place(component: Pick<Component, 'position'>): AirframeVec {
    const [listed] = this.places({ ...component, pair: false });
    return listed === undefined ? [NaN, NaN, NaN] : subVec(listed, this.geometry.reference);
  }

  override places(component: Pick<Component, 'position' | 'pair'>): readonly AirframeVec[] {
    return this.#own.places(component).map((place) => this.#conversion.place(place));
  }

  /** @throws RangeError always: its rows are mirrored in their own issue, where the plane need not lie along an axis of this one. */
  override get plane(): never {
    throw new RangeError(
      'a list that is converted to another frame issue has its plane of symmetry in its own',
    );
  }

  override account(component: Placed): Account {
    return this.#conversion.account(this.#own.account(component));
  }

  override parts(component: Placed): { readonly pieces: Account; readonly image: Account | null } {
    const { pieces, image } = this.#own.parts(component);
    return {
      pieces: this.#conversion.account(pieces),
      image: image && this.#conversion.account(image),
    };
  }
}

/** The placement of a list's rows in the issue that the conversion leads to; the plain one where that is the list's own. */
export function placementIn(declarations: ListDeclarations, conversion: IssueConversion): Placement {
  return conversion.isSame
    ? new Placement(declarations, conversion.to)
    : new ConvertedPlacement(declarations, conversion);
}
