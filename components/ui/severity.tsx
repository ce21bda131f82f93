/** A finding's severity, and the two outcomes that are told in the same form. */
export type Severity = 'blocker' | 'warning' | 'note' | 'done';

export const SEVERITY_WORDS: Record<Severity, string> = {
  blocker: 'Blocker',
  warning: 'Warning',
  note: 'Note',
  done: 'Done',
};

export const SEVERITY_TEXT: Record<Severity, string> = {
  blocker: 'text-limit',
  warning: 'text-caution',
  note: 'text-ink-2',
  done: 'text-pass',
};

/** An ink mark whose shape alone tells the severity: barred square, triangle, ring, check. Always beside its word. */
export function SeverityMark({ severity }: { readonly severity: Severity }) {
  return (
    <svg
      width="12"
      height="12"
      viewBox="0 0 12 12"
      aria-hidden="true"
      className="shrink-0 fill-none stroke-current"
      strokeWidth="1.5"
    >
      {severity === 'blocker' ? <path d="M1 1h10v10H1zM1 11 11 1" /> : null}
      {severity === 'warning' ? <path d="M6 1.2 11.2 11H.8zM6 5v3" /> : null}
      {severity === 'note' ? <circle cx="6" cy="6" r="4.5" /> : null}
      {severity === 'done' ? <path d="M1 6.5 4.5 10 11 2" /> : null}
    </svg>
  );
}

/** Mark and word, e.g. in a table of findings. */
export function SeverityWord({
  severity,
  word = SEVERITY_WORDS[severity],
}: {
  readonly severity: Severity;
  readonly word?: string;
}) {
  return (
    <span className={`inline-flex items-start gap-1.5 font-semibold ${SEVERITY_TEXT[severity]}`}>
      <span className="flex h-5 items-center">
        <SeverityMark severity={severity} />
      </span>
      {word}
    </span>
  );
}
