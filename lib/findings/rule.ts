import { type RollUp } from '@/lib/mass/roll-up';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';

import { type Severity } from './finding';
import { type RowFacts } from './row-facts';

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
  /** After the last row; null when there is nothing to say. */
  report(): Sighting | null;
}

/** A rule about rows. It sees each row once; `keeps` says what stays in memory between rows, which must not grow with their number. */
export interface RowRule extends Rule {
  readonly keeps: string;
  readonly watch: () => Watch;
}

/** A rule about a rolled-up condition. */
export interface WholeRule extends Rule {
  readonly look: (whole: RollUp, geometry: AirframeGeometry) => Sighting | null;
}

export interface RotatingParts {
  readonly rotors: readonly Rotor[];
  readonly points: readonly OperatingPoint[];
}

/** A rule about the rotating parts of a configuration and their operating points. */
export interface RotorRule extends Rule {
  readonly look: (parts: RotatingParts) => Sighting | null;
}
