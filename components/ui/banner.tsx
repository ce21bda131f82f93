import { type ReactNode } from 'react';
import { type Severity, SEVERITY_TEXT, SeverityMark, SEVERITY_WORDS } from '@/components/ui/severity';
import { classes } from '@/components/ui/classes';

interface BannerProps {
  readonly severity: Severity;
  /** The word beside the mark; by default the severity's own. An error of ours is `blocker` with the word "Failed". */
  readonly word?: string;
  readonly title?: ReactNode;
  readonly children?: ReactNode;
  readonly action?: ReactNode;
  /** True for what appears after an action of the user: it is then read out. */
  readonly live?: boolean;
}

const RULES: Record<Severity, string> = {
  blocker: 'border-limit',
  warning: 'border-caution',
  note: 'border-ink-2',
  done: 'border-pass',
};

/** A note between two rules, its severity in the margin: what happened, to what, what to do. */
export function Banner({ severity, word, title, children, action, live = false }: BannerProps) {
  return (
    <div
      role={live ? (severity === 'blocker' ? 'alert' : 'status') : undefined}
      className={classes(
        'noted keep-together grid gap-x-4 gap-y-1 border-y py-2 [&:has(+.noted)]:border-b-0 sm:grid-cols-[88px_1fr_auto]',
        RULES[severity],
      )}
    >
      <p className={classes('flex items-start gap-1.5 font-semibold', SEVERITY_TEXT[severity])}>
        <span className="flex h-5 items-center">
          <SeverityMark severity={severity} />
        </span>
        {word ?? SEVERITY_WORDS[severity]}
      </p>
      <div className="measure grid min-w-0 gap-1 wrap-anywhere">
        {title ? <p className="font-semibold">{title}</p> : null}
        {children}
      </div>
      {action ? <div className="self-start sm:justify-self-end">{action}</div> : null}
    </div>
  );
}
