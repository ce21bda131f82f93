import { type GroupBreakdown } from '@/lib/groups/breakdown';
import { type Component } from '@/lib/mass/component';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Subtotal } from '@/lib/mass/subtotals';

/** What the revision before this one held of a group: its subtotals, kept about the same reference point. */
export type FormerSubtotal = Pick<Subtotal, 'group' | 'rows' | 'basic'>;

/** What the rules on rows can know beyond the list itself. A rule that needs what is not given says nothing. */
export interface RowContext {
  /** The airframe of the program; absent for a list that belongs to no program. */
  readonly geometry?: AirframeGeometry | undefined;
  /** The list's revision before this one; absent for a first revision. */
  readonly former?: readonly FormerSubtotal[] | undefined;
  /** The breakdown of the program's groups; absent for a list that belongs to no program. */
  readonly groups?: Pick<GroupBreakdown, 'isUnknown'> | undefined;
}

/** What rules compare of a row with what its revision before said under the same item: one piece, SI, list axes. */
export type RowFigures = Pick<Component, 'mass' | 'position' | 'moments'>;

/** A counted row whose figures changed since the revision before, when both are stated in one frame. */
export interface RowChange {
  readonly item: string;
  readonly now: RowFigures;
  readonly before: RowFigures;
}
