/** A submission until it is decided; `approved` by signing makes it a baseline. */
export type SubmissionState = 'submitted' | 'returned' | 'approved';

/** A signed baseline: what later insert-only rows say of it. */
export type BaselineState = 'current' | 'superseded' | 'withdrawn';

/** Withdrawn outweighs superseded: a withdrawn baseline must never be taken for one that was good in its time. */
export function baselineState(marks: {
  readonly superseded: boolean;
  readonly withdrawn: boolean;
}): BaselineState {
  if (marks.withdrawn) return 'withdrawn';
  return marks.superseded ? 'superseded' : 'current';
}
