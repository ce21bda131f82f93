import { type ReactNode, useId } from 'react';

interface SectionProps {
  readonly title: string;
  /** Beside the title at the right: a count, a link, a button. */
  readonly aside?: ReactNode;
  readonly lead?: ReactNode;
  readonly children: ReactNode;
}

/** A part of a page under its own rule. */
export function Section({ title, aside, lead, children }: SectionProps) {
  const id = useId();
  return (
    <section
      aria-labelledby={id}
      className="grid min-w-0 grid-cols-1 content-start gap-4 border-t border-ink-2 pt-3"
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h2 id={id} className="text-section font-semibold">
          {title}
        </h2>
        {aside ? <div className="text-ink-2">{aside}</div> : null}
      </div>
      {lead ? <div className="measure -mt-2 text-ink-2">{lead}</div> : null}
      {children}
    </section>
  );
}

interface PageHeadProps {
  readonly title: ReactNode;
  /** A line above the title: where this belongs, as a link. */
  readonly above?: ReactNode;
  readonly lead?: ReactNode;
  /** Buttons, at most one primary. */
  readonly actions?: ReactNode;
}

/** The page's title, once a page. */
export function PageHead({ title, above, lead, actions }: PageHeadProps) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4">
      <div className="grid min-w-0 gap-1">
        {above ? <div className="text-ink-2">{above}</div> : null}
        <h1 className="text-title font-semibold wrap-anywhere">{title}</h1>
        {lead ? <div className="measure text-lead text-ink-2">{lead}</div> : null}
      </div>
      {actions ? <div className="flex flex-wrap items-center gap-3">{actions}</div> : null}
    </header>
  );
}
