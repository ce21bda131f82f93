import { type Moments } from '@/lib/frames/products';
import { type Vec3 } from '@/lib/numerics/vec3';

/** What a component is on board for. */
export type Category = 'empty' | 'operating' | 'payload' | 'fuel' | 'expendable' | 'ballast';
export const CATEGORIES: readonly Category[] = [
  'empty',
  'operating',
  'payload',
  'fuel',
  'expendable',
  'ballast',
];

/** E estimated, C calculated, A actual (weighed). */
export type Maturity = 'E' | 'C' | 'A';
export const MATURITIES: readonly Maturity[] = ['E', 'C', 'A'];

/** A memo row is shown and not summed: an assembly total, or a child that its parent supersedes. */
export type Counting = 'counted' | 'memo';

/** Approval of an adjustment; component rows are always approved. */
export type ChangeStatus = 'approved' | 'pending' | 'potential';
export const CHANGE_STATUSES: readonly ChangeStatus[] = ['approved', 'pending', 'potential'];

/** One standard uncertainty per value of a row, in the value's unit; null where the list gives none. */
export interface ComponentSigma {
  readonly mass: number | null;
  readonly x: number | null;
  readonly y: number | null;
  readonly z: number | null;
  readonly ixx: number | null;
  readonly iyy: number | null;
  readonly izz: number | null;
  readonly ixy: number | null;
  readonly ixz: number | null;
  readonly iyz: number | null;
}

/**
 * One line of a mass list, in SI and in the list's own axes.
 *
 * `mass` is of one piece in kg; `position` is the CG in the list frame in m; `moments` holds Ixx, Iyy, Izz and
 * the products as positive integrals, of one piece about its own CG in its own axes, kg.m2; `orientation` is yaw, pitch,
 * roll in rad; `growth` is a fraction of mass, null where the row states none.
 */
export interface Component {
  readonly item: string;
  readonly partNumber: string | null;
  readonly partRevision: string | null;
  readonly description: string | null;
  readonly group: string;
  readonly category: Category;
  readonly parent: string | null;
  readonly counting: Counting;
  readonly quantity: number;
  readonly mass: number;
  readonly position: Vec3;
  readonly moments: Moments;
  readonly orientation: Orientation;
  readonly pair: boolean;
  readonly maturity: Maturity | null;
  readonly growth: number | null;
  readonly sigma: ComponentSigma | null;
  readonly source: string | null;
  readonly sourceDate: string | null;
  readonly note: string | null;
  readonly changeRef: string | null;
  readonly status: ChangeStatus;
  /** Columns the contract does not know, kept as the file has them. */
  readonly extra: Readonly<Record<string, string>>;
}

/** Yaw, pitch, roll in rad: own axes are the columns of Rz(yaw) Ry(pitch) Rx(roll) in list-frame components. */
export interface Orientation {
  readonly yaw: number;
  readonly pitch: number;
  readonly roll: number;
}
