import { type Component } from '@/lib/mass/component';

type Columns<K extends string> = Readonly<Record<K, Float64Array>>;

/** What is booked of rows that come by column: `Component`, SI, with NaN for growth and σ that a row does not state. */
export interface RowColumns {
  readonly rows: number;
  readonly numbers: Columns<
    | 'quantity'
    | 'mass'
    | 'x'
    | 'y'
    | 'z'
    | 'ixx'
    | 'iyy'
    | 'izz'
    | 'ixy'
    | 'ixz'
    | 'iyz'
    | 'yaw'
    | 'pitch'
    | 'roll'
    | 'growth'
    | 'mass_sigma'
    | 'x_sigma'
    | 'y_sigma'
    | 'z_sigma'
    | 'ixx_sigma'
    | 'iyy_sigma'
    | 'izz_sigma'
    | 'ixy_sigma'
    | 'ixz_sigma'
    | 'iyz_sigma'
  >;
  /** Indices into `groups`, `CATEGORIES`, `MATURITIES` (or its length for none) and `CHANGE_STATUSES`. */
  readonly group: Int32Array;
  readonly category: Uint8Array;
  readonly maturity: Uint8Array;
  readonly status: Uint8Array;
  /** 1 where a row is memo, is a pair, has an own moment that is not zero, states a σ. */
  readonly memo: Uint8Array;
  readonly pair: Uint8Array;
  readonly hasMoments: Uint8Array;
  readonly hasSigma: Uint8Array;
  /** All group paths so far. */
  readonly groups: readonly string[];
  component(row: number): Component;
}
