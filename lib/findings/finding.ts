export type Severity = 'blocker' | 'warning' | 'note';

/** How many of the rows concerned a finding names. */
export const ROWS_NAMED = 200;

/** What a check saw. `rows` names the items concerned (the first 200), `count` says how many there are. */
export interface Finding {
  readonly rule: string;
  readonly severity: Severity;
  readonly message: string;
  readonly rows: readonly string[];
  readonly count: number;
}

/** A finding and where it was seen: a list revision, a condition, the rotating parts. */
export interface PlacedFinding extends Finding {
  readonly where: {
    readonly kind: 'list' | 'condition' | 'rotors';
    readonly code: string;
    readonly revision?: number;
  };
}
