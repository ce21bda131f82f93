import { type AirframeVec } from '@/lib/frames/tags';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type PhysicalCheck, checkOwnMoments, hasOwnMoments } from '@/lib/mass/physical';
import { type Placement, isMirrored, piecesOf } from '@/lib/mass/place';
import { roundingOfPrinted } from '@/lib/mass/rounding';
import { applyMat } from '@/lib/numerics/mat3';
import { addVec } from '@/lib/numerics/vec3';

import { type Side, namedSide } from './named-side';

/** A row and what several rules ask of it, worked out once and only when asked. */
export class RowFacts {
  #ownCheck: PhysicalCheck | null = null;
  #place: AirframeVec | null = null;
  #side: Side | null | undefined;

  constructor(
    readonly component: Component,
    readonly placement: Placement,
  ) {}

  get declarations(): ListDeclarations {
    return this.placement.declarations;
  }

  get isCounted(): boolean {
    return this.component.counting === 'counted';
  }

  get isMirrored(): boolean {
    return isMirrored(this.component, this.declarations);
  }

  get hasOwnMoments(): boolean {
    return hasOwnMoments(this.component.moments);
  }

  /** Mass of all pieces and mirror images, kg. */
  get totalMass(): number {
    return this.component.mass * piecesOf(this.component, this.declarations);
  }

  /** What people call the row: its description, or its item where it has none. */
  get name(): string {
    return this.component.description ?? this.component.item;
  }

  /** The side that the description tells, or else the item. */
  get side(): Side | null {
    if (this.#side === undefined)
      this.#side = namedSide(this.component.description ?? '') ?? namedSide(this.component.item);
    return this.#side;
  }

  /** CG of the row as it stands (not of its mirror image) from the datum, airframe components, m. */
  get place(): AirframeVec {
    this.#place ??= this.placeOf(this.component.position);
    return this.#place;
  }

  /** Where a place of the list is in the airframe, from the datum, m. */
  placeOf(position: Component['position']): AirframeVec {
    return addVec(this.declarations.pose.origin, applyMat(this.placement.toAirframe, position));
  }

  /** How far the CG of the row as it stands is right of the plane of symmetry, m; negative to the left. */
  get right(): number {
    const { geometry, lateral } = this.placement;
    const across = this.place[lateral] - geometry.lateralPlane;
    return geometry.axes[lateral] === 'right' ? across : 0 - across;
  }

  /** Radius of gyration from the three own moments, sqrt(tr S / m), m; null without mass or moments. */
  get radius(): number | null {
    const { mass, moments } = this.component;
    if (mass === 0 || !this.hasOwnMoments) return null;
    const square = (moments.ixx + moments.iyy + moments.izz) / (2 * mass);
    return square > 0 ? Math.sqrt(square) : null;
  }

  /** What half a unit of the last printed digit can do to a principal second moment, kg.m2. */
  get rounding(): number {
    return roundingOfPrinted(this.component.moments, this.declarations.inertiaUnit);
  }

  /** Whether the row's own moments, or for negative mass what they take away, can be real. */
  get ownCheck(): PhysicalCheck {
    if (this.#ownCheck !== null) return this.#ownCheck;
    const { mass, moments } = this.component;
    const strict = checkOwnMoments(mass, moments);
    this.#ownCheck = strict.verdict === 'physical' ? strict : checkOwnMoments(mass, moments, this.rounding);
    return this.#ownCheck;
  }
}
