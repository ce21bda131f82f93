import { listToAirframe, placeFrom } from '@/lib/frames/pose';
import { type Moments, tensorOf } from '@/lib/frames/products';
import { lateralIndex, mirrorPlace, mirrorSym } from '@/lib/frames/reflection';
import { type AirframeVec, type In } from '@/lib/frames/tags';
import { type Mat3, multiply } from '@/lib/numerics/mat3';
import { rotation } from '@/lib/numerics/rotation';
import { type Sym3, ZERO_SYM, congruence, halfTraceMinus, scaleSym } from '@/lib/numerics/sym3';

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

  /** Lateral coordinate, from r0, of the plane of symmetry, m. */
  get plane(): number {
    const { reference, lateralPlane } = this.geometry;
    return lateralPlane - reference[this.lateral];
  }

  /** R S Rᵀ: the second moment, in airframe components, of moments stated in the axes of a row. */
  own({ orientation }: Pick<Component, 'orientation'>, moments: Moments): In<'airframe', Sym3> {
    const { yaw, pitch, roll } = orientation;
    return congruence(
      multiply(this.toAirframe, rotation(yaw, pitch, roll)),
      halfTraceMinus(tensorOf(moments)),
    );
  }

  /**
   * The account, about r0, of all pieces of a row and of their mirror image where it has one: S' = R S Rᵀ, r' = R r + t.
   * Growth is not in it; a memo row has an account like any other, and it is the caller who does not sum it.
   */
  account(component: Placed): Account {
    const { mass, moments, quantity } = component;
    const place = this.place(component);
    const own = hasOwnMoments(moments) ? this.own(component, moments) : ZERO_SYM;
    const pieces = accountOfBody(quantity * mass, place, scaleSym(quantity, own));
    if (!isMirrored(component, this.declarations)) return pieces;
    const across = mirrorPlace(place, this.lateral, this.plane);
    const image = mirrorSym(own, this.lateral);
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
