import { type ReactNode } from 'react';
import { TextLink } from '@/components/ui/text-link';

export interface SummaryLine {
  readonly href: string;
  readonly title: string;
  /** What is there: revision, date, rows. */
  readonly facts: ReactNode;
  /** What waits there for someone; null when nothing does. */
  readonly waits: string | null;
}

/** What a station holds, on the program's home: one ruled line each, what waits in words at the right. */
export function StationSummary({ lines }: { readonly lines: readonly SummaryLine[] }) {
  return (
    <ul className="grid border-t border-rule">
      {lines.map((line) => (
        <li
          key={line.href}
          className="grid items-baseline gap-x-6 gap-y-0.5 border-b border-rule py-1.5 pointer-coarse:py-3 sm:grid-cols-[minmax(160px,34%)_1fr_auto]"
        >
          <TextLink href={line.href}>{line.title}</TextLink>
          <span className="text-ink-2">{line.facts}</span>
          {line.waits === null ? null : <span className="font-semibold text-caution">{line.waits}</span>}
        </li>
      ))}
    </ul>
  );
}
