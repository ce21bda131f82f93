import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Placement } from '@/lib/mass/place';
import { type RollUp } from '@/lib/mass/roll-up';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';

import { type CheckBlock } from './columns/check-block';
import { type RowChange, type RowContext } from './context';
import { type Severity } from './finding';
import { type RowFacts } from './row-facts';
import { type SharedBooks } from './shared-books';

/** What a rule says about itself, for screens and for whoever has to answer its findings. */
export interface Rule {
  /** Stable: findings and their answers are stored by it. */
  readonly id: string;
  readonly severity: Severity;
  readonly sees: string;
  readonly why: string;
  readonly remedy: string;
  /** A document with its place, `first principles`, or `common practice, no source`. */
  readonly source: string;
}

/** What a rule saw. `rows` names the items (or rotors) concerned, the first 200 at most. */
export interface Sighting {
  readonly message: string;
  readonly rows: readonly string[];
  readonly count: number;
}

/** Watches the rows of one list go by, one at a time. */
export interface Watch {
  see(row: RowFacts): void;
  /**
   * The same for all rows of a block, which come in the order of the list: those that matter as objects are shown to `see`, the others
   * are taken in from their columns. Without it, `see` is shown every row. Rows come in one of the two ways, never in both.
   */
  block?(rows: CheckBlock): void;
  /** After the last row, once for each row whose figures changed since the revision before. */
  change?(change: RowChange): void;
  /** After the last row; null when there is nothing to say. */
  report(): Sighting | null;
}

/** A rule about rows. It sees each row once; `keeps` says what stays in memory between rows, which must not grow with their number. */
export interface RowRule extends Rule {
  readonly keeps: string;
  readonly watch: (list: WatchedList) => Watch;
}

/** What a watch can know of the list before its first row. Without a program `placement` is in the list's own axis words. */
export interface WatchedList extends RowContext {
  readonly placement: Placement;
  readonly books: SharedBooks;
}

/** A rule about a rolled-up condition. */
export interface WholeRule extends Rule {
  readonly look: (whole: RollUp, geometry: AirframeGeometry) => Sighting | null;
}

export interface RotatingParts {
  readonly rotors: readonly Rotor[];
  readonly points: readonly OperatingPoint[];
  /** The airframe; without it only shafts given by angles have a direction. */
  readonly geometry?: AirframeGeometry | undefined;
  /**
   * The list rows that rotors name (`list/item`) and that exist: the inertia tensor of one piece about its own CG, airframe components,
   * kg.m2. Without it no rotor is held against its row.
   */
  readonly carriers?: ReadonlyMap<string, Sym3> | undefined;
}

/** A rule about the rotating parts of a configuration and their operating points. */
export interface RotorRule extends Rule {
  readonly look: (parts: RotatingParts) => Sighting | null;
}
