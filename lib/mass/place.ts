import { listToAirframe, placeFrom } from '@/lib/frames/pose';
import { tensorOf } from '@/lib/frames/products';
import { lateralIndex, mirrorPlace, mirrorSym } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { multiply } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import { ZERO_SYM, congruence, halfTraceMinus, scaleSym } from '@/lib/numerics/sym3';

import { type Account, accountOfBody, addAccounts } from './account';
import { type Component } from './component';
import { type ListDeclarations } from './declarations';
import { type AirframeGeometry } from './geometry';
import { hasOwnMoments } from './physical';

type Placed = Pick<Component, 'mass' | 'position' | 'moments' | 'orientation' | 'quantity' | 'pair'>;

/** True where a row also stands for its mirror image: a pair, or any row of a half list (once, even for a pair in a half list). */
export function isMirrored(component: Pick<Component, 'pair'>, declarations: ListDeclarations): boolean {
  return component.pair || declarations.extent !== 'whole';
}

/** How many pieces a row stands for. */
export function piecesOf(
  component: Pick<Component, 'pair' | 'quantity'>,
  declarations: ListDeclarations,
): number {
  return component.quantity * (isMirrored(component, declarations) ? 2 : 1);
}

/** What the rows of one list need to be placed in one airframe: made once, used for every row. */
export class Placement {
  readonly #matrix;
  readonly #lateral;

  constructor(
    readonly declarations: ListDeclarations,
    readonly geometry: AirframeGeometry,
  ) {
    this.#matrix = listToAirframe(declarations.axes, declarations.pose, geometry.axes);
    this.#lateral = lateralIndex(geometry.axes);
  }

  /** The CG of a row's pieces as seen from the geometry's reference point r0, m. */
  place(component: Pick<Component, 'position'>): AirframeVec {
    const { reference } = this.geometry;
    return placeFrom(reference, this.#matrix, this.declarations.pose.origin, component.position);
  }

  /**
   * The account, about r0, of all pieces of a row and of their mirror image where it has one: S' = R S Rᵀ, r' = R r + t.
   * Growth is not in it; a memo row has an account like any other, and it is the caller who does not sum it.
   */
  account(component: Placed): Account {
    const { mass, moments, orientation, quantity } = component;
    const place = this.place(component);
    const { yaw, pitch, roll } = orientation;
    const own = hasOwnMoments(moments)
      ? congruence(multiply(this.#matrix, rotation(yaw, pitch, roll)), halfTraceMinus(tensorOf(moments)))
      : ZERO_SYM;
    const pieces = accountOfBody(quantity * mass, place, scaleSym(quantity, own));
    if (!isMirrored(component, this.declarations)) return pieces;
    const { reference, lateralPlane } = this.geometry;
    const across = mirrorPlace(place, this.#lateral, lateralPlane - reference[this.#lateral]);
    const image = mirrorSym(own, this.#lateral);
    return addAccounts(pieces, accountOfBody(quantity * mass, across, scaleSym(quantity, image)));
  }
}

/** `Placement.account` for a single row. */
export function accountOfComponent(
  component: Placed,
  declarations: ListDeclarations,
  geometry: AirframeGeometry,
): Account {
  return new Placement(declarations, geometry).account(component);
}
