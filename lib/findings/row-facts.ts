import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type PhysicalCheck, checkOwnMoments, hasOwnMoments } from '@/lib/mass/physical';
import { piecesOf } from '@/lib/mass/place';
import { roundingOfPrinted } from '@/lib/mass/rounding';

/** A row and what several rules ask of it, worked out once and only when asked. */
export class RowFacts {
  #ownCheck: PhysicalCheck | null = null;

  constructor(
    readonly component: Component,
    readonly declarations: ListDeclarations,
  ) {}

  get isCounted(): boolean {
    return this.component.counting === 'counted';
  }

  get hasOwnMoments(): boolean {
    return hasOwnMoments(this.component.moments);
  }

  /** Mass of all pieces and mirror images, kg. */
  get totalMass(): number {
    return this.component.mass * piecesOf(this.component, this.declarations);
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
