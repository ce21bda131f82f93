import Link from 'next/link';
import { classes } from '@/components/ui/classes';

interface ChoiceLinksProps {
  /** What is chosen, e.g. "Lengths in". */
  readonly label: string;
  readonly options: readonly { readonly href: string; readonly words: string; readonly current: boolean }[];
}

/** One of a few ways to see a page, each with its own address. */
export function ChoiceLinks({ label, options }: ChoiceLinksProps) {
  return (
    <nav aria-label={label} className="no-print flex flex-wrap items-baseline gap-x-3 gap-y-1">
      <span className="text-ink-2">{label}</span>
      {options.map(({ href, words, current }) => (
        <Link
          key={href}
          href={href}
          scroll={false}
          aria-current={current ? 'true' : undefined}
          className={classes(
            'border-b-2 pointer-coarse:py-2',
            current ? 'border-spin text-ink' : 'border-transparent text-ink-2 hover:text-ink',
          )}
        >
          {words}
        </Link>
      ))}
    </nav>
  );
}
