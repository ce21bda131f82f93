import { TextLink } from '@/components/ui/text-link';

interface PaginationProps {
  /** First and last of what is shown, counted from 1, of how many. */
  readonly from: number;
  readonly to: number;
  readonly total: number;
  /** What is counted, e.g. "revisions". */
  readonly of: string;
  readonly previousHref?: string | null;
  readonly nextHref?: string | null;
}

/** Which part of a long list is shown, and the way to its neighbours. */
export function Pagination({ from, to, total, of, previousHref, nextHref }: PaginationProps) {
  return (
    <nav aria-label={`Pages of ${of}`} className="no-print flex flex-wrap items-baseline gap-x-6 gap-y-2">
      <span className="text-ink-2">
        <span className="num">{`${from} to ${to}`}</span> of <span className="num">{total}</span> {of}
      </span>
      {previousHref ? <TextLink href={previousHref}>Before</TextLink> : null}
      {nextHref ? <TextLink href={nextHref}>After</TextLink> : null}
    </nav>
  );
}
