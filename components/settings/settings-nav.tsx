import Link from 'next/link';
import { classes } from '@/components/ui/classes';

const PAGES = [
  { path: '', title: 'Airframe frame' },
  { path: '/reference-points', title: 'Reference points' },
  { path: '/builds', title: 'Builds' },
  { path: '/groups', title: 'Group breakdown' },
  { path: '/limits', title: 'Limits and growth' },
  { path: '/members', title: 'Members' },
] as const;

export type SettingsPath = (typeof PAGES)[number]['path'];

/** The pages of a program's settings. */
export function SettingsNav({
  program,
  current,
}: {
  readonly program: string;
  readonly current: SettingsPath;
}) {
  return (
    <nav aria-label="Settings" className="no-print flex flex-wrap gap-x-6 gap-y-1 border-b border-rule">
      {PAGES.map(({ path, title }) => (
        <Link
          key={path}
          href={`/programs/${program}/settings${path}`}
          aria-current={path === current ? 'page' : undefined}
          className={classes(
            '-mb-px border-b-2 py-1.5 pointer-coarse:py-3',
            path === current
              ? 'border-spin font-semibold text-ink'
              : 'border-transparent text-ink-2 hover:border-ink-2 hover:text-ink',
          )}
        >
          {title}
        </Link>
      ))}
    </nav>
  );
}
