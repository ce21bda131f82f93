import Link from 'next/link';
import { classes } from '@/components/ui/classes';

export interface Station {
  readonly code: string;
  readonly title: string;
  readonly href: string;
  /** What waits there, e.g. 2 "lists with problems"; null when nothing does. */
  readonly waiting: { readonly count: number; readonly words: string } | null;
}

interface StationRuleProps {
  readonly stations: readonly Station[];
  /** The code of the station where the reader stands; null on pages of the program outside them. */
  readonly current: string | null;
}

/**
 * The way through a program as one graduated scale, from part lists to simulator. A plumb line hangs where you stand. Below
 * 600 px: where you are, what is before and after.
 */
export function StationRule({ stations, current }: StationRuleProps) {
  const here = stations.findIndex((station) => station.code === current);
  return (
    <nav aria-label="Stations" className="no-print border-b border-rule px-4 sm:px-6">
      <ol className="flex">
        {stations.map((station, index) => (
          <li
            key={station.code}
            className={classes(
              'relative min-w-0 flex-1',
              here >= 0 && Math.abs(index - here) > 1 && 'max-sm:hidden',
            )}
          >
            <StationMark station={station} current={index === here} last={index === stations.length - 1} />
          </li>
        ))}
      </ol>
    </nav>
  );
}

function StationMark({
  station,
  current,
  last,
}: {
  readonly station: Station;
  readonly current: boolean;
  readonly last: boolean;
}) {
  return (
    <Link
      href={station.href}
      aria-current={current ? 'page' : undefined}
      className="group flex h-full flex-col outline-offset-0"
    >
      <span className="order-1 flex h-6 items-end gap-1.5 overflow-hidden pl-2 text-note whitespace-nowrap text-ink-2">
        {station.waiting ? (
          <>
            <span className="num text-ink">{station.waiting.count}</span>
            <span className="max-md:sr-only">{station.waiting.words}</span>
          </>
        ) : null}
      </span>
      <Graduation last={last} />
      <span
        className={classes(
          'order-3 truncate pt-0.5 pb-2 pl-2 group-hover:underline group-hover:underline-offset-4',
          current ? 'font-semibold text-ink' : 'text-ink-2',
        )}
      >
        {station.title}
      </span>
      {current ? <PlumbLine /> : null}
    </Link>
  );
}

const TICKS = 20;

/** One station's length of the scale: its long mark, nineteen short ones, and the end mark on the last. */
function Graduation({ last }: { readonly last: boolean }) {
  return (
    <svg width="100%" height="12" aria-hidden="true" className="order-2 block shrink-0 overflow-visible">
      <line x1="0" x2="100%" y1="0.5" y2="0.5" className="tick" />
      {Array.from({ length: TICKS }, (_, tick) => (
        <line
          key={tick}
          x1={`${(100 * tick) / TICKS}%`}
          x2={`${(100 * tick) / TICKS}%`}
          y1="0"
          y2={tick === 0 ? 12 : tick === TICKS / 2 ? 8 : 4}
          className="tick"
        />
      ))}
      {last ? <line x1="100%" x2="100%" y1="0" y2="12" className="tick" /> : null}
    </svg>
  );
}

/** A line and its bob, hung from the scale at the station's own mark. */
function PlumbLine() {
  return (
    <svg
      width="9"
      height="46"
      viewBox="0 0 9 46"
      aria-hidden="true"
      className="absolute top-6 -left-1 z-10 overflow-visible fill-spin stroke-spin"
    >
      <path d="M4.5 -6V34" strokeWidth="2" />
      <path d="M1 34h7v3L4.5 46 1 37z" stroke="none" />
    </svg>
  );
}
