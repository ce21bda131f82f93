import { type AxisTriple } from '@/lib/frames/axes';
import { type InertiaUnit, type LengthUnit, type MassUnit } from '@/lib/units/table';

/** The pose of a list's own frame in the airframe: r_airframe = o + R P r_list (o in airframe components, m; angles in rad). */
export interface ListPose {
  readonly origin: readonly [number, number, number];
  readonly yaw: number;
  readonly pitch: number;
  readonly roll: number;
}

export type ListKind = 'components' | 'adjustments';
export type Extent = 'whole' | 'left-half' | 'right-half';
export type UncertaintyMeaning = '1sigma' | '2sigma' | '3sigma' | 'half-width';
export type ProductSign = 'positive' | 'negative';

/** What a list says once about all its rows (contract section 1). Units are those of the file; everything else is SI. */
export interface ListDeclarations {
  readonly massUnit: MassUnit;
  readonly lengthUnit: LengthUnit;
  readonly inertiaUnit: InertiaUnit;
  readonly products: ProductSign;
  readonly axes: AxisTriple;
  readonly pose: ListPose;
  readonly kind: ListKind;
  readonly extent: Extent;
  readonly uncertainty: UncertaintyMeaning;
  readonly marking: string | null;
}
