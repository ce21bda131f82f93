import { type AirframeTwice, exactPlaceFrom, listToAirframe, placeFrom } from '@/lib/frames/pose';
import { tensorOf } from '@/lib/frames/products';
import { lateralIndex, mirrorPlace, mirrorSym } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Mat3, multiply } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import { ZERO_SYM, congruence, halfTraceMinus } from '@/lib/numerics/sym3';
import { type Twice, addTwice, minusTwice, timesTwice } from '@/lib/numerics/twice';
import { addVec } from '@/lib/numerics/vec3';

import { type Account, accountAt, addAccounts, scaleAccount } from './account';
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
  /** R P: from list components to airframe components. */
  readonly toAirframe: Mat3;
  /** Which airframe component changes sign in the mirror. */
  readonly lateral: 0 | 1 | 2;

  constructor(
    readonly declarations: ListDeclarations,
    readonly geometry: AirframeGeometry,
  ) {
    this.toAirframe = listToAirframe(declarations.axes, declarations.pose, geometry.axes);
    this.lateral = lateralIndex(geometry.axes);
  }

  /** The CG of a row's pieces as seen from the geometry's reference point r0, m. */
  place(component: Pick<Component, 'position'>): AirframeVec {
    const { reference } = this.geometry;
    return placeFrom(reference, this.toAirframe, this.declarations.pose.origin, component.position);
  }

  /** Where a row's pieces are, from the datum, m: as listed, then their mirror image where the row stands for one too. */
  places(component: Pick<Component, 'position' | 'pair'>): readonly AirframeVec[] {
    const { geometry, declarations, lateral } = this;
    const listed: AirframeVec = addVec(geometry.reference, this.place(component));
    if (!isMirrored(component, declarations)) return [listed];
    return [listed, mirrorPlace(listed, lateral, geometry.lateralPlane)];
  }

  /** Lateral coordinate, from r0, of the plane of symmetry, m. */
  get plane(): Twice {
    const { reference, lateralPlane } = this.geometry;
    return addTwice([lateralPlane, 0], [-reference[this.lateral], 0]);
  }

  /** The matrix from a row's own axes to airframe components. */
  ownAxes({ orientation: { yaw, pitch, roll } }: Pick<Component, 'orientation'>): Mat3 {
    if (yaw === 0 && pitch === 0 && roll === 0) return this.toAirframe;
    return multiply(this.toAirframe, rotation(yaw, pitch, roll));
  }

  /**
   * The account, about r0, of all pieces of a row and of their mirror image where it has one: S' = R S Rᵀ, r' = R r + t.
   * Growth is not in it; a memo row has an account like any other, and it is the caller who does not sum it.
   */
  account(component: Placed): Account {
    const { quantity } = component;
    const { piece, image } = this.#onePiece(component);
    if (image === null) return quantity === 1 ? piece : scaleAccount(quantity, piece);
    return scaleAccount(quantity, addAccounts(piece, image));
  }

  /** The same with the mirror image apart; null where the row has none. */
  parts(component: Placed): { readonly pieces: Account; readonly image: Account | null } {
    const { piece, image } = this.#onePiece(component);
    const { quantity } = component;
    return { pieces: scaleAccount(quantity, piece), image: image && scaleAccount(quantity, image) };
  }

  #onePiece(component: Placed): { readonly piece: Account; readonly image: Account | null } {
    const { mass, moments } = component;
    const { reference } = this.geometry;
    const { origin } = this.declarations.pose;
    const place = exactPlaceFrom(reference, this.toAirframe, origin, component.position);
    const own = hasOwnMoments(moments)
      ? congruence(this.ownAxes(component), halfTraceMinus(tensorOf(moments)))
      : ZERO_SYM;
    const mirrored = isMirrored(component, this.declarations);
    return {
      piece: accountAt(mass, place, own),
      image: mirrored ? accountAt(mass, this.#mirrored(place), mirrorSym(own, this.lateral)) : null,
    };
  }

  #mirrored(place: AirframeTwice): AirframeTwice {
    const twicePlane = timesTwice([2, 0], this.plane);
    const across = (k: 0 | 1 | 2): Twice =>
      k === this.lateral ? addTwice(twicePlane, minusTwice(place[k])) : place[k];
    return [across(0), across(1), across(2)];
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
