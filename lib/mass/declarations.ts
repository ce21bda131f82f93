import { type AxisTriple } from '@/lib/frames/axes';
import { type Pose } from '@/lib/frames/pose';
import { type ProductSign } from '@/lib/frames/products';
import { type InertiaUnit, type LengthUnit, type MassUnit } from '@/lib/units/table';

export type { ProductSign };

/** The pose of a list's own frame in the airframe: r_airframe = o + R P r_list (o in airframe components, m; angles in rad). */
export type ListPose = Pose;

export type ListKind = 'components' | 'adjustments';
export const LIST_KINDS: readonly ListKind[] = ['components', 'adjustments'];

export type Extent = 'whole' | 'left-half' | 'right-half';
export const EXTENTS: readonly Extent[] = ['whole', 'left-half', 'right-half'];

export type UncertaintyMeaning = '1sigma' | '2sigma' | '3sigma' | 'half-width';
export const UNCERTAINTY_MEANINGS: readonly UncertaintyMeaning[] = [
  '1sigma',
  '2sigma',
  '3sigma',
  'half-width',
];

export const PRODUCT_SIGNS: readonly ProductSign[] = ['positive', 'negative'];

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
